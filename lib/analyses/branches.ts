import { System } from "@/lib/circuit/system";
import { evaluate } from "@/lib/language/evaluate";
import { Curve } from "@/lib/solver/curve";
import { type OperatingPoint, Seeker } from "@/lib/solver/seek";
import type { Job } from "./compile";
import { KnobCurve } from "./knob-curve";
import { placeOnAxes } from "./plan";
import { scopeOf } from "./walk";

/** An operating point with the values of the shown traces there. */
export interface BranchPoint extends OperatingPoint {
  readonly traces: readonly number[];
}

/** Neighbouring operating points along the first axis, from fold to fold: one a value of the axis, null where the branch does not reach. */
export interface Branch {
  readonly points: readonly (BranchPoint | null)[];
}

/** Where a branch turns back and goes over into another: beyond this value of the knob neither is left. */
export interface Fold {
  readonly value: number;
  readonly traces: readonly number[];
  /** V, A: the unknowns there. */
  readonly x: Float64Array;
}

export interface Branches {
  /** In the order of the first point of each, then of its voltages. */
  readonly branches: readonly Branch[];
  readonly folds: readonly Fold[];
  /** Whether the indices of the points at every value of the axis add up to 1, as those of all points do. */
  readonly isComplete: boolean;
}

/** Values of the first axis at which all operating points are looked for; between them curves are followed. */
const SETTINGS = 9;
/** Further values at which it is looked again, where the indices do not add up after that. */
const REPAIRS = 9;
const LONGEST = 0.5;
const FIRST_STEP = 0.05;
const GROWTH = 1.6;
const MOST_STRIDES = 4000;
const FOLD_STEPS = 30;
const FLAT = 1e-9;
/** Beyond the ends of the axis, in its twentieths, a curve is left. */
const MARGIN = 1e-9;

/**
 * The operating points of one row of a plan, whose first flat point is `from`, as branches over the first axis: at nine settings
 * all are looked for, and from each a curve is followed by its arclength up and down, through its folds, until it leaves the axis
 * or closes; where the indices then do not add up, more are looked for. A plan without an axis has branches of one point.
 */
export function branchesOf(job: Job, from = 0): Branches {
  return new Follower(job, from).follow();
}

class Follower {
  private readonly system: System;
  private readonly seeker: Seeker;
  private readonly curved: KnobCurve | null;
  private readonly values: readonly number[];
  /** The values as parameters of the curve. */
  private readonly parameters: readonly number[];
  /** What is found at each value of the axis. */
  private readonly found: BranchPoint[][];
  private readonly branches: (BranchPoint | null)[][] = [];
  private readonly folds: Fold[] = [];

  constructor(
    private readonly job: Job,
    from: number,
  ) {
    const { design, circuit, plan } = job;
    this.system = new System(design, circuit);
    placeOnAxes(plan, from).forEach((place, axis) => {
      this.system.turn(plan.axes[axis]!.knob, plan.axes[axis]!.values[place]!);
    });
    this.seeker = new Seeker(this.system);
    const axis = plan.axes[0];
    this.values = axis?.values ?? [Number.NaN];
    this.curved = axis === undefined || axis.values.length < 2 ? null : new KnobCurve(this.system, axis);
    this.parameters = this.values.map((value) => this.curved?.toParameter(value) ?? 0);
    this.found = this.values.map(() => []);
  }

  follow(): Branches {
    const last = this.values.length - 1;
    const settings = new Set(
      Array.from({ length: SETTINGS }, (_, k) => Math.round((k * last) / (SETTINGS - 1))),
    );
    for (const k of settings) this.seekAt(k);
    for (let n = 0; n < REPAIRS; n++) {
      const k = this.found.findIndex((_, place) => !settings.has(place) && !this.addsUp(place));
      if (k < 0) break;
      settings.add(k);
      this.seekAt(k);
    }
    const first = (branch: readonly (BranchPoint | null)[]) => branch.findIndex((point) => point !== null);
    const branches = this.branches
      .filter((branch) => first(branch) >= 0)
      .sort((a, b) => first(a) - first(b) || order(a[first(a)]!, b[first(b)]!));
    return {
      branches: branches.map((points) => ({ points })),
      folds: this.folds,
      isComplete: this.found.every((_, k) => this.addsUp(k)),
    };
  }

  private seekAt(k: number): void {
    this.turn(k);
    for (const point of this.seeker.seek(this.job.design.seek ?? 1, this.found[k]).points) {
      if (!this.isKnown(k, point)) this.trace(k, point);
    }
  }

  private addsUp(k: number): boolean {
    return this.found[k]!.reduce((sum, { index }) => sum + index, 0) === 1;
  }

  private turn(k: number): void {
    if (this.curved !== null) this.system.turn(this.job.plan.axes[0]!.knob, this.values[k]!);
  }

