import type { System } from "@/lib/circuit/system";
import type { Curved } from "@/lib/solver/curve";
import type { SparseShape } from "@/lib/solver/elimination";
import { log } from "@/lib/units/elementary";
import { exp } from "@/lib/units/exponential";
import type { AxisDocument } from "./result";

/** Steps that a sweep of the whole axis takes at least. */
const STEPS = 20;
/** Part of a step over which the slope by the knob is measured; it only guides Newton's method, which then solves exactly. */
const APART = 1e-4;

/** The solutions of a circuit as one knob turns: F(x, knob) = 0, the knob counted in twentieths of its axis, on the axis's own scale. */
export class KnobCurve implements Curved {
  readonly shape: SparseShape;
  readonly least: number;
  readonly most: number;
  private readonly isLogarithmic: boolean;
  private readonly unit: number;
  private readonly after: Float64Array;
  private parameter = 0;

  constructor(
    private readonly system: System,
    private readonly axis: AxisDocument,
  ) {
    const { knob: _, values, scale } = axis;
    const [low, high] = [Math.min(...values), Math.max(...values)];
    this.isLogarithmic = scale === "logarithmic" && low > 0;
    const span = this.isLogarithmic ? log(high / low) : high - low;
    this.unit = span > 0 ? span / STEPS : 1;
    this.least = this.toParameter(low);
    this.most = this.toParameter(high);
    this.shape = system.pattern;
    this.after = new Float64Array(system.circuit.size);
  }

  toParameter(value: number): number {
    return (this.isLogarithmic ? log(value) : value) / this.unit;
  }

  toValue(parameter: number): number {
    return this.isLogarithmic ? exp(parameter * this.unit) : parameter * this.unit;
  }

  turn(parameter: number): void {
    this.parameter = parameter;
    this.system.turn(this.axis.knob, this.toValue(parameter));
  }

  linearise(slope: Float64Array): Float64Array {
    const { system, parameter, after } = this;
    const { residual, jacobian } = system.state;
    this.turn(parameter + APART);
    system.assemble();
    after.set(residual.subarray(0, after.length));
    this.turn(parameter - APART);
    system.assemble();
    for (let i = 0; i < after.length; i++) slope[i] = (after[i]! - residual[i]!) / (2 * APART);
    this.turn(parameter);
    system.assemble();
    return jacobian;
  }
}
