import type { Frame } from "../frame";
import { GROUND, type RowWriter } from "../row-writer";
import type { Table } from "../table";
import { bytesOf, variablesOf } from "./expression";
import {
  COPY,
  EMPTY,
  FILL,
  type FunctionBody,
  get,
  INTEGER,
  integer,
  type Kind,
  load,
  loadInteger,
  NUMBER,
  OPCODE,
  set,
  store,
  unsigned,
} from "./module";

const SHARE = 0;

/**
 * Rows as loops over the tables in the memory, for systems too large for straight code: the same operations in the same order as the
 * loops over tables, without a test of a place. A loop walks with three addresses, of the row's numbers, figures and exponents.
 */
export class LoopWriter implements RowWriter {
  private bytes: number[] = [];
  private readonly kinds: Kind[] = [];
  private readonly numbersAt = this.variable(INTEGER);
  private readonly figuresAt = this.variable(INTEGER);
  private readonly exponentsAt = this.variable(INTEGER);
  /** Variables of the present row: columns of numbers, in bytes of a number of the frame, and what is read or worked out. */
  private columns = new Map<number, number>();
  private names = new Map<string, number>();
  private table: Table | null = null;
  private exponent = 0;
  private integers = 0;
  private locals = 0;

  constructor(private readonly frame: Frame) {}

  private variable(kind: Kind): number {
    return this.kinds.push(kind);
  }

  /**
   * Writes a loop over all rows. `exponent` and `exponentsEach`: of the row's exponents; `integers`: the byte at which the table's
   * numbers begin, four bytes each, eight times the number they stand for.
   */
  over(
    table: Table,
    exponent: number,
    exponentsEach: number,
    integers: number,
    write: (row: RowWriter) => void,
  ): void {
    if (table.count === 0) return;
    this.table = table;
    this.exponent = exponent;
    this.integers = integers;
    this.columns = new Map();
    this.names = new Map();
    const before = this.bytes;
    this.bytes = [];
    write(this);
    const { numbersAt, figuresAt, exponentsAt } = this;
    const start = (address: number) => [...integer(0), ...set(address)];
    const step = (address: number, by: number) => [
      ...get(address),
      ...integer(by),
      OPCODE.integerAdd,
      ...set(address),
    ];
    const length = 4 * table.numbersEach * table.count;
    const body = this.bytes;
    this.bytes = before;
    this.push(start(numbersAt), start(figuresAt), start(exponentsAt), [OPCODE.loop, EMPTY]);
    this.push(body);
    this.push(step(numbersAt, 4 * table.numbersEach), step(figuresAt, 8 * table.figuresEach));
    this.push(step(exponentsAt, 8 * exponentsEach));
    this.push(get(numbersAt), integer(length), [OPCODE.integerLess, OPCODE.branchIf, 0, OPCODE.end]);
  }

  /** Residual and scale 0, and the Jacobian as its constant slopes. */
  clear(): void {
    const { starts, size, constantSlopes } = this.frame;
    const fill = (start: number, count: number) => [
      ...integer(8 * start),
      ...integer(0),
      ...integer(8 * count),
      ...FILL,
    ];
    this.push(fill(starts.residual, size + 1), fill(starts.scale, size + 1));
    this.push(integer(8 * starts.jacobian), integer(8 * starts.constantSlopes));
    this.push(integer(8 * constantSlopes.length), COPY);
  }

  /** Calls another function of the module. */
  call(number: number): void {
    this.push(get(SHARE), [OPCODE.call, ...unsigned(number), OPCODE.drop]);
  }

  /** All that was written as a function that gives 1. */
  compile(name: string): FunctionBody {
    return { name, bytes: [...this.bytes, ...integer(1)], variables: this.kinds };
  }

  private push(...parts: readonly (readonly number[])[]): void {
    for (const part of parts) for (const byte of part) this.bytes.push(byte);
  }

  /** The variable of a column of numbers. */
  private column(column: number): number {
    let variable = this.columns.get(column);
    if (variable === undefined) {
      variable = this.variable(INTEGER);
      this.columns.set(column, variable);
      this.push(get(this.numbersAt), loadInteger(this.integers + 4 * column), set(variable));
    }
    return variable;
  }

