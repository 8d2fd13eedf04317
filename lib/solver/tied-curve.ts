import type { System } from "@/lib/circuit/system";
import type { Aided } from "./aided";
import type { Curved } from "./curve";
import type { SparseShape } from "./elimination";

/** A conductance, S, as a function of a curve's parameter, with its slope. */
export interface Fading {
  readonly conductance: (parameter: number) => number;
  readonly slope: (parameter: number) => number;
}

/** The solutions of F(x) + g(p)·D·(x − origin) = 0: a circuit whose nets are tied to fixed voltages, more or less as p turns. */
export class TiedCurve implements Curved {
  readonly shape: SparseShape;
  private parameter = 0;

  constructor(
    private readonly system: System,
    private readonly aided: Aided,
    private readonly fading: Fading,
  ) {
    this.shape = aided.shape;
  }

  turn(parameter: number): void {
    this.parameter = parameter;
    this.aided.conductance = this.fading.conductance(parameter);
  }

  linearise(slope: Float64Array): Float64Array {
    const { system, aided } = this;
    aided.assemble();
    const by = this.fading.slope(this.parameter);
    slope.fill(0);
    for (let k = 0; k < aided.aids.length; k++) slope[aided.aids[k]!.row]! += by * aided.pull(k);
    return aided.aidedValues(system.state.jacobian);
  }
}
