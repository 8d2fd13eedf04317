import type { Elimination } from "../elimination";

/**
 * How often the largest entry of a row on the sample may be contained in what is subtracted from the row. The backward error of a
 * solution is at most a few roundings of that (Reid, J. Inst. Math. Appl. 8, 1971): below 1e-10.
 */
export const MOST_GROWTH = 1e5;

/**
 * An array for the factors of an elimination: its values and inverse pivots, and what generated code works with after them. Constant
 * values, which that code has in its text and does not keep, are filled in.
 */
export function factorsOf({ places, constants, pivots }: Elimination): Float64Array {
  const factors = new Float64Array(places + 3 * pivots.length);
  factors.set(constants);
  pivots.forEach((place, k) => {
    factors[places + k] = constants[place]!;
  });
  return factors;
}

/**
 * The numbers of one elimination: a kernel knows its multiplications and keeps nothing between calls but arrays to work in.
 * `a`: values of the matrix J, places as in its shape. `b`: a right side, `d`: a solution, one number an unknown. `f`: the
 * factors, `Elimination.places` numbers and the inverse of each pivot after them; written by `solve`, read by the others. It is made
 * by `factorsOf`.
 *
 * There are two: a list of operations, and generated code. Both do the same operations in the same order and give the same bytes.
 */
export interface Kernel {
  /**
   * Factorises and solves J·d = −b. The growth that static pivots may let loose is watched: true where for every row all that was
   * subtracted from it is at most MOST_GROWTH times its entry that was the largest on the sample, and where pivots and solution
   * are finite. False says only that the solution wants a test of its own.
   */
  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean;
  /** Solves J·d = −b with the factors at hand. */
  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void;
  /** Solves Jᵀ·d = b with the factors at hand. */
  solveTransposed(b: Float64Array, d: Float64Array, f: Float64Array): void;
}
