import { UNIT } from "@/lib/devices/rounding";
import type { SparseShape } from "./elimination";
import type { Factors } from "./linear";

/**
 * Bounds by the sparse factors themselves, at a cost that grows with their entries: |(L·U)⁻¹|·v ≤ M(U)⁻¹·M(L)⁻¹·v, where M turns the signs of what
 * stands beside the diagonal so that nothing cancels (Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., 2002, section 8.3).
 * For nets with resistors and junctions alone there is nothing to cancel and the bound is tight; around amplifiers it may be wide.
 */
export class TriangularBounds {
  /** None: what the factors leave of J is counted in `change`. */
  readonly left: Float64Array;
  /** |(L·U)⁻¹|·doubt. */
  readonly error: Float64Array;
  /** |(L·U)⁻¹|·(|L·U − J|·w, spread and the rounding of J). */
  readonly change: Float64Array;
  private factors: Factors | null = null;
  private readonly work: Float64Array;
  private readonly sums: Float64Array;
  private readonly row: Float64Array;

  private readonly rows: Int32Array;
  private readonly columns: Int32Array;

  constructor({ size, rows, columns }: SparseShape) {
    this.rows = Int32Array.from(rows);
    this.columns = Int32Array.from(columns);
    const vector = () => new Float64Array(size);
    this.left = vector();
    this.error = vector();
    this.change = vector();
    this.work = vector();
    this.sums = vector();
    this.row = vector();
  }

  /** Takes the factors of the Jacobian that is to be judged. */
  use(factors: Factors): void {
    this.factors = factors;
  }

  carry(doubt: Float64Array): void {
    this.apply(doubt, this.error);
  }

  /** Nothing is kept from weights to weights. */
  reweigh(): void {}

  bound(
    jacobian: Float64Array,
    weights: Float64Array,
    roundings: Float64Array,
    doubt: Float64Array,
    spread: Float64Array,
  ): void {
    const { sums, row, rows, columns } = this;
    this.apply(doubt, this.error);
    this.residue(weights, row);
    sums.fill(0);
    for (let k = 1; k < jacobian.length; k++) {
      sums[rows[k]!]! += Math.abs(jacobian[k]!) * weights[columns[k]!]!;
    }
    for (let i = 0; i < row.length; i++) row[i]! += spread[i]! + roundings[i]! * UNIT * sums[i]!;
    this.apply(row, this.change);
  }

  /** `into` = M(U)⁻¹·M(L)⁻¹·`right` for a right side without negative entries. */
  private apply(right: Float64Array, into: Float64Array): void {
    const { work } = this;
    const { plan, values } = this.factors!;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, places } = plan;
    const { belowStarts, belowPlaces, belowRows } = plan;
    const size = work.length;
    for (let i = 0; i < size; i++) work[i] = right[i]!;
    for (let k = 0; k < size; k++) {
      const known = work[rowOf[k]!]!;
      const end = belowStarts[k + 1]!;
      for (let s = belowStarts[k]!; s < end; s++)
        work[belowRows[s]!]! += Math.abs(values[belowPlaces[s]!]!) * known;
    }
    for (let k = size - 1; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      const end = rowStarts[k + 1]!;
      for (let s = rowStarts[k]!; s < end; s++)
        sum += Math.abs(values[rowPlaces[s]!]!) * into[rowColumns[s]!]!;
      into[columnOf[k]!] = sum * Math.abs(values[places + k]!);
    }
  }

  /**
   * `into` ≥ |L·U − J|·w: every entry of L·U is a sum of at most as many products as its row has steps before it, each rounded twice,
   * so that what it misses J by is at most (steps + 2) roundings of |L|·|U| (Higham, theorem 9.3, with the inverse pivots' own).
   */
  private residue(weights: Float64Array, into: Float64Array): void {
    const { work } = this;
    const { plan, values } = this.factors!;
    const { rowOf, columnOf, places, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } =
      plan;
    const size = work.length;
    into.fill(0);
    work.fill(4);
    for (let k = 0; k < size; k++) {
      const row = rowOf[k]!;
      let sum = weights[columnOf[k]!]! / Math.abs(values[places + k]!);
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        sum += Math.abs(values[rowPlaces[s]!]!) * weights[rowColumns[s]!]!;
      }
      into[row] = (into[row]! + sum) * work[row]! * UNIT;
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        into[belowRows[s]!]! += Math.abs(values[belowPlaces[s]!]!) * sum;
        work[belowRows[s]!]! += 2;
      }
    }
  }
}
