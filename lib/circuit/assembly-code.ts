import type { StraightCode } from "./code/straight";
import type { Frame } from "./frame";
import type { Table } from "./table";

/**
 * The assembly of a system, all junctions linearised at their actual voltages, as straight code over its frame. Parts write themselves into
 * it, first what they ask of the exponentials, then the rest, with the same operations in the same order as the loops over their tables.
 * Of the user's there is nothing in it, not even a number: figures are read from the frame, whose places have the letter z.
 */
export class AssemblyCode {
  private readonly begun = new Set<string>();

  constructor(
    readonly code: StraightCode,
    private readonly frame: Frame,
  ) {}

  /** A figure of a row of a table. */
  figure({ start, figuresEach }: Table, row: number, column: number): string {
    return `z${start + row * figuresEach + column}`;
  }

  /** Asks for the exponentials of an expression as number k. */
  ask(k: number, expression: string): void {
    this.code.set(`z${this.frame.starts.exponents + k}`, expression);
  }

  /** e^y − 1 and e^y of exponent k. */
  exponentials(k: number): { less: string; whole: string } {
    const { less, whole } = this.frame.starts;
    return { less: `z${less + k}`, whole: `z${whole + k}` };
  }

  /** The exponent of the first transistor; that of diode k is k. */
  get firstTransistor(): number {
    return this.frame.tables.diodes.count;
  }

  let(expression: string): string {
    return this.code.let(expression);
  }

  set(name: string, expression: string): void {
    this.code.set(name, expression);
  }

  /** As `across` of a state. */
  across(a: number, b: number): string {
    const { x, low } = this.frame.starts;
    const { size } = this.frame;
    if (b === size) return `(z${x + a}+z${low + a})`;
    if (a === size) return `(0-z${x + b}+(0-z${low + b}))`;
    return `(z${x + a}-z${x + b}+(z${low + a}-z${low + b}))`;
  }

  /** The two parts of an unknown, for a branch current. */
  unknown(i: number): string {
    return `(${this.high(i)}+z${this.frame.starts.low + i})`;
  }

  high(i: number): string {
    return i === this.frame.size ? "0" : `z${this.frame.starts.x + i}`;
  }

  /** As `flow` of a state; `amperes` is a variable. */
  flow(a: number, b: number, amperes: string): void {
    const size = this.let(`abs(${amperes})`);
    this.leave(a, "+", amperes, size);
    this.leave(b, "-", amperes, size);
  }

  /** A current out of a net alone, with its magnitude or more. */
  leave(net: number, operator: "+" | "-", amperes: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    if (net === this.frame.size) return;
    this.sum(`z${residual + net}`, "0", operator, amperes);
    this.sum(`z${scale + net}`, "", "+", size);
  }

  /** The mismatch of a branch law, and the magnitudes that it sums. */
  law(row: number, mismatch: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    this.begun.add(`z${residual + row}`).add(`z${scale + row}`);
    this.code.set(`z${residual + row}`, mismatch);
    this.code.set(`z${scale + row}`, size);
  }

  /** Adds to the Jacobian. */
  slope(place: number, operator: "+" | "-", expression: string): void {
    const { jacobian, constantSlopes } = this.frame.starts;
    if (place !== 0) this.sum(`z${jacobian + place}`, `z${constantSlopes + place}`, operator, expression);
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
