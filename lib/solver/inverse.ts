import type { Gap } from "@/lib/circuit/part";
import { UNIT } from "@/lib/devices/rounding";
import type { SparseShape } from "./elimination";
import type { Linear } from "./linear";

/**
 * A dense R ≈ J⁻¹, column by column, with the bounds that the certificate needs of it. It may be the inverse of a neighbour's J: what it
 * leaves of the unit matrix is then larger, and counted. A gap between two unknowns is a row more, the difference of two rows of R: so it
 * may be known far better than the unknowns are.
 */
export class Inverse {
  isKnown = false;
  /** Σ_j |I − R·J|_ij·w_j, the rounding of the product included. One a row, first unknowns, then gaps, as the two below. */
  readonly left: Float64Array;
  /** (|R|·doubt)_i. */
  readonly error: Float64Array;
  /** (|R|·spread)_i. */
  readonly change: Float64Array;
  private readonly size: number;
  /** Unknowns and gaps. */
  private readonly height: number;
  private readonly unit: Float64Array;
  private readonly column: Float64Array;
  private readonly rowsOf: Int32Array;
  private readonly places: Int32Array;
  private readonly starts: Int32Array;
  private readonly sums: Float64Array;
  /** J as it was inverted, and what R leaves of the unit matrix there. */
  private readonly first: Float64Array;
  private readonly atFirst: Float64Array;
  private isWeighed = false;
  private values = new Float64Array(0);

  constructor(
    shape: SparseShape,
    private readonly gaps: readonly Gap[] = [],
  ) {
    const { size, rows, columns } = shape;
    this.size = size;
    this.height = size + gaps.length;
    const vector = () => new Float64Array(this.height);
    this.left = vector();
    this.error = vector();
    this.change = vector();
    this.column = vector();
    this.sums = new Float64Array(size);
    this.atFirst = vector();
    this.first = new Float64Array(rows.length);
    this.unit = new Float64Array(size + 1);
    const entries = Array.from({ length: rows.length - 1 }, (_, k) => k + 1);
    entries.sort((a, b) => columns[a]! - columns[b]! || rows[a]! - rows[b]!);
    this.places = Int32Array.from(entries);
    this.rowsOf = Int32Array.from(entries, (place) => rows[place]!);
    this.starts = new Int32Array(size + 1);
    for (const place of entries) this.starts[columns[place]! + 1]! += 1;
    for (let j = 0; j < size; j++) this.starts[j + 1]! += this.starts[j]!;
  }

  forget(): void {
    this.isKnown = false;
  }

  /** Inverts with the factors of a linear solver's last solution, which belong to `jacobian` or a close neighbour of it. */
  renew(jacobian: Float64Array, linear: Pick<Linear, "solveAgain">): void {
    const { size, height, unit, column, gaps } = this;
    if (this.values.length === 0) this.values = new Float64Array(height * size);
    const { values } = this;
    for (let k = 0; k < size; k++) {
      unit[k] = -1;
      linear.solveAgain(unit, column);
      unit[k] = 0;
      for (let g = 0; g < gaps.length; g++) {
        const [a, b] = gaps[g]!;
        column[size + g] = (a < size ? column[a]! : 0) - (b < size ? column[b]! : 0);
      }
      values.set(column, k * height);
    }
    this.first.set(jacobian);
    this.isKnown = true;
    this.isWeighed = false;
  }

  /** Fills `error` alone. */
  carry(doubt: Float64Array): void {
    const { size, height, values, error } = this;
    error.fill(0);
    for (let k = 0, at = 0; k < size; k++) {
      for (let i = 0; i < height; i++, at++) error[i]! += Math.abs(values[at]!) * doubt[k]!;
    }
  }

  /** To be called where weights have changed since `bound`. */
  reweigh(): void {
    this.isWeighed = false;
  }

  /** Fills `left`, `error` and `change` for the values of J at hand; each row of J may be off by `roundings` of its magnitude. */
  bound(
    jacobian: Float64Array,
    weights: Float64Array,
    roundings: Float64Array,
    doubt: Float64Array,
    spread: Float64Array,
  ): void {
    const { size, height, values, left, atFirst, error, change, sums } = this;
    if (!this.isWeighed) this.weighFirst(weights);
    left.set(atFirst);
    this.addChanged(jacobian, weights);
    error.fill(0);
    change.fill(0);
    for (let k = 0, at = 0; k < size; k++) {
      const byDoubt = doubt[k]!;
      const bySpread = spread[k]! + (roundings[k]! + 4 * size) * UNIT * sums[k]!;
      for (let i = 0; i < height; i++, at++) {
        const entry = Math.abs(values[at]!);
        error[i]! += entry * byDoubt;
        change[i]! += entry * bySpread;
      }
    }
  }

  /** `atFirst`: Σ_j |I − R·J₀|_ij·w_j for the J₀ that R was made from, a column of R·J₀ at a time. */
  private weighFirst(weights: Float64Array): void {
    const { size, height, values, first, atFirst, column, starts, places, rowsOf, gaps } = this;
    atFirst.fill(0);
    for (let j = 0; j < size; j++) {
      column.fill(0);
      for (let s = starts[j]!; s < starts[j + 1]!; s++) {
        const entry = first[places[s]!]!;
        if (entry === 0) continue;
        for (let i = 0, at = rowsOf[s]! * height; i < height; i++, at++) column[i]! += values[at]! * entry;
      }
      column[j]! -= 1;
      for (let g = 0; g < gaps.length; g++) {
        const [a, b] = gaps[g]!;
        column[size + g]! -= (a === j ? 1 : 0) - (b === j ? 1 : 0);
      }
      const weight = weights[j]!;
      for (let i = 0; i < height; i++) atFirst[i]! += Math.abs(column[i]!) * weight;
    }
    this.isWeighed = true;
  }

  /**
   * I − R·J = (I − R·J₀) − R·(J − J₀): most entries of J are constant, and only those of the junctions have changed. Leaves in `sums`
   * Σ_j max(|J|, |J₀|)·w_j of each row, from which the rounding of the products is bounded.
   */
  private addChanged(jacobian: Float64Array, weights: Float64Array): void {
    const { size, height, values, first, left, column, sums, starts, places, rowsOf } = this;
    sums.fill(0);
    for (let j = 0; j < size; j++) {
      const weight = weights[j]!;
      let isChanged = false;
      for (let s = starts[j]!; s < starts[j + 1]!; s++) {
        const place = places[s]!;
        const row = rowsOf[s]!;
        const now = jacobian[place]!;
        const before = first[place]!;
        sums[row]! += (Math.abs(now) + Math.abs(before)) * weight;
        if (now === before) continue;
        const entry = now - before;
        if (!isChanged) column.fill(0);
        isChanged = true;
        for (let i = 0, at = row * height; i < height; i++, at++) column[i]! += values[at]! * entry;
      }
      if (!isChanged) continue;
      for (let i = 0; i < height; i++) left[i]! += Math.abs(column[i]!) * weight;
    }
  }
}
