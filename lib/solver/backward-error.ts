import type { SparseShape } from "./elimination";

/**
 * The largest |J·d + F|_i / (Σ_j |J_ij|·max|d| + |F_i|) over the rows: how far, as a part of itself, a row would have to change for
 * `step` to solve it (Rigal and Gaches, J. ACM 14, 1967). Infinite where anything is not finite. `work`: two numbers a row.
 */
export function backwardError(
  { rows, columns, size }: SparseShape,
  jacobian: Float64Array,
  residual: Float64Array,
  step: Float64Array,
  work: Float64Array,
): number {
  let longest = 0;
  for (let i = 0; i < size; i++) {
    work[i] = residual[i]!;
    work[size + i] = 0;
    longest = Math.max(longest, Math.abs(step[i]!));
  }
  for (let k = 1; k < jacobian.length; k++) {
    const row = rows[k]!;
    work[row]! += jacobian[k]! * step[columns[k]!]!;
    work[size + row]! += Math.abs(jacobian[k]!);
  }
  let worst = 0;
  for (let i = 0; i < size; i++) {
    const whole = work[size + i]! * longest + Math.abs(residual[i]!);
    const ratio = whole === 0 ? 0 : Math.abs(work[i]!) / whole;
    if (!(ratio < Number.POSITIVE_INFINITY)) return Number.POSITIVE_INFINITY;
    if (ratio > worst) worst = ratio;
  }
  return worst;
}
