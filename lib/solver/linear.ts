import { type Elimination, eliminate, type SparseShape } from "./elimination";

/** A step whose backward error is larger asks for new pivots; one that keeps it with new pivots too is not to be had. */
const GOOD_BACKWARD_ERROR = 1e-9;
const WORST_BACKWARD_ERROR = 1e-3;

/** What Newton's method asks of linear algebra: solve J·d = −F into `step`, then again with the same J. */
export interface Linear {
  /** False where the matrix is singular or not finite. */
  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean;
  solveAgain(residual: Float64Array, step: Float64Array): void;
}

/**
 * Solves J·d = −F for one structure many times. The only file that knows how: pivots are chosen once on a sample, and from
 * then on a factorisation is a list of multiplications over reused arrays. Pivots stay while the backward error of each
 * solution (Rigal and Gaches, J. ACM 14, 1967, row by row) is small, and are chosen anew on the values at hand when it is not.
 */
export class LinearSolver implements Linear {
  private readonly first: Elimination | null;
  private plan: Elimination | null;
  private factors: Float64Array;
  private readonly work: Float64Array;
  private readonly sums: Float64Array;

  /** `sample` chooses the pivots with which every strand begins, so that results do not depend on what was solved before. */
  constructor(
    private readonly shape: SparseShape,
    sample: Float64Array,
  ) {
    this.first = eliminate(shape, sample);
    this.plan = this.first;
    this.factors = new Float64Array(this.first?.places ?? shape.rows.length);
    this.work = new Float64Array(shape.size);
    this.sums = new Float64Array(shape.size);
  }

  /** Goes back to the pivots of the sample. */
  reset(): void {
    this.use(this.first);
  }

  /** Factorises `jacobian` and solves for `step`. False where the matrix is singular or not finite. */
  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    if (this.plan !== null && this.attempt(jacobian, residual, step, GOOD_BACKWARD_ERROR)) return true;
    this.use(eliminate(this.shape, jacobian));
    return this.plan !== null && this.attempt(jacobian, residual, step, WORST_BACKWARD_ERROR);
  }

  /** Solves with the factors of the last `solve` for another residual. */
  solveAgain(residual: Float64Array, step: Float64Array): void {
    this.substitute(residual, step);
  }

  private use(plan: Elimination | null): void {
    this.plan = plan;
    if (plan !== null && plan.places !== this.factors.length) this.factors = new Float64Array(plan.places);
  }

  private attempt(jacobian: Float64Array, residual: Float64Array, step: Float64Array, most: number): boolean {
    this.factorise(jacobian);
    this.substitute(residual, step);
    return this.backwardError(jacobian, residual, step) <= most;
  }

  private factorise(jacobian: Float64Array): void {
    const { factors } = this;
    const { factor: list, pivots } = this.plan!;
    factors.fill(0);
    factors.set(jacobian);
    let at = 0;
    for (let k = 0; k < pivots.length; k++) {
      const inverse = 1 / factors[list[at]!]!;
      const below = list[at + 1]!;
      const right = list[at + 2]!;
      const row = at + 3;
      at = row + right;
      for (let i = 0; i < below; i++) {
        const place = list[at++]!;
        const multiplier = factors[place]! * inverse;
        factors[place] = multiplier;
        if (multiplier !== 0) {
          for (let j = 0; j < right; j++) {
            factors[list[at + j]!]! -= multiplier * factors[list[row + j]!]!;
          }
        }
        at += right;
      }
    }
  }

  private substitute(residual: Float64Array, step: Float64Array): void {
    const { factors, work } = this;
    const plan = this.plan!;
    const { rowOf, columnOf, pivots, rowStarts, rowPlaces, rowColumns } = plan;
    const { belowStarts, belowPlaces, belowRows } = plan;
    for (let i = 0; i < work.length; i++) work[i] = -residual[i]!;
    for (let k = 0; k < pivots.length; k++) {
      const known = work[rowOf[k]!]!;
      if (known === 0) continue;
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        work[belowRows[s]!]! -= factors[belowPlaces[s]!]! * known;
      }
    }
    for (let k = pivots.length - 1; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        sum -= factors[rowPlaces[s]!]! * step[rowColumns[s]!]!;
      }
      step[columnOf[k]!] = sum / factors[pivots[k]!]!;
    }
  }

  /** max |J·d + F|_i / (Σ_j |J_ij|·max|d| + |F_i|) over the rows; infinite where anything is not finite. */
  private backwardError(jacobian: Float64Array, residual: Float64Array, step: Float64Array): number {
    const { rows, columns, size } = this.shape;
    const { work, sums } = this;
    let longest = 0;
    for (let i = 0; i < size; i++) {
      work[i] = residual[i]!;
      sums[i] = 0;
      const length = Math.abs(step[i]!);
      if (!(length <= longest)) longest = length;
    }
    for (let k = 1; k < jacobian.length; k++) {
      const row = rows[k]!;
      work[row]! += jacobian[k]! * step[columns[k]!]!;
      sums[row]! += Math.abs(jacobian[k]!);
    }
    let worst = 0;
    for (let i = 0; i < size; i++) {
      const whole = sums[i]! * longest + Math.abs(residual[i]!);
      const ratio = whole === 0 ? 0 : Math.abs(work[i]!) / whole;
      if (!(ratio < Number.POSITIVE_INFINITY)) return Number.POSITIVE_INFINITY;
      if (ratio > worst) worst = ratio;
    }
    return worst;
  }
}
