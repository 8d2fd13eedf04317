import { type BreakdownAt, breakdownAt, breakdownLaw, breakdownStep } from "@/lib/devices/breakdown";
import { type CurrentAndSlope, type DiodeAt, diodeAt, diodeLaw, diodeVoltage } from "@/lib/devices/diode";
import { breakdownDoubt, breakdownSpread, diodeDoubt, diodeSpread } from "@/lib/devices/diode-proof";
import { junctionStep } from "@/lib/devices/junction-step";
import type { Element, Model } from "@/lib/language/ast";
import { ROOM_TEMPERATURE, thermalVoltage } from "@/lib/units/constants";
import {
  type Bench,
  FREE,
  figureOf,
  type Gap,
  type JunctionPart,
  moversOf,
  NEARLY_WHOLE,
  netAt,
  type Proof,
  START_CURRENT,
} from "../part";
import { across, flow, type State } from "../state";
import type { Table } from "../table";
import { type PointValues, TEMPERATURE } from "../values";
import { DIODE_FIGURES, TabledLaw, V } from "./diode-table";

const FURTHER_TERMS = ["Rs", "V_breakdown", "photocurrent"];

/**
 * A diode. Light drives its photocurrent past the junction and through Rs: the junction with Rs stands at V + Rs·I_photo and carries
 * I + I_photo.
 */
export class DiodePart implements JunctionPart, Proof {
  readonly proof: Proof = this;
  readonly gaps: readonly Gap[];
  readonly element: Element;
  readonly movers: ReadonlySet<string>;
  private readonly model: Model;
  private readonly anode: number;
  private readonly cathode: number;
  private readonly places: readonly [number, number, number, number];
  private at: DiodeAt = { Is: 0, eta: 1, Rs: 0, doubt: 0 };
  private reverse: BreakdownAt | null = null;
  private photocurrent = 0;
  /** Without further terms in its law. */
  readonly isPlain: boolean;
  private readonly table: Table;
  private readonly row: number;
  private readonly law: CurrentAndSlope;
  private readonly actual: CurrentAndSlope = { i: 0, g: 0 };

  constructor(bench: Bench) {
    const { element, pattern, values } = bench;
    this.element = element;
    this.model = bench.model!;
    this.movers = moversOf(this.model.params.values(), values, TEMPERATURE);
    const a = netAt(bench, "anode");
    const c = netAt(bench, "cathode");
    this.anode = a;
    this.cathode = c;
    this.gaps = [[a, c]];
    this.places = [pattern.place(a, a), pattern.place(a, c), pattern.place(c, a), pattern.place(c, c)];
    const { params } = this.model;
    this.isPlain = !FURTHER_TERMS.some((name) => params.has(name));
    this.table = this.isPlain ? bench.tables.diodes : bench.tables.furtherDiodes;
    this.row = this.table.add(this, [a, c, ...this.places]);
    this.law = new TabledLaw(this.table, this.row);
  }

  /** Voltage at which the junction with Rs is linearised, V. */
  private get v(): number {
    return this.table.figures[this.row * DIODE_FIGURES + V]!;
  }

  private set v(volts: number) {
    this.table.figures[this.row * DIODE_FIGURES + V] = volts;
  }

  read(values: PointValues): void {
    const figure = (name: string) => figureOf(this.model, name, values);
    const terms = {
      Is: figure("Is")!,
      n: figure("n") ?? 1,
      Eg: figure("Eg"),
      x: figure("x"),
      T0: figure("T0") ?? ROOM_TEMPERATURE,
    };
    this.at = diodeAt(terms, figure("Rs"), values.kelvin);
    const volts = figure("V_breakdown");
    const eta = (figure("n_breakdown") ?? 1) * thermalVoltage(values.kelvin);
    this.reverse =
      volts === null ? null : breakdownAt(this.at, figure("I_breakdown") ?? terms.Is, volts, eta);
    this.photocurrent = figure("photocurrent") ?? 0;
    this.table.figures.set([this.at.Is, this.at.eta], this.row * DIODE_FIGURES);
  }

  start(): void {
    this.v = diodeVoltage(this.at, START_CURRENT);
  }

  settle(state: State): void {
    this.v = this.junction(state);
  }

  follow(state: State): boolean {
    const target = this.junction(state);
    const { at, v, law, reverse } = this;
    this.v = target;
    if (Math.abs(target - v) <= FREE * at.eta) return true;
    const next =
      reverse === null
        ? junctionStep(at, v, law.i, law.g, target)
        : breakdownStep(at, reverse, v, law.i, law.g, target);
    if (Math.abs(next - target) <= NEARLY_WHOLE * at.eta) return true;
    this.v = next;
    return false;
  }

  apart(state: State): number {
    return Math.abs(this.junction(state) - this.v) / this.at.eta;
  }

  addConstantSlopes(): void {}

  addTo(state: State): void {
    this.lawAt(this.v, this.law);
    this.stamp(state);
  }

  private stamp(state: State): void {
    const { anode, cathode, law, places } = this;
    flow(state, anode, cathode, law.i + law.g * (this.junction(state) - this.v));
    if (this.photocurrent !== 0) flow(state, cathode, anode, this.photocurrent * state.share);
    const { jacobian } = state;
    jacobian[places[0]]! += law.g;
    jacobian[places[1]]! -= law.g;
    jacobian[places[2]]! -= law.g;
    jacobian[places[3]]! += law.g;
  }

  /** The voltage over junction and Rs, V. */
  private junction(state: State): number {
    const v = across(state, this.anode, this.cathode);
    return this.photocurrent === 0 ? v : v + this.photocurrent * state.share * this.at.Rs;
  }

  private lawAt(v: number, out: CurrentAndSlope): void {
    if (this.reverse === null) diodeLaw(this.at, v, out);
    else breakdownLaw(this.at, this.reverse, v, out);
  }

  addDoubt(_: State, doubt: Float64Array): void {
    const { at, reverse, v, law } = this;
    const most = reverse === null ? diodeDoubt(at, v, law) : breakdownDoubt(at, reverse, v, law);
    doubt[this.anode]! += most;
    doubt[this.cathode]! += most;
  }

  addSpread(_: State, radius: number, widths: Float64Array, from: number, spread: Float64Array): void {
    const { anode, cathode, at, reverse, v, law } = this;
    const width = widths[from]!;
    const delta = radius * width;
    const change =
      reverse === null ? diodeSpread(at, v, law.g, delta) : breakdownSpread(at, reverse, v, law.g, delta);
    spread[anode]! += change * width;
    spread[cathode]! += change * width;
  }

  current(pin: string, state: State): number {
    this.lawAt(this.junction(state), this.actual);
    const i = this.actual.i - this.photocurrent * state.share;
    return pin === "anode" ? i : -i;
  }
}