  /** The variable of a name: `g` and a column for a figure, `x` and `l` for the parts of an unknown, `e` and `w` for exponentials. */
  private read(name: string): number {
    const known = this.names.get(name);
    if (known !== undefined) return known;
    const variable = this.variable(NUMBER);
    const at = Number(name.slice(1));
    const { starts } = this.frame;
    const exponent = this.exponent + at;
    if (name[0] === "g") this.push(get(this.figuresAt), load(8 * (this.table!.start + at)));
    else if (name[0] === "x") this.push(get(this.column(at)), load(8 * starts.x));
    else if (name[0] === "l") this.push(get(this.column(at)), load(8 * starts.low));
    else if (name[0] === "e") this.push(get(this.exponentsAt), load(8 * (starts.less + exponent)));
    else this.push(get(this.exponentsAt), load(8 * (starts.whole + exponent)));
    this.push(set(variable));
    this.names.set(name, variable);
    return variable;
  }

  private value(expression: string): number[] {
    for (const name of variablesOf(expression)) this.read(name);
    return bytesOf(expression, (name) => (name === "share" ? SHARE : this.names.get(name)!));
  }

  figure(column: number): string {
    return `g${column}`;
  }

  give(column: number, expression: string): void {
    const value = this.value(expression);
    const variable = this.names.get(`g${column}`) ?? this.variable(NUMBER);
    this.names.set(`g${column}`, variable);
    this.push(value, set(variable), get(this.figuresAt), get(variable));
    this.push(store(8 * (this.table!.start + column)));
  }

  ask(k: number, expression: string): void {
    const value = this.value(expression);
    this.push(get(this.exponentsAt), value, store(8 * (this.frame.starts.exponents + this.exponent + k)));
  }

  less(k: number): string {
    return `e${k}`;
  }

  whole(k: number): string {
    return `w${k}`;
  }

  let(expression: string): string {
    const value = this.value(expression);
    const name = `t${this.locals++}`;
    const variable = this.variable(NUMBER);
    this.names.set(name, variable);
    this.push(value, set(variable));
    return name;
  }

  signed(column: number, expression: string): string {
    const name = this.let(expression);
    const variable = this.names.get(name)!;
    this.push(get(this.column(column)), integer(0), [OPCODE.integerLessSigned, OPCODE.if, EMPTY]);
    this.push(get(variable), [OPCODE.negate], set(variable), [OPCODE.end]);
    return name;
  }

  across(a: number, b: number): string {
    if (b === GROUND) return this.unknown(a);
    return `(x${a}-x${b}+(l${a}-l${b}))`;
  }

  unknown(column: number): string {
    return `(x${column}+l${column})`;
  }

  high(column: number): string {
    return `x${column}`;
  }

  flow(a: number, b: number, amperes: string): void {
    const size = this.let(`abs(${amperes})`);
    this.leave(a, amperes, size);
    if (b !== GROUND) this.sums(b, OPCODE.subtract, amperes, size);
  }

  leave(net: number, amperes: string, size: string): void {
    this.sums(net, OPCODE.add, amperes, size);
  }

  /** Sums that all go into the numbers of ground would have to wait for each other. */
  private sums(net: number, operation: number, amperes: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    const [by, sizeBy] = [this.read(amperes), this.read(size)];
    const at = this.column(net);
    this.push(get(at), integer(8 * this.frame.size), [OPCODE.integerNotEqual, OPCODE.if, EMPTY]);
    this.push(get(at), get(at), load(8 * residual), get(by), [operation], store(8 * residual));
    this.push(get(at), get(at), load(8 * scale), get(sizeBy), [OPCODE.add], store(8 * scale));
    this.push([OPCODE.end]);
  }

  law(row: number, mismatch: string, size: string): void {
    const { residual, scale } = this.frame.starts;
    const [left, sizes] = [this.value(mismatch), this.value(size)];
    const at = this.column(row);
    this.push(get(at), left, store(8 * residual), get(at), sizes, store(8 * scale));
  }

  slope(place: number, operator: "+" | "-", expression: string): void {
    const value = this.value(expression);
    const at = this.column(place);
    const start = 8 * this.frame.starts.jacobian;
    this.push(get(at), [OPCODE.if, EMPTY], get(at), get(at), load(start), value);
    this.push([operator === "+" ? OPCODE.add : OPCODE.subtract], store(start), [OPCODE.end]);
  }
}
