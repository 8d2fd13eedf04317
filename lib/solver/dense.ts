import { Matrix, SingularValueDecomposition } from "ml-matrix";
import type { SparseShape } from "./elimination";

/** Unknowns of a dense decomposition at most; beyond it the time would be felt. */
const MOST_UNKNOWNS = 100;

/** An unknown that moves at least this part of what the freest one moves is named with it. */
const NAMED = 0.3;

/**
 * The unknowns that a singular matrix leaves free, the freest first: the largest entries of the right singular vector of its
 * smallest singular value (rows scaled to a largest entry of 1). Empty where the matrix is too large or not finite. The
 * only file that knows ml-matrix, which holds matrices at the edges and not in the inner loop.
 */
export function freeUnknowns(shape: SparseShape, values: Float64Array): number[] {
  const { size, rows, columns } = shape;
  if (size > MOST_UNKNOWNS || !values.every(Number.isFinite)) return [];
  const matrix = Matrix.zeros(size, size);
  for (let k = 1; k < values.length; k++) matrix.set(rows[k]!, columns[k]!, values[k]!);
  for (let i = 0; i < size; i++) {
    const largest = Math.max(...matrix.getRow(i).map(Math.abs));
    if (largest > 0) matrix.mulRow(i, 1 / largest);
  }
  const { rightSingularVectors, diagonal } = new SingularValueDecomposition(matrix, {
    computeLeftSingularVectors: false,
  });
  const smallest = diagonal.indexOf(Math.min(...diagonal));
  const free = rightSingularVectors.getColumn(smallest).map(Math.abs);
  const most = Math.max(...free);
  return free
    .map((by, unknown) => ({ by, unknown }))
    .filter(({ by }) => by >= NAMED * most)
    .sort((a, b) => b.by - a.by || a.unknown - b.unknown)
    .map(({ unknown }) => unknown);
}
