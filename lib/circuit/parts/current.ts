import { drivenCurrent } from "@/lib/devices/current";
import type { Element } from "@/lib/language/ast";
import { type Bench, moversOf, netAt, type Part } from "../part";
import type { RowWriter } from "../row-writer";
import { flow, type State } from "../state";
import type { Table } from "../table";
import type { PointValues } from "../values";

/** Adds the currents [from, to) of a table: left and right net, A. */
export function addCurrents({ numbers, figures }: Table, from: number, to: number, state: State): void {
  for (let k = from, n = 2 * from; k < to; k++, n += 2) {
    flow(state, numbers[n]!, numbers[n + 1]!, drivenCurrent(figures[k]!, state.share));
  }
}

/** Writes what the loop does with one row. */
export function writeCurrent(code: RowWriter): void {
  code.flow(0, 1, code.let(`${code.figure(0)}*share`));
}

export class CurrentPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly left: number;
  private readonly right: number;
  readonly isPlain = true;
  private readonly table: Table;
  private readonly row: number;

  constructor(bench: Bench) {
    this.element = bench.element;
    this.movers = moversOf([bench.element.value!], bench.values);
    this.left = netAt(bench, "left");
    this.right = netAt(bench, "right");
    this.table = bench.tables.currents;
    this.row = bench.tables.currents.add(this, [this.left, this.right]);
  }

  read(values: PointValues): void {
    this.table.figures[this.row] = values.of(this.element.value!);
  }

  /** None: its current does not depend on the unknowns. */
  addConstantSlopes(): void {}

  addTo(state: State): void {
    addCurrents(this.table, this.row, this.row + 1, state);
  }

  current(pin: string, state: State): number {
    const i = drivenCurrent(this.table.figures[this.row]!, state.share);
    return pin === "left" ? i : -i;
  }
}
