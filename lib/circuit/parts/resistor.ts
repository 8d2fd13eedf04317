import { conductance } from "@/lib/devices/resistor";
import { UNIT } from "@/lib/devices/rounding";
import type { Element } from "@/lib/language/ast";
import { type Bench, figureOf, type Gap, moversOf, netAt, type Part, type Proof } from "../part";
import type { RowWriter } from "../row-writer";
import { across, type State } from "../state";
import type { Table } from "../table";
import { type PointValues, TEMPERATURE } from "../values";

/** Adds the resistors [from, to) of a table: left and right net, conductance in S. */
export function addResistors({ numbers, figures }: Table, from: number, to: number, state: State): void {
  const { x, low, residual, scale } = state;
  for (let k = from, n = 2 * from; k < to; k++, n += 2) {
    const a = numbers[n]!;
    const b = numbers[n + 1]!;
    const i = figures[k]! * (x[a]! - x[b]! + (low[a]! - low[b]!));
    const size = Math.abs(i);
    residual[a]! += i;
    residual[b]! -= i;
    scale[a]! += size;
    scale[b]! += size;
  }
}

/** Writes what the loop does with one row. */
export function writeResistor(code: RowWriter): void {
  code.flow(0, 1, code.let(`${code.figure(0)}*${code.across(0, 1)}`));
}

export class ResistorPart implements Part, Proof {
  readonly element: Element;
  readonly gaps: readonly Gap[];
  readonly movers: ReadonlySet<string>;
  readonly isPlain = true;
  private readonly left: number;
  private readonly right: number;
  private readonly places: readonly [number, number, number, number];
  private readonly table: Table;
  private readonly row: number;

  constructor(bench: Bench) {
    const { element, pattern, values } = bench;
    this.element = element;
    const all = [element.value!, ...element.params.values()];
    this.movers = moversOf(all, values, ...(element.params.has("drift") ? [TEMPERATURE] : []));
    const left = netAt(bench, "left");
    const right = netAt(bench, "right");
    this.left = left;
    this.right = right;
    this.gaps = [[left, right]];
    this.places = [
      pattern.place(left, left),
      pattern.place(left, right),
      pattern.place(right, left),
      pattern.place(right, right),
    ];
    this.table = bench.tables.resistors;
    this.row = bench.tables.resistors.add(this, [left, right]);
  }

  /** Conductance, S. */
  private get g(): number {
    return this.table.figures[this.row]!;
  }

  read(values: PointValues): void {
    this.table.figures[this.row] = conductance(
      values.of(this.element.value!),
      figureOf(this.element, "drift", values),
      values.kelvin,
    );
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [ll, lr, rl, rr] = this.places;
    const { g } = this;
    jacobian[ll]! += g;
    jacobian[lr]! -= g;
    jacobian[rl]! -= g;
    jacobian[rr]! += g;
  }

  addTo(state: State): void {
    addResistors(this.table, this.row, this.row + 1, state);
  }

  /** A conductance that is or may become negative can cancel others, whose rounding then stays. */
  get proof(): "linear" | Proof {
    return this.g >= 0 && this.movers.size === 0 ? "linear" : this;
  }

  addDoubt(): void {}

  addSpread(_: State, __: number, widths: Float64Array, at: number, spread: Float64Array): void {
    if (this.g >= 0) return;
    const most = -8 * UNIT * this.g * widths[at]!;
    spread[this.left]! += most;
    spread[this.right]! += most;
  }

  current(pin: string, state: State): number {
    const i = this.g * across(state, this.left, this.right);
    return pin === "left" ? i : -i;
  }
}
