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
  /** Magnitudes of the factors in the order of the substitutions: above the pivots, below them, and of the inverse pivots. */
  private above = new Float64Array(0);
  private below = new Float64Array(0);
  private inverses = new Float64Array(0);
  /** `error` is that of the factors and the doubt at hand. */
  private isCarried = false;
  private isPrepared = false;
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
    if (this.factors?.plan !== factors.plan) {
      this.above = new Float64Array(factors.plan.rowPlaces.length);
      this.below = new Float64Array(factors.plan.belowPlaces.length);
      this.inverses = new Float64Array(this.work.length);
    }
    this.factors = factors;
    this.isCarried = false;
    this.isPrepared = false;
  }

  /** Gathers the magnitudes of the factors, where they are needed. */
  private prepare(): void {
    if (this.isPrepared) return;
    this.isPrepared = true;
    const { above, below, inverses } = this;
    const { plan, values } = this.factors!;
    const { rowPlaces, belowPlaces, places } = plan;
    for (let s = 0; s < above.length; s++) above[s] = Math.abs(values[rowPlaces[s]!]!);
    for (let s = 0; s < below.length; s++) below[s] = Math.abs(values[belowPlaces[s]!]!);
    for (let k = 0; k < inverses.length; k++) inverses[k] = Math.abs(values[places + k]!);
  }

  carry(doubt: Float64Array): void {
    this.prepare();
    this.apply(doubt, this.error);
    this.isCarried = true;
  }

  /** Nothing is kept from weights to weights. */
  reweigh(): void {}

  /** With the doubt that was carried last, or where none was, the one given. */
  bound(
    jacobian: Float64Array,
    weights: Float64Array,
    roundings: Float64Array,
    doubt: Float64Array,
    spread: Float64Array,
  ): void {
    const { sums, row, rows, columns } = this;
    const generated = this.factors!.generated;
    if (generated?.bound(weights, roundings, doubt, spread, this.error, this.change) === true) return;
    this.prepare();
    if (!this.isCarried) this.carry(doubt);
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
    const { work, above, below, inverses } = this;
    const { rowOf, columnOf, rowStarts, rowColumns, belowStarts, belowRows } = this.factors!.plan;
    const size = work.length;
    for (let i = 0; i < size; i++) work[i] = right[i]!;
    let s = 0;
    for (let k = 0; k < size; k++) {
      const known = work[rowOf[k]!]!;
      for (const end = belowStarts[k + 1]!; s < end; s++) work[belowRows[s]!]! += below[s]! * known;
    }
    for (let k = size - 1, end = above.length; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      const start = rowStarts[k]!;
      for (let a = start; a < end; a++) sum += above[a]! * into[rowColumns[a]!]!;
      end = start;
      into[columnOf[k]!] = sum * inverses[k]!;
    }
  }

  /**
   * `into` ≥ |L·U − J|·w: every entry of L·U is a sum of at most as many products as its row has steps before it, each rounded twice,
   * so that what it misses J by is at most (steps + 2) roundings of |L|·|U| (Higham, theorem 9.3, with the inverse pivots' own).
   */
  private residue(weights: Float64Array, into: Float64Array): void {
    const { work, above, below, inverses } = this;
    const { rowOf, columnOf, rowStarts, rowColumns, belowStarts, belowRows } = this.factors!.plan;
    const size = work.length;
    into.fill(0);
    work.fill(4);
    let a = 0;
    let b = 0;
    for (let k = 0; k < size; k++) {
      const row = rowOf[k]!;
      let sum = weights[columnOf[k]!]! / inverses[k]!;
      for (const end = rowStarts[k + 1]!; a < end; a++) sum += above[a]! * weights[rowColumns[a]!]!;
      into[row] = (into[row]! + sum) * work[row]! * UNIT;
      for (const end = belowStarts[k + 1]!; b < end; b++) {
        into[belowRows[b]!]! += below[b]! * sum;
        work[belowRows[b]!]! += 2;
      }
    }
  }
}
