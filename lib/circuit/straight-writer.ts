import type { StraightCode } from "./code/straight";
import type { Frame } from "./frame";
import { GROUND, type RowWriter } from "./row-writer";
import type { Table } from "./table";

/**
 * Rows as straight code over the frame of a system, with the same operations in the same order as the loops over their tables. Of the
 * user's there is nothing in it, not even a number: figures are read from the frame, whose places have the letter z.
 */
export class StraightWriter implements RowWriter {
  private readonly begun = new Set<string>();
  private table: Table | null = null;
  private row = 0;
  private exponent = 0;

  constructor(
    private readonly code: StraightCode,
    private readonly frame: Frame,
  ) {}

  /** Turns to a row, whose exponents begin at number `exponent`. */
  turnTo(table: Table, row: number, exponent: number): void {
    this.table = table;
    this.row = row;
    this.exponent = exponent;
  }

  private number(column: number): number {
    const { numbers, numbersEach } = this.table!;
    return column === GROUND ? this.frame.size : numbers[this.row * numbersEach + column]!;
  }

  private isGround(column: number): boolean {
    return this.number(column) === this.frame.size;
  }

  figure(column: number): string {
    const { start, figuresEach } = this.table!;
    return `z${start + this.row * figuresEach + column}`;
  }

  give(column: number, expression: string): void {
    this.code.set(this.figure(column), expression);
  }

  ask(k: number, expression: string): void {
    this.code.set(`z${this.frame.starts.exponents + this.exponent + k}`, expression);
  }

  less(k: number): string {
    return `z${this.frame.starts.less + this.exponent + k}`;
  }

  whole(k: number): string {
    return `z${this.frame.starts.whole + this.exponent + k}`;
  }

  let(expression: string): string {
    return this.code.let(expression);
  }

  signed(column: number, expression: string): string {
    return this.number(column) < 0 ? `-(${expression})` : `(${expression})`;
  }

  across(a: number, b: number): string {
    if (this.isGround(b)) return this.unknown(a);
    if (this.isGround(a)) return `(0-${this.high(b)}+(0-${this.low(b)}))`;
    return `(${this.high(a)}-${this.high(b)}+(${this.low(a)}-${this.low(b)}))`;
  }

  unknown(column: number): string {
    return `(${this.high(column)}+${this.low(column)})`;
  }

  high(column: number): string {
    return this.isGround(column) ? "0" : `z${this.frame.starts.x + this.number(column)}`;
  }

  private low(column: number): string {
    return this.isGround(column) ? "0" : `z${this.frame.starts.low + this.number(column)}`;
  }

  flow(a: number, b: number, amperes: string): void {
    const size = this.let(`abs(${amperes})`);
    this.leave(a, amperes, size);
    this.sums(b, "-", amperes, size);
  }

  leave(net: number, amperes: string, size: string): void {
    this.sums(net, "+", amperes, size);
  }

  private sums(net: number, operator: "+" | "-", amperes: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    if (this.isGround(net)) return;
    this.sum(`z${residual + this.number(net)}`, "0", operator, amperes);
    this.sum(`z${scale + this.number(net)}`, "", "+", size);
  }

  law(row: number, mismatch: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    const names = [`z${residual + this.number(row)}`, `z${scale + this.number(row)}`] as const;
    this.begun.add(names[0]).add(names[1]);
    this.code.set(names[0], mismatch);
    this.code.set(names[1], size);
  }

  slope(place: number, operator: "+" | "-", expression: string): void {
    const { jacobian, constantSlopes } = this.frame.starts;
    const number = this.number(place);
    if (number !== 0)
      this.sum(`z${jacobian + number}`, `z${constantSlopes + number}`, operator, `(${expression})`);
  }

  private sum(name: string, beginning: string, operator: "+" | "-", by: string): void {
    const before = this.begun.has(name) ? name : beginning;
    this.begun.add(name);
    this.code.set(name, before === "" ? by : `${before}${operator}${by}`);
  }

  /** Rows to which no part adds anything are 0. */
  end(): void {
    const { residual, scale } = this.frame.starts;
    for (let i = 0; i < this.frame.size; i++) {
      for (const name of [`z${residual + i}`, `z${scale + i}`])
        if (!this.begun.has(name)) this.code.set(name, "0");
    }
  }
}
