/**
 * Where the Jacobian has entries. Each distinct (row, column) has a place in one array of values; place 0 takes what is stamped
 * into the row or column of ground and is never read.
 */
export class Pattern {
  private readonly places = new Map<number, number>();
  readonly rows: number[] = [-1];
  readonly columns: number[] = [-1];

  /** `size` unknowns; ground has the number `size`. */
  constructor(readonly size: number) {}

  place(row: number, column: number): number {
    if (row === this.size || column === this.size) return 0;
    const key = row * this.size + column;
    const known = this.places.get(key);
    if (known !== undefined) return known;
    const place = this.rows.push(row) - 1;
    this.columns.push(column);
    this.places.set(key, place);
    return place;
  }
}
