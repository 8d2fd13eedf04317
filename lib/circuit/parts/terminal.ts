import type { Element, Model } from "@/lib/language/ast";
import type { Terminal } from "../circuit";
import { type Bench, figureOf, moversOf, type Part } from "../part";
import type { RowWriter } from "../row-writer";
import { across, flow, type State } from "../state";
import type { Table } from "../table";
import type { PointValues } from "../values";

/** Adds the terminals [from, to) of a table: net, inner end, number of the current, Ω. */
export function addTerminals({ numbers, figures }: Table, from: number, to: number, state: State): void {
  const { x, low, residual, scale } = state;
  for (let k = from, n = 3 * from; k < to; k++, n += 3) {
    const net = numbers[n]!;
    const inner = numbers[n + 1]!;
    const branch = numbers[n + 2]!;
    const i = x[branch]! + low[branch]!;
    flow(state, net, inner, i);
    const between = across(state, net, inner);
    const drop = figures[k]! * i;
    residual[branch] = between - drop;
    scale[branch] = Math.abs(between) + Math.abs(drop);
  }
}

/** Writes what the loop does with one row. */
export function writeTerminal(code: RowWriter): void {
  const i = code.let(code.unknown(2));
  code.flow(0, 1, i);
  const between = code.let(code.across(0, 1));
  const drop = code.let(`${code.figure(0)}*${i}`);
  code.law(2, `${between}-${drop}`, `abs(${between})+abs(${drop})`);
}

/**
 * What lies between a net and a pin: v_net − v_pin − R·i = 0, with the current i as an unknown, so that R may be 0 Ω: at a point, or
 * always, where a law merely reads the current.
 */
export class TerminalPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly model: Model | null;
  private readonly terminal: Terminal;
  private readonly places: readonly [number, number, number, number, number];
  readonly isPlain = true;
  private readonly table: Table;
  private readonly row: number;

  constructor({ pattern, values, model, tables }: Omit<Bench, "element">, terminal: Terminal) {
    const { element, resistance, net, inner, branch } = terminal;
    this.element = element;
    this.model = model;
    this.terminal = terminal;
    const given = resistance === null ? [] : [model!.params.get(resistance)!];
    this.movers = moversOf(given, values);
    this.places = [
      pattern.placeOfOne(net, branch),
      pattern.placeOfOne(inner, branch),
      pattern.placeOfOne(branch, net),
      pattern.placeOfOne(branch, inner),
      resistance === null ? 0 : pattern.place(branch, branch),
    ];
    this.table = tables.terminals;
    this.row = tables.terminals.add(this, [net, inner, branch]);
  }

  read(values: PointValues): void {
    const { resistance } = this.terminal;
    this.table.figures[this.row] = resistance === null ? 0 : figureOf(this.model!, resistance, values)!;
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [outOfNet, intoPin, byNet, byPin, byCurrent] = this.places;
    jacobian[outOfNet]! += 1;
    jacobian[intoPin]! -= 1;
    jacobian[byNet]! += 1;
    jacobian[byPin]! -= 1;
    jacobian[byCurrent]! -= this.table.figures[this.row]!;
  }

  addTo(state: State): void {
    addTerminals(this.table, this.row, this.row + 1, state);
  }

  current(_: string, state: State): number {
    return state.x[this.terminal.branch]!;
  }
}
