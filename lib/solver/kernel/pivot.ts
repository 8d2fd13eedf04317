import type { ActiveMatrix } from "./active";

/** A pivot must reach this part of its column, rows being scaled to a largest entry of 1. */
const THRESHOLD = 0.1;

/** Rows and columns that are looked through before the best pivot found is taken (Zlatev, SIAM J. Numer. Anal. 17, 1980). */
const LOOKED_THROUGH = 20;

export interface PivotAt {
  readonly row: number;
  readonly column: number;
}

/**
 * Looks for the pivot of least Markowitz count (rows − 1)·(columns − 1) among those that pass a threshold test in their column,
 * through columns and rows by rising count of entries until none to come can be better (Duff, Erisman and Reid, Direct Methods
 * for Sparse Matrices, 1986, from memory). A pivot alone in its row changes no other entry and needs no test.
 */
export class PivotSearch {
  private row = -1;
  private column = -1;
  private cost = Number.POSITIVE_INFINITY;
  private size = 0;

  constructor(private readonly matrix: ActiveMatrix) {}

  /** The next pivot; null where what is left is empty in a row or a column, or is rounding only: the matrix is singular. */
  find(): PivotAt | null {
    const { rowsByCount, columnsByCount, rows } = this.matrix;
    this.cost = Number.POSITIVE_INFINITY;
    this.size = 0;
    if (rowsByCount.first(0) !== -1 || columnsByCount.first(0) !== -1) return null;
    let looked = 0;
    for (let count = 1; count <= rows.length; count++) {
      for (let column = columnsByCount.first(count); column !== -1; column = columnsByCount.next(column)) {
        this.lookThroughColumn(column);
        if (this.isDone((count - 1) ** 2, ++looked)) return this.at();
      }
      for (let row = rowsByCount.first(count); row !== -1; row = rowsByCount.next(row)) {
        this.lookThroughRow(row);
        if (this.isDone(count * (count - 1), ++looked)) return this.at();
      }
    }
    return this.cost === Number.POSITIVE_INFINITY ? null : this.at();
  }

  private isDone(leastCost: number, looked: number): boolean {
    return this.cost <= leastCost || (looked >= LOOKED_THROUGH && this.cost < Number.POSITIVE_INFINITY);
  }

  private at(): PivotAt {
    return { row: this.row, column: this.column };
  }

  private lookThroughColumn(column: number): void {
    const { matrix } = this;
    const rows = matrix.columns[column]!;
    const largest = matrix.largestIn(column);
    for (const row of rows) {
      const size = matrix.scaled(row, column);
      const others = matrix.rows[row]!.size - 1;
      if (size >= THRESHOLD * largest) this.offer(row, column, others * (rows.size - 1), size);
    }
  }

  private lookThroughRow(row: number): void {
    const { matrix } = this;
    const columns = matrix.rows[row]!;
    for (const column of columns.keys()) {
      const cost = (columns.size - 1) * (matrix.columns[column]!.size - 1);
      if (cost > this.cost) continue;
      const size = matrix.scaled(row, column);
      if (size >= THRESHOLD * matrix.largestIn(column)) {
        this.offer(row, column, cost, size);
      }
    }
  }

  private offer(row: number, column: number, cost: number, size: number): void {
    if (!(size > 0) || cost > this.cost || (cost === this.cost && size <= this.size)) return;
    this.row = row;
    this.column = column;
    this.cost = cost;
    this.size = size;
  }
}
