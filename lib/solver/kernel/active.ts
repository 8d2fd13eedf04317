import type { SparseShape } from "../elimination";
import { Buckets } from "./buckets";

/** An entry of the matrix while pivots are chosen. */
export interface Entry {
  /** Its place in the array of values. */
  readonly place: number;
  value: number;
  /** Sum of the magnitudes that made `value`: below 1e-15 of it, a value is rounding and counts as 0. */
  size: number;
}

const ROUNDING = 1e-15;

/** The part of a matrix that is not yet eliminated, with its rows and columns sorted by their counts of entries. */
export class ActiveMatrix {
  readonly rows: readonly Map<number, Entry>[];
  readonly columns: readonly Set<number>[];
  readonly rowsByCount: Buckets;
  readonly columnsByCount: Buckets;
  /** The largest magnitude that each row had at first. */
  private readonly largest: Float64Array;
  /** Places taken so far; fill-in follows the matrix's own. */
  places: number;

  constructor({ size, rows, columns }: SparseShape, sample: Float64Array) {
    this.rows = Array.from({ length: size }, () => new Map<number, Entry>());
    this.columns = Array.from({ length: size }, () => new Set<number>());
    this.rowsByCount = new Buckets(size);
    this.columnsByCount = new Buckets(size);
    this.largest = new Float64Array(size);
    this.places = rows.length;
    for (let k = 1; k < rows.length; k++) {
      const value = sample[k]!;
      const [row, column] = [rows[k]!, columns[k]!];
      this.rows[row]!.set(column, { place: k, value, size: Math.abs(value) });
      this.columns[column]!.add(row);
      this.largest[row] = Math.max(this.largest[row]!, Math.abs(value));
    }
    for (let i = 0; i < size; i++) {
      this.rowsByCount.put(i, this.rows[i]!.size);
      this.columnsByCount.put(i, this.columns[i]!.size);
    }
  }

  /** The magnitude of an entry with its row scaled to a largest entry of 1; 0 where it is rounding. */
  scaled(row: number, column: number): number {
    const { value, size } = this.rows[row]!.get(column)!;
    const magnitude = Math.abs(value);
    return magnitude > ROUNDING * size ? magnitude / this.largest[row]! : 0;
  }

  /** The largest scaled magnitude in a column. */
  largestIn(column: number): number {
    let largest = 0;
    for (const row of this.columns[column]!) largest = Math.max(largest, this.scaled(row, column));
    return largest;
  }

  /** Takes a pivot's row and column out; gives the pivot, the rest of its row, and the rows below with their entries. */
  remove(row: number, column: number): { pivot: Entry; right: [number, Entry][]; below: [number, Entry][] } {
    const pivotRow = this.rows[row]!;
    const pivot = pivotRow.get(column)!;
    pivotRow.delete(column);
    this.columns[column]!.delete(row);
    const right = [...pivotRow];
    const below = [...this.columns[column]!].map((target): [number, Entry] => [
      target,
      this.rows[target]!.get(column)!,
    ]);
    for (const [other] of right) this.columns[other]!.delete(row);
    for (const [target] of below) this.rows[target]!.delete(column);
    pivotRow.clear();
    this.columns[column]!.clear();
    this.rowsByCount.take(row);
    this.columnsByCount.take(column);
    return { pivot, right, below };
  }

  /** Subtracts `multiplier` times an entry of the pivot row from the entry below it; gives the place that changes. */
  change(row: number, column: number, multiplier: number, by: Entry): number {
    let entry = this.rows[row]!.get(column);
    if (entry === undefined) {
      entry = { place: this.places++, value: 0, size: 0 };
      this.rows[row]!.set(column, entry);
      this.columns[column]!.add(row);
    }
    entry.value -= multiplier * by.value;
    entry.size += Math.abs(multiplier) * by.size;
    return entry.place;
  }

  /** Sorts rows and columns anew by their counts. */
  recount(rows: readonly [number, unknown][], columns: readonly [number, unknown][]): void {
    for (const [row] of rows) this.rowsByCount.put(row, this.rows[row]!.size);
    for (const [column] of columns) this.columnsByCount.put(column, this.columns[column]!.size);
  }
}
