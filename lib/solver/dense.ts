import { LuDecomposition, Matrix, SingularValueDecomposition } from "ml-matrix";
import type { SparseShape } from "./elimination";

/** Unknowns of a dense decomposition at most; beyond it the time would be felt. */
const MOST_UNKNOWNS = 100;

/** An unknown that moves at least this part of what the freest one moves is named with it. */
const NAMED = 0.3;

/**
 * The unknowns that a singular matrix leaves free, the freest first: the largest entries of the right singular vector of its
 * smallest singular value (rows scaled to a largest entry of 1). Empty where the matrix is too large or not finite.
 */
export function freeUnknowns(shape: SparseShape, values: Float64Array): number[] {
  const scaled = scaledMatrix(shape, values);
  if (scaled === null) return [];
  const { rightSingularVectors, diagonal } = new SingularValueDecomposition(scaled.matrix, {
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

/**
 * Dense factors with row interchanges, for a matrix whose sparse pivots all lose too many digits. This file alone knows ml-matrix,
 * which holds matrices at the edges and not in the inner loop.
 */
export class DenseFactors {
  private constructor(
    private readonly factors: LuDecomposition,
    private readonly transposed: LuDecomposition,
    private readonly scales: readonly number[],
  ) {}

  /** Null where the matrix is singular, not finite or too large. */
  static of(shape: SparseShape, values: Float64Array): DenseFactors | null {
    const scaled = scaledMatrix(shape, values);
    if (scaled === null) return null;
    const factors = new LuDecomposition(scaled.matrix);
    if (factors.isSingular()) return null;
    return new DenseFactors(factors, new LuDecomposition(scaled.matrix.transpose()), scaled.scales);
  }

  /** Solves J·d = −b. */
  solve(b: Float64Array, d: Float64Array): void {
    const right = Matrix.columnVector(this.scales.map((scale, i) => -scale * b[i]!));
    d.set(this.factors.solve(right).getColumn(0));
  }

  /** Solves Jᵀ·d = b. */
  solveTransposed(b: Float64Array, d: Float64Array): void {
    const solution = this.transposed.solve(Matrix.columnVector([...b.subarray(0, this.scales.length)]));
    this.scales.forEach((scale, i) => {
      d[i] = scale * solution.get(i, 0);
    });
  }
}

/** The matrix with each row scaled to a largest entry of 1, and the factor of each row. Null where too large or not finite. */
function scaledMatrix(
  { size, rows, columns }: SparseShape,
  values: Float64Array,
): { matrix: Matrix; scales: readonly number[] } | null {
  if (size > MOST_UNKNOWNS || !values.every(Number.isFinite)) return null;
  const matrix = Matrix.zeros(size, size);
  for (let k = 1; k < values.length; k++) matrix.set(rows[k]!, columns[k]!, values[k]!);
  const scales = Array.from({ length: size }, (_, i) => {
    const largest = Math.max(...matrix.getRow(i).map(Math.abs));
    return largest > 0 ? 1 / largest : 1;
  });
  for (let i = 0; i < size; i++) matrix.mulRow(i, scales[i]!);
  return { matrix, scales };
}
