import { gainMismatch } from "@/lib/devices/gain";
import type { Element } from "@/lib/language/ast";
import { type Bench, figureOf, moversOf, netAt, type Part } from "../part";
import { GROUND, type RowWriter } from "../row-writer";
import { across, flow, type State } from "../state";
import type { Table } from "../table";
import type { PointValues } from "../values";

/** Adds the gains [from, to) of a table: plus, minus and output net, number of the output's current, ratio. */
export function addGains({ numbers, figures }: Table, from: number, to: number, state: State): void {
  const { x, low, residual, scale } = state;
  const ground = x.length - 1;
  for (let k = from, n = 4 * from; k < to; k++, n += 4) {
    const out = numbers[n + 2]!;
    const branch = numbers[n + 3]!;
    flow(state, out, ground, x[branch]! + low[branch]!);
    const vout = across(state, out, ground);
    const difference = across(state, numbers[n]!, numbers[n + 1]!);
    residual[branch] = gainMismatch(vout, difference, figures[k]!);
    scale[branch] = Math.abs(vout) + Math.abs(figures[k]! * difference);
  }
}

/** Writes what the loop does with one row. */
export function writeGain(code: RowWriter): void {
  code.flow(2, GROUND, code.let(code.unknown(3)));
  const vout = code.let(code.across(2, GROUND));
  const asked = code.let(`${code.figure(0)}*${code.across(0, 1)}`);
  code.law(3, `${vout}-${asked}`, `abs(${vout})+abs(${asked})`);
}

export class GainPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly plus: number;
  private readonly minus: number;
  private readonly out: number;
  /** Number of the current into its output, and of its law. */
  private readonly branch: number;
  private readonly places: readonly [number, number, number, number];
  readonly isPlain = true;
  private readonly table: Table;
  private readonly row: number;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.movers = moversOf(element.params.values(), values);
    const branch = circuit.branches.get(element.name)!;
    this.plus = netAt(bench, "plus");
    this.minus = netAt(bench, "minus");
    this.out = netAt(bench, "out");
    this.branch = branch;
    this.places = [
      pattern.place(this.out, branch),
      pattern.place(branch, this.out),
      pattern.place(branch, this.plus),
      pattern.place(branch, this.minus),
    ];
    this.table = bench.tables.gains;
    this.row = bench.tables.gains.add(this, [this.plus, this.minus, this.out, branch]);
  }

  read(values: PointValues): void {
    this.table.figures[this.row] = figureOf(this.element, "ratio", values)!;
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [intoOut, byOut, byPlus, byMinus] = this.places;
    jacobian[intoOut]! += 1;
    jacobian[byOut]! += 1;
    jacobian[byPlus]! -= this.table.figures[this.row]!;
    jacobian[byMinus]! += this.table.figures[this.row]!;
  }

  addTo(state: State): void {
    addGains(this.table, this.row, this.row + 1, state);
  }

  current(pin: string, state: State): number {
    return pin === "out" ? state.x[this.branch]! : 0;
  }
}
