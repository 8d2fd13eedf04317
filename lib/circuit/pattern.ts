/**
 * Where the Jacobian has entries. Each distinct (row, column) has a place in one array of values; place 0 takes what is stamped
 * into the row or column of ground and is never read.
 */
export class Pattern {
  private readonly places = new Map<number, number>();
  /** How often each place was asked for, and the places that one part fills with +1 or −1 for good. */
  private readonly uses: number[] = [0];
  private readonly ones = new Set<number>();
  readonly rows: number[] = [-1];
  readonly columns: number[] = [-1];

  /** `size` unknowns; ground has the number `size`. */
  constructor(readonly size: number) {}

  place(row: number, column: number): number {
    if (row === this.size || column === this.size) return 0;
    const key = row * this.size + column;
    const known = this.places.get(key);
    if (known !== undefined) {
      this.uses[known]! += 1;
      return known;
    }
    const place = this.rows.push(row) - 1;
    this.uses.push(1);
    this.columns.push(column);
    this.places.set(key, place);
    return place;
  }

  /** A place in which the part that asks for it always puts +1 or −1, as branch currents do. */
  placeOfOne(row: number, column: number): number {
    const place = this.place(row, column);
    this.ones.add(place);
    return place;
  }

  /** 1 at each place that holds +1 or −1 at every point: asked for as such, and by one part only. */
  get units(): Uint8Array {
    return Uint8Array.from(this.uses, (uses, place) => (uses === 1 && this.ones.has(place) ? 1 : 0));
  }
}
