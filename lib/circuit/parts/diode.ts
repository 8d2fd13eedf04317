import { type CurrentAndSlope, type DiodeAt, diodeAt, diodeLaw, diodeVoltage } from "@/lib/devices/diode";
import { diodeDoubt, diodeSpread } from "@/lib/devices/diode-proof";
import { junctionStep } from "@/lib/devices/junction-step";
import type { Element, Model } from "@/lib/language/ast";
import { ROOM_TEMPERATURE } from "@/lib/units/constants";
import {
  type Bench,
  FREE,
  figureOf,
  type JunctionPart,
  moversOf,
  NEARLY_WHOLE,
  netAt,
  type Proof,
  START_CURRENT,
} from "../part";
import { across, flow, type State } from "../state";
import { type PointValues, TEMPERATURE } from "../values";

export class DiodePart implements JunctionPart, Proof {
  readonly proof: Proof = this;
  readonly element: Element;
  readonly movers: ReadonlySet<string>;
  private readonly model: Model;
  private readonly anode: number;
  private readonly cathode: number;
  private readonly places: readonly [number, number, number, number];
  private at: DiodeAt = { Is: 0, eta: 1, Rs: 0, doubt: 0 };
  /** Voltage at which it is linearised, V, and its law there. */
  private v = 0;
  private readonly law: CurrentAndSlope = { i: 0, g: 0 };

  constructor(bench: Bench) {
    const { element, pattern, values } = bench;
    this.element = element;
    this.model = bench.model!;
    this.movers = moversOf(this.model.params.values(), values, TEMPERATURE);
    const a = netAt(bench, "anode");
    const c = netAt(bench, "cathode");
    this.anode = a;
    this.cathode = c;
    this.places = [pattern.place(a, a), pattern.place(a, c), pattern.place(c, a), pattern.place(c, c)];
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
  }

  start(): void {
    this.v = diodeVoltage(this.at, START_CURRENT);
  }

  settle(state: State): void {
    this.v = across(state, this.anode, this.cathode);
  }

  follow(state: State): boolean {
    const target = across(state, this.anode, this.cathode);
    const { at, v, law } = this;
    this.v = target;
    if (Math.abs(target - v) <= FREE * at.eta) return true;
    const next = junctionStep(at, v, law.i, law.g, target);
    if (Math.abs(next - target) <= NEARLY_WHOLE * at.eta) return true;
    this.v = next;
    return false;
  }

  apart(state: State): number {
    return Math.abs(across(state, this.anode, this.cathode) - this.v) / this.at.eta;
  }

  addConstantSlopes(): void {}

  addTo(state: State): void {
    const { anode, cathode, law, places } = this;
    diodeLaw(this.at, this.v, law);
    flow(state, anode, cathode, law.i + law.g * (across(state, anode, cathode) - this.v));
    const { jacobian } = state;
    jacobian[places[0]]! += law.g;
    jacobian[places[1]]! -= law.g;
    jacobian[places[2]]! -= law.g;
    jacobian[places[3]]! += law.g;
  }

  addDoubt(_: State, doubt: Float64Array): void {
    const most = diodeDoubt(this.at, this.v, this.law);
    doubt[this.anode]! += most;
    doubt[this.cathode]! += most;
  }

  addSpread(_: State, radius: number, weights: Float64Array, spread: Float64Array): void {
    const { anode, cathode, at, v, law } = this;
    const both = weights[anode]! + weights[cathode]!;
    const most = diodeSpread(at, v, law.g, radius * both) * both;
    spread[anode]! += most;
    spread[cathode]! += most;
  }

  current(pin: string, state: State): number {
    const law = { i: 0, g: 0 };
    diodeLaw(this.at, across(state, this.anode, this.cathode), law);
    return pin === "anode" ? law.i : -law.i;
  }
}