  private isKnown(k: number, point: OperatingPoint): boolean {
    return this.found[k]!.some((known) => this.seeker.isSame(known, point));
  }

  /** Follows the curve through a new point both ways. */
  private trace(k: number, point: OperatingPoint): void {
    const start = this.branch();
    this.keep(start, k, point);
    if (this.curved === null) return;
    for (const sense of [1, -1] as const) {
      this.turn(k);
      this.put(point.x);
      const curve = new Curve(this.system, this.curved, this.parameters[k]!, sense);
      if (this.run(curve, start, k)) return;
    }
  }

  /** Follows a curve; true where it came back to where it began. */
  private run(curve: Curve, start: (BranchPoint | null)[], from: number): boolean {
    const { curved, system } = this;
    const { state } = system;
    let branch = start;
    let length = FIRST_STEP;
    for (let n = 0; n < MOST_STRIDES; n++) {
      const [before, parameter, rise] = [state.x.slice(), curve.parameter, curve.rise];
      const gone = curve.stride(length);
      if (gone === 0) return false;
      length = Math.min(LONGEST, gone * GROWTH);
      if (Math.sign(rise) !== Math.sign(curve.rise)) {
        // Values between the last point and the fold belong to the branch that ends, those after it to the next.
        const whole = this.fold(curve, gone, rise);
        if (!this.cross(branch, before, parameter, curve, from)) return true;
        this.folds.push(this.here(curve));
        branch = this.branch();
        curve.go(whole);
        continue;
      }
      if (!this.cross(branch, before, parameter, curve, from)) return true;
      if (curve.parameter > curved!.most + MARGIN || curve.parameter < curved!.least - MARGIN) return false;
    }
    return false;
  }

  /** Brings a curve that has just passed a fold to it; the length that then leads away from it. */
  private fold(curve: Curve, gone: number, riseBefore: number): number {
    let [at, riseAt, other, riseOther] = [gone, curve.rise, 0, riseBefore];
    for (let n = 0; n < FOLD_STEPS && Math.abs(riseAt) > FLAT; n++) {
      const wanted = at - (riseAt * (at - other)) / (riseAt - riseOther);
      if (!Number.isFinite(wanted) || !curve.go(wanted - at)) break;
      [other, riseOther] = [at, riseAt];
      [at, riseAt] = [wanted, curve.rise];
    }
    return Math.max(gone / 16, 1e-4);
  }

  /** Solves at the axis's values between the last point of a curve and this one; false where it is back at its beginning. */
  private cross(
    branch: (BranchPoint | null)[],
    before: Float64Array,
    parameter: number,
    curve: Curve,
    from: number,
  ): boolean {
    const { state } = this.system;
    const after = state.x.slice();
    const [low, high] = [Math.min(parameter, curve.parameter), Math.max(parameter, curve.parameter)];
    let isOpen = true;
    for (let k = 0; k < this.parameters.length; k++) {
      const at = this.parameters[k]!;
      if (at < low - MARGIN || at > high + MARGIN || branch[k] !== null || high === low) continue;
      const share = (at - parameter) / (curve.parameter - parameter);
      this.turn(k);
      this.put(after.map((x, j) => before[j]! + share * (x - before[j]!)));
      const point = this.seeker.arrive();
      if (point === null) continue;
      if (!this.isKnown(k, point)) this.keep(branch, k, point);
      else if (k === from) isOpen = false;
    }
    state.x.set(after);
    state.low.fill(0);
    return isOpen;
  }

  private here(curve: Curve): Fold {
    const value = this.curved!.toValue(curve.parameter);
    this.system.turn(this.job.plan.axes[0]!.knob, value);
    return { value, traces: this.traces(), x: this.system.state.x.slice(0, -1) };
  }

  private branch(): (BranchPoint | null)[] {
    const branch = this.values.map(() => null);
    this.branches.push(branch);
    return branch;
  }

  private keep(branch: (BranchPoint | null)[], k: number, point: OperatingPoint): void {
    this.put(point.x);
    const kept = { ...point, traces: this.traces() };
    branch[k] = kept;
    this.found[k]!.push(kept);
  }

  private traces(): number[] {
    const scope = scopeOf(this.system);
    return this.job.design.shows.map(({ value }) => evaluate(value, scope));
  }

  private put(x: Float64Array): void {
    this.system.state.x.set(x.length > this.system.circuit.size ? x.subarray(0, -1) : x);
    this.system.state.low.fill(0);
  }
}

function order(a: BranchPoint, b: BranchPoint): number {
  for (let j = 0; j < a.x.length; j++) if (a.x[j] !== b.x[j]) return a.x[j]! - b.x[j]!;
  return 0;
}
