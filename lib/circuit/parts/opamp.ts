import { biasInto, offsetAt, opampMismatch } from "@/lib/devices/opamp";
import type { Element, Model } from "@/lib/language/ast";
import { ROOM_TEMPERATURE } from "@/lib/units/constants";
import { type Bench, figureOf, moversOf, netAt, type Part, type Proof } from "../part";
import { GROUND, type RowWriter } from "../row-writer";
import { across, flow, type State } from "../state";
import type { Table } from "../table";
import { type PointValues, TEMPERATURE } from "../values";

/** A row's figures: offset (V), output resistance (Ω), 1/A, bias currents into plus and minus (A). */
const [OFFSET, OHMS, INVERSE_GAIN, INTO_PLUS, INTO_MINUS] = [0, 1, 2, 3, 4] as const;

/** Adds the amplifiers [from, to) of a table: plus, minus and output net, number of the output's current. */
export function addOpamps({ numbers, figures }: Table, from: number, to: number, state: State): void {
  const { x, low, residual, scale, share } = state;
  const ground = x.length - 1;
  for (let k = from, n = 4 * from, at = 5 * from; k < to; k++, n += 4, at += 5) {
    const plus = numbers[n]!;
    const minus = numbers[n + 1]!;
    const out = numbers[n + 2]!;
    const branch = numbers[n + 3]!;
    flow(state, out, ground, x[branch]! + low[branch]!);
    flow(state, plus, ground, figures[at + INTO_PLUS]! * share);
    flow(state, minus, ground, figures[at + INTO_MINUS]! * share);
    const difference = across(state, plus, minus);
    const offset = figures[at + OFFSET]! * share;
    const ohms = figures[at + OHMS]!;
    const behind = across(state, out, ground) - ohms * x[branch]!;
    const inverse = figures[at + INVERSE_GAIN]!;
    const around = Math.abs(x[out]!) + ohms * Math.abs(x[branch]!);
    residual[branch] = opampMismatch(difference, offset, behind, inverse);
    scale[branch] = Math.abs(difference) + Math.abs(offset) + around * inverse;
  }
}

/** Writes what the loop does with one row; terms that are 0 at every point may be left out. */
export function writeOpamp(code: RowWriter, hasBias: boolean, hasOhms: boolean): void {
  const figure = (column: number) => code.figure(column);
  code.flow(2, GROUND, code.let(code.unknown(3)));
  if (hasBias) {
    code.flow(0, GROUND, code.let(`${figure(INTO_PLUS)}*share`));
    code.flow(1, GROUND, code.let(`${figure(INTO_MINUS)}*share`));
  }
  const difference = code.let(code.across(0, 1));
  const offset = code.let(`${figure(OFFSET)}*share`);
  const drop = hasOhms ? `-${figure(OHMS)}*${code.high(3)}` : "";
  const around = hasOhms ? `+${figure(OHMS)}*abs(${code.high(3)})` : "";
  const behind = code.let(code.across(2, GROUND) + drop);
  const inverse = figure(INVERSE_GAIN);
  code.law(
    3,
    `${difference}+${offset}-${behind}*${inverse}`,
    `abs(${difference})+abs(${offset})+(abs(${code.high(2)})${around})*${inverse}`,
  );
}

