import type { Element, Model } from "@/lib/language/ast";
import type { Terminal } from "../circuit";
import { type Bench, figureOf, moversOf, type Part } from "../part";
import { across, flow, type State } from "../state";
import type { PointValues } from "../values";

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
  private ohms = 0;

  constructor({ pattern, values, model }: Omit<Bench, "element">, terminal: Terminal) {
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
  }

  read(values: PointValues): void {
    const { resistance } = this.terminal;
    this.ohms = resistance === null ? 0 : figureOf(this.model!, resistance, values)!;
  }

  addConstantSlopes(jacobian: Float64Array): void {
    const [outOfNet, intoPin, byNet, byPin, byCurrent] = this.places;
    jacobian[outOfNet]! += 1;
    jacobian[intoPin]! -= 1;
    jacobian[byNet]! += 1;
    jacobian[byPin]! -= 1;
    jacobian[byCurrent]! -= this.ohms;
  }

  addTo(state: State): void {
    const { net, inner, branch } = this.terminal;
    const i = state.x[branch]! + state.low[branch]!;
    flow(state, net, inner, i);
    const between = across(state, net, inner);
    const drop = this.ohms * i;
    state.residual[branch] = between - drop;
    state.scale[branch] = Math.abs(between) + Math.abs(drop);
  }

  current(_: string, state: State): number {
    return state.x[this.terminal.branch]!;
  }
}
