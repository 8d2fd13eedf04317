import { EigenvalueDecomposition, LuDecomposition, Matrix, SingularValueDecomposition } from "ml-matrix";
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
 * Dense factors with row interchanges, for a matrix whose sparse pivots all lose too many digits. The package ml-matrix holds matrices
 * at the edges: here, for what a singular matrix leaves free, for stability, and for line fits. The first pivots of a structure
 * are not chosen by it but by Markowitz's count on a sample (`eliminate`), with a test of each pivot: a dense LU says neither which
 * entries stay empty nor in which order the fewest fill in, and its cost grows with the cube of the unknowns.
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

/** What a matrix J says of the solution at which it was taken; null where it is singular, not finite or too large. */
export interface Index {
  /** Sign of det J. */
  readonly sign: 1 | -1;
  /** Whether every mode of D·dx/dt = −F decays: every eigenvalue of J⁻¹·D but those of rounding has a positive real part. */
  readonly isStable: boolean;
}

/** An eigenvalue of J⁻¹·D below this part of the largest is one of the 0 that algebraic rows give. */
const ALGEBRAIC = 1e-9;

/** `masses` are the entries of D, as row, column and value. */
export function indexOf(
  shape: SparseShape,
  values: Float64Array,
  masses: readonly { readonly row: number; readonly column: number; readonly mass: number }[],
): Index | null {
  const scaled = scaledMatrix(shape, values);
  if (scaled === null) return null;
  const factors = new LuDecomposition(scaled.matrix);
  if (factors.isSingular()) return null;
  // The determinant itself may leave the range of a number; its sign is that of the pivots and of their permutation.
  const upper = factors.upperTriangularMatrix;
  let sign: 1 | -1 = permutationSign(factors.pivotPermutationVector);
  for (let i = 0; i < shape.size; i++) if (upper.get(i, i) < 0) sign = sign === 1 ? -1 : 1;
  const mass = Matrix.zeros(shape.size, shape.size);
  for (const { row, column, mass: one } of masses) mass.set(row, column, one * scaled.scales[row]!);
  return { sign, isStable: decays(factors.solve(mass).to2DArray()) };
}

/** Whether every eigenvalue of a matrix J⁻¹·D, but those of rounding, has a positive real part. */
export function decays(matrix: number[][]): boolean {
  if (matrix.length === 0) return true;
  const { realEigenvalues } = new EigenvalueDecomposition(new Matrix(matrix));
  const largest = Math.max(...realEigenvalues.map(Math.abs));
  return realEigenvalues.every((real) => real >= -ALGEBRAIC * largest);
}

/** −1 to the count of its cycles of even length. */
function permutationSign(permutation: readonly number[]): 1 | -1 {
  let sign: 1 | -1 = 1;
  const seen = new Set<number>();
  for (const start of permutation.keys()) {
    let length = 0;
    for (let at = start; !seen.has(at); at = permutation[at]!) {
      seen.add(at);
      length += 1;
    }
    if (length > 0 && length % 2 === 0) sign = sign === 1 ? -1 : 1;
  }
  return sign;
}
