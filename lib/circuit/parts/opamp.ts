import { opampMismatch } from "@/lib/devices/opamp";
import type { Element, Model } from "@/lib/language/ast";
import { type Bench, figureOf, moversOf, netAt, type Part } from "../part";
import { across, flow, type State } from "../state";
import type { PointValues } from "../values";

export class OpampPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly model: Model;
  private readonly plus: number;
  private readonly minus: number;
  private readonly out: number;
  private readonly ground: number;
  /** Number of the current into its output, and of its law. */
  private readonly branch: number;
  private readonly places: readonly [number, number, number, number];
  private inverseGain = 0;
  private offset = 0;
  private bias = 0;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.model = bench.model!;
    this.movers = moversOf(this.model.params.values(), values);
    const branch = circuit.branches.get(element.name)!;
    this.plus = netAt(bench, "plus");
    this.minus = netAt(bench, "minus");
    this.out = netAt(bench, "out");
    this.ground = circuit.size;
    this.branch = branch;
    this.places = [
      pattern.place(this.out, branch),
      pattern.place(branch, this.plus),
      pattern.place(branch, this.minus),
      this.model.params.has("gain") ? pattern.place(branch, this.out) : 0,
    ];
  }

  read(values: PointValues): void {
    const gain = figureOf(this.model, "gain", values);
    this.inverseGain = gain === null ? 0 : 1 / gain;
    this.offset = figureOf(this.model, "offset", values) ?? 0;
    this.bias = figureOf(this.model, "bias", values) ?? 0;
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [intoOut, byPlus, byMinus, byOut] = this.places;
    jacobian[intoOut]! += 1;
    jacobian[byPlus]! += 1;
    jacobian[byMinus]! -= 1;
    jacobian[byOut]! -= this.inverseGain;
  }

  addTo(state: State): void {
    const { plus, minus, out, ground, branch, inverseGain } = this;
    flow(state, out, ground, state.x[branch]! + state.low[branch]!);
    const bias = this.bias * state.share;
    if (bias !== 0) {
      flow(state, plus, ground, bias);
      flow(state, minus, ground, bias);
    }
    const difference = across(state, plus, minus);
    const offset = this.offset * state.share;
    const vout = across(state, out, ground);
    state.residual[branch] = opampMismatch(difference, offset, vout, inverseGain);
    state.scale[branch] = Math.abs(difference) + Math.abs(offset) + Math.abs(vout * inverseGain);
  }

  current(pin: string, state: State): number {
    return pin === "out" ? state.x[this.branch]! : this.bias * state.share;
  }
}
