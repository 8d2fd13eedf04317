/**
 * Numbers and figures of the parts of one kind, a row a part, in arrays that a loop walks through without touching a part. `numbers`:
 * unknowns and places, fixed. `figures`: what a part reads at a point, and what its law gave there.
 */
export class Table<Owner = unknown> {
  readonly owners: Owner[] = [];
  numbers: Int32Array = new Int32Array(0);
  figures: Float64Array = new Float64Array(0);
  /** Where the figures begin in the frame of the system. */
  start = 0;
  private readonly gathered: number[] = [];

  constructor(
    readonly numbersEach: number,
    readonly figuresEach: number,
  ) {}

  get count(): number {
    return this.owners.length;
  }

  /** Takes a row; gives its number. */
  add(owner: Owner, numbers: readonly number[]): number {
    for (const number of numbers) this.gathered.push(number);
    return this.owners.push(owner) - 1;
  }

  get length(): number {
    return this.count * this.figuresEach;
  }

  /** Once all rows are taken, and whenever the frame has moved: `figures` is the part of it that begins at `start`. */
  layOut(figures: Float64Array, start: number): void {
    this.start = start;
    if (this.numbers.length === 0) this.numbers = Int32Array.from(this.gathered);
    this.figures = figures;
  }
}
