import type { CurrentAndSlope } from "@/lib/devices/diode";
import { FREE, type JunctionPart } from "../part";
import type { RowWriter } from "../row-writer";
import type { State } from "../state";
import type { Table } from "../table";

/** A row's numbers: anode, cathode, and the places of rows anode, cathode by columns anode, cathode. */
export const DIODE_NUMBERS = 6;

/** A row's figures: saturation current (A), n·V_T (V), the voltage at which it is linearised (V), current (A) and slope (S) there. */
export const DIODE_FIGURES = 5;
export const [IS, ETA, V, I, G] = [0, 1, 2, 3, 4] as const;

/** Current and slope in the figures of a row. */
export class TabledLaw implements CurrentAndSlope {
  constructor(
    private readonly table: Table,
    private readonly row: number,
  ) {}

  get i(): number {
    return this.table.figures[this.row * DIODE_FIGURES + I]!;
  }

  set i(amperes: number) {
    this.table.figures[this.row * DIODE_FIGURES + I] = amperes;
  }

  get g(): number {
    return this.table.figures[this.row * DIODE_FIGURES + G]!;
  }

  set g(siemens: number) {
    this.table.figures[this.row * DIODE_FIGURES + G] = siemens;
  }
}

/** The exponents of plain diodes, v/η, into `ys` from its beginning. */
export function askDiodes({ figures, count }: Table, ys: Float64Array): void {
  for (let k = 0, at = 0; k < count; k++, at += DIODE_FIGURES) {
    ys[k] = figures[at + V]! / figures[at + ETA]!;
  }
}

/**
 * Adds the plain diodes [from, to) with e^y − 1 and e^y of their exponents. With `isSettled` every one is linearised at its actual
 * voltage, and the linear model adds nothing to its current.
 */
export function addDiodes(
  { numbers, figures }: Table,
  from: number,
  to: number,
  state: State,
  less: Float64Array,
  whole: Float64Array,
  isSettled: boolean,
): void {
  const { x, low, residual, scale, jacobian } = state;
  let n = from * DIODE_NUMBERS;
  let at = from * DIODE_FIGURES;
  for (let k = from; k < to; k++, n += DIODE_NUMBERS, at += DIODE_FIGURES) {
    const a = numbers[n]!;
    const c = numbers[n + 1]!;
    const Is = figures[at + IS]!;
    const i = Is * less[k]!;
    const g = (Is / figures[at + ETA]!) * whole[k]!;
    figures[at + I] = i;
    figures[at + G] = g;
    let current = i;
    if (!isSettled) current += g * (x[a]! - x[c]! + (low[a]! - low[c]!) - figures[at + V]!);
    const size = Math.abs(current);
    residual[a]! += current;
    residual[c]! -= current;
    scale[a]! += size;
    scale[c]! += size;
    jacobian[numbers[n + 2]!]! += g;
    jacobian[numbers[n + 5]!]! += g;
    jacobian[numbers[n + 3]!]! -= g;
    jacobian[numbers[n + 4]!]! -= g;
  }
}

/** As `settle` of every part. */
export function settleDiodes({ numbers, figures, count }: Table, { x, low }: State): void {
  for (let k = 0, n = 0, at = V; k < count; k++, n += DIODE_NUMBERS, at += DIODE_FIGURES) {
    const a = numbers[n]!;
    const c = numbers[n + 1]!;
    figures[at] = x[a]! - x[c]! + (low[a]! - low[c]!);
  }
}

/** As `follow` of every part; a part is asked only where its voltage moves far. */
export function followDiodes(table: Table<JunctionPart>, state: State): boolean {
  const { numbers, figures, count, owners } = table;
  const { x, low } = state;
  let isExact = true;
  for (let k = 0, n = 0, at = 0; k < count; k++, n += DIODE_NUMBERS, at += DIODE_FIGURES) {
    const a = numbers[n]!;
    const c = numbers[n + 1]!;
    const target = x[a]! - x[c]! + (low[a]! - low[c]!);
    if (Math.abs(target - figures[at + V]!) <= FREE * figures[at + ETA]!) figures[at + V] = target;
    else if (!owners[k]!.follow(state)) isExact = false;
  }
  return isExact;
}

/** Writes that a diode is linearised at its actual voltage, and asks for its exponential. */
export function askDiode(code: RowWriter): void {
  code.give(V, code.across(0, 1));
  code.ask(0, `${code.figure(V)}/${code.figure(ETA)}`);
}

/** Writes what `addDiodes` does with one row at rest. */
export function writeDiode(code: RowWriter): void {
  code.give(I, `${code.figure(IS)}*${code.less(0)}`);
  code.give(G, `${code.figure(IS)}/${code.figure(ETA)}*${code.whole(0)}`);
  code.flow(0, 1, code.figure(I));
  code.slope(2, "+", code.figure(G));
  code.slope(5, "+", code.figure(G));
  code.slope(3, "-", code.figure(G));
  code.slope(4, "-", code.figure(G));
}
