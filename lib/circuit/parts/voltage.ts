import { voltageMismatch } from "@/lib/devices/voltage";
import type { Element } from "@/lib/language/ast";
import type { AssemblyCode } from "../assembly-code";
import { type Bench, moversOf, netAt, type Part } from "../part";
import { across, flow, type State } from "../state";
import type { PointValues } from "../values";

export class VoltagePart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly left: number;
  private readonly right: number;
  /** Number of its current, from left to right, and of its law. */
  private readonly branch: number;
  private readonly places: readonly [number, number, number, number];
  private volts = 0;

  constructor(bench: Bench) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.movers = moversOf([element.value!], values);
    const branch = circuit.branches.get(element.name)!;
    this.left = netAt(bench, "left");
    this.right = netAt(bench, "right");
    this.branch = branch;
    this.places = [
      pattern.placeOfOne(this.left, branch),
      pattern.placeOfOne(this.right, branch),
      pattern.placeOfOne(branch, this.left),
      pattern.placeOfOne(branch, this.right),
    ];
  }

  read(values: PointValues): void {
    this.volts = values.of(this.element.value!);
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [outOfLeft, outOfRight, byLeft, byRight] = this.places;
    jacobian[outOfLeft]! += 1;
    jacobian[outOfRight]! -= 1;
    jacobian[byLeft]! -= 1;
    jacobian[byRight]! += 1;
  }

  addTo(state: State): void {
    const { left, right, branch } = this;
    flow(state, left, right, state.x[branch]! + state.low[branch]!);
    const drop = across(state, left, right);
    const volts = this.volts * state.share;
    state.residual[branch] = voltageMismatch(drop, volts);
    state.scale[branch] = Math.abs(drop) + Math.abs(volts);
  }

  write(code: AssemblyCode): boolean {
    const { left, right, branch } = this;
    code.flow(left, right, code.let(code.unknown(branch)));
    const drop = code.let(code.across(left, right));
    const volts = code.let(`${code.object(this)}.volts*share`);
    code.law(branch, `-${drop}-${volts}`, `Math.abs(${drop})+Math.abs(${volts})`);
    return true;
  }

  current(pin: string, state: State): number {
    const i = state.x[this.branch]!;
    return pin === "left" ? i : -i;
  }
}