/** An amplifier; without output limits a plain one. */
export class OpampPart implements Part {
  readonly element: Element;
  readonly proof: "linear" | Proof = "linear";
  readonly movers: ReadonlySet<string>;
  protected readonly model: Model;
  protected readonly plus: number;
  protected readonly minus: number;
  protected readonly out: number;
  protected readonly ground: number;
  /** Number of the current into its output, and of its law. */
  protected readonly branch: number;
  /** Row of the output by current; its law by plus, minus, output voltage and output current. */
  protected readonly places: readonly [number, number, number, number, number];
  /** Its row in the table of plain amplifiers; null with limits. */
  private readonly row: number | null;
  private readonly table: Table;
  protected offset = 0;
  /** Output resistance, Ω. */
  protected ohms = 0;
  private inverseGain = 0;
  private intoPlus = 0;
  private intoMinus = 0;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    const { params } = bench.model!;
    this.element = element;
    this.model = bench.model!;
    this.movers = moversOf(params.values(), values, ...(params.has("offset_drift") ? [TEMPERATURE] : []));
    const branch = circuit.branches.get(element.name)!;
    this.plus = netAt(bench, "plus");
    this.minus = netAt(bench, "minus");
    this.out = netAt(bench, "out");
    this.ground = circuit.size;
    this.branch = branch;
    const hasGain = params.has("gain");
    this.places = [
      pattern.placeOfOne(this.out, branch),
      pattern.place(branch, this.plus),
      pattern.place(branch, this.minus),
      hasGain ? pattern.place(branch, this.out) : 0,
      hasGain && params.has("R_out") ? pattern.place(branch, branch) : 0,
    ];
    this.table = bench.tables.opamps;
    const isPlain = !params.has("out_low") && !params.has("out_high");
    this.row = isPlain ? bench.tables.opamps.add(this, [this.plus, this.minus, this.out, branch]) : null;
  }

  read(values: PointValues): void {
    const figure = (name: string) => figureOf(this.model, name, values);
    const gain = figure("gain");
    const bias = figure("bias") ?? 0;
    const difference = figure("bias_offset") ?? 0;
    this.inverseGain = gain === null ? 0 : 1 / gain;
    const T0 = figure("T0") ?? ROOM_TEMPERATURE;
    this.offset = offsetAt(figure("offset") ?? 0, figure("offset_drift"), T0, values.kelvin);
    this.ohms = figure("R_out") ?? 0;
    this.intoPlus = biasInto(1, bias, difference);
    this.intoMinus = biasInto(-1, bias, difference);
    if (this.row === null) return;
    const { offset, ohms, inverseGain, intoPlus, intoMinus } = this;
    this.table.figures.set([offset, ohms, inverseGain, intoPlus, intoMinus], 5 * this.row);
  }

  get isPlain(): boolean {
    return this.row !== null;
  }

  get hasBias(): boolean {
    return this.model.params.has("bias") || this.model.params.has("bias_offset");
  }

  get hasOhms(): boolean {
    return this.model.params.has("R_out");
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [intoOut, byPlus, byMinus, byOut, byCurrent] = this.places;
    jacobian[intoOut]! += 1;
    jacobian[byPlus]! += 1;
    jacobian[byMinus]! -= 1;
    jacobian[byOut]! -= this.inverseGain;
    jacobian[byCurrent]! += this.ohms * this.inverseGain;
  }

  addTo(state: State): void {
    if (this.row !== null) addOpamps(this.table, this.row, this.row + 1, state);
  }

  /** Output and bias currents. */
  protected addCurrents(state: State): void {
    const { plus, minus, out, ground, branch } = this;
    flow(state, out, ground, state.x[branch]! + state.low[branch]!);
    const { share } = state;
    if (this.intoPlus !== 0) flow(state, plus, ground, this.intoPlus * share);
    if (this.intoMinus !== 0) flow(state, minus, ground, this.intoMinus * share);
  }

  /** The voltage behind the output resistance, V. */
  protected behind(state: State): number {
    const vout = across(state, this.out, this.ground);
    return this.ohms === 0 ? vout : vout - this.ohms * state.x[this.branch]!;
  }

  /** The magnitudes of which `behind` is the sum, V. */
  protected around(state: State): number {
    return Math.abs(state.x[this.out]!) + this.ohms * Math.abs(state.x[this.branch]!);
  }

  current(pin: string, state: State): number {
    if (pin === "out") return state.x[this.branch]!;
    return (pin === "plus" ? this.intoPlus : this.intoMinus) * state.share;
  }
}
