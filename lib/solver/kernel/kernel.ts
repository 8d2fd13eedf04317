/** Part of a row's own size that may be left over by a solution before its pivots are doubted. */
export const GOOD_BACKWARD_ERROR = 1e-9;

/**
 * The numbers of one elimination: a kernel knows its multiplications and keeps nothing between calls but arrays to work in.
 * `a`: values of the matrix J, places as in its shape. `b`: a right side, `d`: a solution, one number an unknown. `f`: the
 * factors, `Elimination.places` numbers and the inverse of each pivot after them; written by `solve`, read by the others.
 *
 * There are two: a list of operations, and generated code. Both do the same operations in the same order and give the same bytes.
 */
export interface Kernel {
  /**
   * Factorises and solves J·d = −b. The static pivots are watched by what growth of the factors would spoil: true where in
   * every row |J·d + b| ≤ 1e-9·(|its largest entry on the sample|·max|d| + |b|), which is enough for a small backward error.
   */
  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean;
  /** Solves J·d = −b with the factors at hand. */
  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void;
  /** Solves Jᵀ·d = b with the factors at hand. */
  solveTransposed(b: Float64Array, d: Float64Array, f: Float64Array): void;
}
