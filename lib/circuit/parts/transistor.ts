import { type BipolarAt, bipolarAt, bipolarLaw, NO_BIPOLAR } from "@/lib/devices/bipolar";
import { bipolarDoubt, bipolarSpread } from "@/lib/devices/bipolar-proof";
import { diodeVoltage } from "@/lib/devices/diode";
import { junctionStep } from "@/lib/devices/junction-step";
import type { Element, Model } from "@/lib/language/ast";
import { ROOM_TEMPERATURE } from "@/lib/units/constants";
import { exp } from "@/lib/units/exponential";
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
import { across, type State } from "../state";
import type { Table } from "../table";
import { type PointValues, TEMPERATURE } from "../values";
import { TRANSISTOR_FIGURES, VBC, VBE, VCE } from "./transistor-table";

const FURTHER_TERMS = ["I_leak_e", "I_leak_c", "I_knee_f", "I_knee_r"];

/** An npn, or a pnp, which is the same with every voltage and current reversed. */
export class TransistorPart implements JunctionPart, Proof {
  readonly proof: Proof = this;
  readonly gaps: readonly Gap[];
  readonly element: Element;
  readonly movers: ReadonlySet<string>;
  private readonly model: Model;
  /** +1 for an npn, −1 for a pnp. */
  private readonly sign: 1 | -1;
  private readonly c: number;
  private readonly b: number;
  private readonly e: number;
  /** Rows c, b, e by columns c, b, e. */
  private readonly places: readonly number[];
  private at: BipolarAt = NO_BIPOLAR;
  /** Without leakage and high injection. */
  readonly isPlain: boolean;
  private readonly table: Table;
  private readonly row: number;
  private readonly law = { ic: 0, ib: 0, icF: 0, icR: 0, ibF: 0, ibR: 0 };
  private readonly actual = { ic: 0, ib: 0, icF: 0, icR: 0, ibF: 0, ibR: 0 };
  private readonly bounds = { ic: 0, ib: 0, icF: 0, icR: 0, ibF: 0, ibR: 0 };

  constructor(bench: Bench) {
    const { element, pattern, values } = bench;
    this.element = element;
    this.model = bench.model!;
    this.sign = element.kind === "npn" ? 1 : -1;
    this.movers = moversOf(this.model.params.values(), values, TEMPERATURE);
    this.c = netAt(bench, "c");
    this.b = netAt(bench, "b");
    this.e = netAt(bench, "e");
    this.gaps = [
      [this.b, this.e],
      [this.b, this.c],
    ];
    const nets = [this.c, this.b, this.e];
    this.places = nets.flatMap((row) => nets.map((column) => pattern.place(row, column)));
    const { params } = this.model;
    this.isPlain = !FURTHER_TERMS.some((name) => params.has(name));
    this.table = this.isPlain ? bench.tables.transistors : bench.tables.furtherTransistors;
    this.row = this.table.add(this, [...nets, this.sign, ...this.places]);
  }

  /** Voltages at which it is linearised, V. */
  private get vbe(): number {
    return this.table.figures[this.row * TRANSISTOR_FIGURES + VBE]!;
  }

  private get vbc(): number {
    return this.table.figures[this.row * TRANSISTOR_FIGURES + VBC]!;
  }

  private get vce(): number {
    return this.table.figures[this.row * TRANSISTOR_FIGURES + VCE]!;
  }

  private lineariseAt(vbe: number, vbc: number, vce: number): void {
    const { figures } = this.table;
    const at = this.row * TRANSISTOR_FIGURES;
    figures[at + VBE] = vbe;
    figures[at + VBC] = vbc;
    figures[at + VCE] = vce;
  }

