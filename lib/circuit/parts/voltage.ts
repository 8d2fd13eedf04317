import { voltageMismatch } from "@/lib/devices/voltage";
import type { Element } from "@/lib/language/ast";
import { type Bench, moversOf, netAt, type Part } from "../part";
import type { RowWriter } from "../row-writer";
import { across, flow, type State } from "../state";
import type { Table } from "../table";
import type { PointValues } from "../values";

/** Adds the voltages [from, to) of a table: left and right net, number of the current, V. */
export function addVoltages({ numbers, figures }: Table, from: number, to: number, state: State): void {
  const { x, low, residual, scale, share } = state;
  for (let k = from, n = 3 * from; k < to; k++, n += 3) {
    const left = numbers[n]!;
    const right = numbers[n + 1]!;
    const branch = numbers[n + 2]!;
    flow(state, left, right, x[branch]! + low[branch]!);
    const drop = across(state, left, right);
    const volts = figures[k]! * share;
    residual[branch] = voltageMismatch(drop, volts);
    scale[branch] = Math.abs(drop) + Math.abs(volts);
  }
}

/** Writes what the loop does with one row. */
export function writeVoltage(code: RowWriter): void {
  code.flow(0, 1, code.let(code.unknown(2)));
  const drop = code.let(code.across(0, 1));
  const volts = code.let(`${code.figure(0)}*share`);
  code.law(2, `-${drop}-${volts}`, `abs(${drop})+abs(${volts})`);
}

export class VoltagePart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly left: number;
  private readonly right: number;
  /** Number of its current, from left to right, and of its law. */
  private readonly branch: number;
  readonly isPlain = true;
  private readonly places: readonly [number, number, number, number];
  private readonly table: Table;
  private readonly row: number;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.movers = moversOf([element.value!], values);
    const branch = circuit.branches.get(element.name)!;
    this.left = netAt(bench, "left");
    this.right = netAt(bench, "right");
    this.branch = branch;
    this.places = [
      pattern.placeOfOne(this.left, branch),
      pattern.placeOfOne(this.right, branch),
      pattern.placeOfOne(branch, this.left),
      pattern.placeOfOne(branch, this.right),
    ];
    this.table = bench.tables.voltages;
    this.row = bench.tables.voltages.add(this, [this.left, this.right, branch]);
  }

  read(values: PointValues): void {
    this.table.figures[this.row] = values.of(this.element.value!);
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [outOfLeft, outOfRight, byLeft, byRight] = this.places;
    jacobian[outOfLeft]! += 1;
    jacobian[outOfRight]! -= 1;
    jacobian[byLeft]! -= 1;
    jacobian[byRight]! += 1;
  }

  addTo(state: State): void {
    addVoltages(this.table, this.row, this.row + 1, state);
  }

  current(pin: string, state: State): number {
    const i = state.x[this.branch]!;
    return pin === "left" ? i : -i;
  }
}
