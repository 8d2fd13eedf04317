import { gainMismatch } from "@/lib/devices/gain";
import type { Element } from "@/lib/language/ast";
import { type Bench, figureOf, moversOf, netAt, type Part } from "../part";
import { across, flow, type State } from "../state";
import type { PointValues } from "../values";

export class GainPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly plus: number;
  private readonly minus: number;
  private readonly out: number;
  private readonly ground: number;
  /** Number of the current into its output, and of its law. */
  private readonly branch: number;
  private readonly places: readonly [number, number, number, number];
  private ratio = 0;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.movers = moversOf(element.params.values(), values);
    const branch = circuit.branches.get(element.name)!;
    this.plus = netAt(bench, "plus");
    this.minus = netAt(bench, "minus");
    this.out = netAt(bench, "out");
    this.ground = circuit.size;
    this.branch = branch;
    this.places = [
      pattern.place(this.out, branch),
      pattern.place(branch, this.out),
      pattern.place(branch, this.plus),
      pattern.place(branch, this.minus),
    ];
  }

  read(values: PointValues): void {
    this.ratio = figureOf(this.element, "ratio", values)!;
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [intoOut, byOut, byPlus, byMinus] = this.places;
    jacobian[intoOut]! += 1;
    jacobian[byOut]! += 1;
    jacobian[byPlus]! -= this.ratio;
    jacobian[byMinus]! += this.ratio;
  }

  addTo(state: State): void {
    const { plus, minus, out, ground, branch, ratio } = this;
    flow(state, out, ground, state.x[branch]! + state.low[branch]!);
    const vout = across(state, out, ground);
    const difference = across(state, plus, minus);
    state.residual[branch] = gainMismatch(vout, difference, ratio);
    state.scale[branch] = Math.abs(vout) + Math.abs(ratio * difference);
  }

  current(pin: string, state: State): number {
    return pin === "out" ? state.x[this.branch]! : 0;
  }
}
