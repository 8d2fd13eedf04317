import { KNEE, limited, limitStep } from "@/lib/devices/limits";
import { UNIT } from "@/lib/devices/rounding";
import { expm1 } from "@/lib/units/exponential";
import { FREE, figureOf, type Gap, type JunctionPart, type Proof } from "../part";
import { across, type State } from "../state";
import type { PointValues } from "../values";
import { OpampPart } from "./opamp";

/**
 * An amplifier whose output has limits: behind the output resistance it stands at L(s), s = A·(v_plus − v_minus + offset). The law is
 * kept divided by A as without limits, (L(s) − v_behind)/A = 0, so that its slope by the inputs is L'(s).
 */
export class LimitedOpampPart extends OpampPart implements JunctionPart, Proof {
  override readonly proof: Proof = this;
  readonly gaps: readonly Gap[] = [[this.plus, this.minus]];
  private gain = 1;
  private limits = { low: null as number | null, high: null as number | null };
  /** Where the limits are taken as a straight line, V, and the law there. */
  private s = 0;
  private readonly law = { v: 0, slope: 1 };
  /** It has been from one limit to the other since it last settled; more than once would be to and fro. */
  private hasJumped = false;

  override read(values: PointValues): void {
    super.read(values);
    const figure = (name: string) => figureOf(this.model, name, values);
    const [low, high] = [figure("out_low"), figure("out_high")];
    const isUpsideDown = low !== null && high !== null && !(low < high);
    this.gain = isUpsideDown ? Number.NaN : (figure("gain") ?? Number.NaN);
    this.limits = { low, high };
  }

  start(): void {
    this.hasJumped = false;
    const { low, high } = this.limits;
    const inside = (low ?? -1) < 0 && (high ?? 1) > 0;
    this.s = inside ? 0 : low !== null && high !== null ? (low + high) / 2 : (low ?? high!);
  }

  settle(state: State): void {
    this.hasJumped = false;
    this.s = this.asked(state);
  }

  follow(state: State): boolean {
    const { s } = this;
    const target = this.asked(state);
    this.s = target;
    if (Math.abs(target - s) <= FREE * KNEE) return true;
    const next = limitStep(this.limits, s, target, !this.hasJumped);
    const { low, high } = this.limits;
    if (low !== null && high !== null && Math.min(s, next) < low && Math.max(s, next) > high)
      this.hasJumped = true;
    this.s = next;
    return next === target;
  }

  apart(state: State): number {
    return Math.abs(this.asked(state) - this.s) / KNEE;
  }

  override addConstantSlopes(jacobian: Float64Array): void {
    jacobian[this.places[0]]! += 1;
  }

  override addTo(state: State): void {
    this.addCurrents(state);
    const { branch, law, gain, s, places } = this;
    limited(this.limits, s, law);
    const weight = 1 / gain;
    state.residual[branch] = weight * (law.v + law.slope * (this.asked(state) - s) - this.behind(state));
    // Beyond a limit the inputs no longer count, however far apart they are.
    const inputs = Math.abs(across(state, this.plus, this.minus)) + Math.abs(this.offset * state.share);
    state.scale[branch] = law.slope * inputs + weight * (Math.abs(law.v) + this.around(state));
    const { jacobian } = state;
    const [, byPlus, byMinus, byOut, byCurrent] = places;
    jacobian[byPlus]! += law.slope;
    jacobian[byMinus]! -= law.slope;
    jacobian[byOut]! -= weight;
    jacobian[byCurrent]! += weight * this.ohms;
  }

  /** What the output would be without limits, V. */
  private asked(state: State): number {
    return this.gain * (across(state, this.plus, this.minus) + this.offset * state.share);
  }

  addDoubt(state: State, doubt: Float64Array): void {
    const { branch, law, gain, limits } = this;
    const inputs = Math.abs(state.x[this.plus]!) + Math.abs(state.x[this.minus]!) + Math.abs(this.offset);
    const knees = Math.abs(limits.low ?? 0) + Math.abs(limits.high ?? 0) + KNEE;
    const outputs = Math.abs(law.v) + this.around(state) + knees;
    doubt[branch]! += UNIT * (8 * law.slope * inputs + (16 * outputs) / gain);
  }

  /** |d ln L'/ds| ≤ 1/κ, since L' is a product of two logistic functions of opposite directions. */
  addSpread(_: State, radius: number, widths: Float64Array, at: number, spread: Float64Array): void {
    const { branch, law, gain } = this;
    const width = widths[at]!;
    const rise = expm1((gain * radius * width) / KNEE) + 64 * UNIT * (1 + Math.abs(this.s) / KNEE);
    spread[branch]! += law.slope * rise * width;
  }
}