  read(values: PointValues): void {
    const figure = (name: string) => figureOf(this.model, name, values);
    const terms = {
      Is: figure("Is")!,
      n: figure("n") ?? 1,
      Eg: figure("Eg"),
      x: figure("x"),
      T0: figure("T0") ?? ROOM_TEMPERATURE,
      beta_f: figure("beta_f"),
      beta_r: figure("beta_r"),
      Va_f: figure("Va_f"),
      Va_r: figure("Va_r"),
      beta_power: figure("beta_power"),
      I_leak_e: figure("I_leak_e"),
      n_leak_e: figure("n_leak_e") ?? 2,
      I_leak_c: figure("I_leak_c"),
      n_leak_c: figure("n_leak_c") ?? 2,
      I_knee_f: figure("I_knee_f"),
      I_knee_r: figure("I_knee_r"),
    };
    this.at = bipolarAt(terms, values.kelvin);
    const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly } = this.at;
    const figures = [Is, eta, 1 / eta, forwardBase, reverseBase, forwardEarly, reverseEarly];
    this.table.figures.set(figures, this.row * TRANSISTOR_FIGURES);
  }

  start(): void {
    const volts = diodeVoltage(this.at, START_CURRENT);
    this.lineariseAt(volts, 0, volts);
  }

  settle(state: State): void {
    const { sign, c, b, e } = this;
    this.lineariseAt(sign * across(state, b, e), sign * across(state, b, c), sign * across(state, c, e));
  }

  follow(state: State): boolean {
    const { at, vbe, vbc } = this;
    this.settle(state);
    const free = FREE * at.eta;
    if (Math.abs(this.vbe - vbe) <= free && Math.abs(this.vbc - vbc) <= free) return true;
    const nextBe = this.stepped(vbe, this.vbe);
    const nextBc = this.stepped(vbc, this.vbc);
    const near = NEARLY_WHOLE * at.eta;
    if (Math.abs(nextBe - this.vbe) <= near && Math.abs(nextBc - this.vbc) <= near) return true;
    this.lineariseAt(nextBe, nextBc, nextBe - nextBc);
    return false;
  }

  /** The junction step of a pure exponential of the transistor's Is and n·V_T. */
  private stepped(v: number, target: number): number {
    const { Is, eta } = this.at;
    const rise = exp(v / eta);
    return junctionStep(this.at, v, Is * (rise - 1), (Is / eta) * rise, target);
  }

  apart(state: State): number {
    const be = Math.abs(this.sign * across(state, this.b, this.e) - this.vbe);
    const bc = Math.abs(this.sign * across(state, this.b, this.c) - this.vbc);
    return Math.max(be, bc) / this.at.eta;
  }

  addConstantSlopes(): void {}

  addTo(state: State): void {
    const { c, b, e, sign, law, places } = this;
    bipolarLaw(this.at, this.vbe, this.vbc, this.vce, law);
    const { icF, icR, ibF, ibR } = law;
    const be = sign * across(state, b, e) - this.vbe;
    const bc = sign * across(state, b, c) - this.vbc;
    const ic = sign * (law.ic + icF * be + icR * bc);
    const ib = sign * (law.ib + ibF * be + ibR * bc);
    const ie = -ic - ib;
    const { jacobian, residual, scale } = state;
    residual[c]! += ic;
    residual[b]! += ib;
    residual[e]! += ie;
    // In saturation a pin's current is what two much larger ones leave over; the slopes tell how large these are.
    const { eta } = this.at;
    const intoC = eta * (Math.abs(icF) + Math.abs(icR));
    const intoB = eta * (Math.abs(ibF) + Math.abs(ibR));
    scale[c]! += Math.abs(ic) + intoC;
    scale[b]! += Math.abs(ib) + intoB;
    scale[e]! += Math.abs(ie) + (intoC + intoB);
    jacobian[places[0]!]! -= icR;
    jacobian[places[1]!]! += icF + icR;
    jacobian[places[2]!]! -= icF;
    jacobian[places[3]!]! -= ibR;
    jacobian[places[4]!]! += ibF + ibR;
    jacobian[places[5]!]! -= ibF;
    jacobian[places[6]!]! += icR + ibR;
    jacobian[places[7]!]! -= icF + icR + (ibF + ibR);
    jacobian[places[8]!]! += icF + ibF;
  }

  addDoubt(_: State, doubt: Float64Array): void {
    const { bounds } = this;
    bipolarDoubt(this.at, this.vbe, this.vbc, bounds);
    doubt[this.c]! += bounds.ic;
    doubt[this.b]! += bounds.ib;
    doubt[this.e]! += bounds.ic + bounds.ib;
  }

  addSpread(_: State, radius: number, widths: Float64Array, at: number, spread: Float64Array): void {
    const { c, b, e, bounds } = this;
    const be = widths[at]!;
    const bc = widths[at + 1]!;
    bipolarSpread(this.at, this.vbe, this.vbc, radius * Math.max(be, bc), bounds);
    const intoC = bounds.icF * be + bounds.icR * bc;
    const intoB = bounds.ibF * be + bounds.ibR * bc;
    spread[c]! += intoC;
    spread[b]! += intoB;
    spread[e]! += intoC + intoB;
  }

  current(pin: string, state: State): number {
    const { sign, b, c, e, actual: law } = this;
    const vbe = sign * across(state, b, e);
    const vbc = sign * across(state, b, c);
    bipolarLaw(this.at, vbe, vbc, sign * across(state, c, e), law);
    return sign * (pin === "c" ? law.ic : pin === "b" ? law.ib : -law.ic - law.ib);
  }
}
