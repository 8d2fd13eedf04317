import { drivenCurrent } from "@/lib/devices/current";
import type { Element } from "@/lib/language/ast";
import type { AssemblyCode } from "../assembly-code";
import { type Bench, moversOf, netAt, type Part } from "../part";
import { flow, type State } from "../state";
import type { PointValues } from "../values";

export class CurrentPart implements Part {
  readonly element: Element;
  readonly proof = "linear";
  readonly movers: ReadonlySet<string>;
  private readonly left: number;
  private readonly right: number;
  private amperes = 0;

  constructor(bench: Bench) {
    this.element = bench.element;
    this.movers = moversOf([bench.element.value!], bench.values);
    this.left = netAt(bench, "left");
    this.right = netAt(bench, "right");
  }

  read(values: PointValues): void {
    this.amperes = values.of(this.element.value!);
  }

  /** None: its current does not depend on the unknowns. */
  addConstantSlopes(): void {}

  addTo(state: State): void {
    flow(state, this.left, this.right, drivenCurrent(this.amperes, state.share));
  }

  write(code: AssemblyCode): boolean {
    code.flow(this.left, this.right, code.let(`${code.object(this)}.amperes*share`));
    return true;
  }

  current(pin: string, state: State): number {
    const i = drivenCurrent(this.amperes, state.share);
    return pin === "left" ? i : -i;
  }
}
