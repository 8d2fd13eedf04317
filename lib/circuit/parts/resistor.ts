import { conductance } from "@/lib/devices/resistor";
import { UNIT } from "@/lib/devices/rounding";
import type { Element } from "@/lib/language/ast";
import type { AssemblyCode } from "../assembly-code";
import { type Bench, figureOf, type Gap, moversOf, netAt, type Part, type Proof } from "../part";
import { across, flow, type State } from "../state";
import { type PointValues, TEMPERATURE } from "../values";

export class ResistorPart implements Part, Proof {
  readonly element: Element;
  readonly gaps: readonly Gap[];
  readonly movers: ReadonlySet<string>;
  private readonly left: number;
  private readonly right: number;
  private readonly places: readonly [number, number, number, number];
  /** Conductance, S. */
  private g = 0;

  constructor(bench: Bench) {
    const { element, pattern, values } = bench;
    this.element = element;
    const all = [element.value!, ...element.params.values()];
    this.movers = moversOf(all, values, ...(element.params.has("drift") ? [TEMPERATURE] : []));
    const left = netAt(bench, "left");
    const right = netAt(bench, "right");
    this.left = left;
    this.right = right;
    this.gaps = [[left, right]];
    this.places = [
      pattern.place(left, left),
      pattern.place(left, right),
      pattern.place(right, left),
      pattern.place(right, right),
    ];
  }

  read(values: PointValues): void {
    this.g = conductance(
      values.of(this.element.value!),
      figureOf(this.element, "drift", values),
      values.kelvin,
    );
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [ll, lr, rl, rr] = this.places;
    jacobian[ll]! += this.g;
    jacobian[lr]! -= this.g;
    jacobian[rl]! -= this.g;
    jacobian[rr]! += this.g;
  }

  addTo(state: State): void {
    flow(state, this.left, this.right, this.g * across(state, this.left, this.right));
  }

  write(code: AssemblyCode): boolean {
    const i = code.let(`${code.object(this)}.g*${code.across(this.left, this.right)}`);
    code.flow(this.left, this.right, i);
    return true;
  }

  /** A conductance that is or may become negative can cancel others, whose rounding then stays. */
  get proof(): "linear" | Proof {
    return this.g >= 0 && this.movers.size === 0 ? "linear" : this;
  }

  addDoubt(): void {}

  addSpread(_: State, __: number, widths: Float64Array, at: number, spread: Float64Array): void {
    if (this.g >= 0) return;
    const most = -8 * UNIT * this.g * widths[at]!;
    spread[this.left]! += most;
    spread[this.right]! += most;
  }

  current(pin: string, state: State): number {
    const i = this.g * across(state, this.left, this.right);
    return pin === "left" ? i : -i;
  }
}
