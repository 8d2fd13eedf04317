import { PointValues } from "@/lib/circuit/values";
import type { Reduced, Typed, Window } from "@/lib/language/ast";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { isInWindow, placesWithin } from "@/lib/language/window";
import type { BranchesDocument } from "./branches-document";
import type { Job } from "./compile";
import { drawOf, placeOnAxes } from "./plan";
import { Course, reach, reduce } from "./reductions";
import type { PointRange } from "./strands";

/** What a contract is judged by. */
export type Contract = Pick<Job, "design" | "plan">;

/** The columns of a run that a contract is judged on: one a trace, in the order of the plan, one value a point, NaN where there is none. */
export interface Columns {
  readonly traces: readonly Float64Array[];
  /** Where the text seeks several operating points: the branches, one document a row, null where a row is not in yet. */
  readonly branches?: readonly (BranchesDocument | null)[] | null;
  /** Flat points that are solved and not stable. */
  readonly unstable?: readonly PointRange[];
}

/** A reading over a whole run: one value a row, or one a point where it is a trace itself. NaN where it is not known. */
export interface ReadColumn {
  readonly isTrace: boolean;
  readonly values: Float64Array;
}

/** The places of the first knob that windows leave, and the knob's values there. */
export interface Selection {
  readonly places: readonly number[];
  readonly course: Course;
}

/**
 * Works out the expressions of a contract over the columns of a run. A row is one sweep of the first knob; rows are numbered with
 * the outer axes and then the draws. Knobs and lets are nominal.
 */
export class Rows implements Scope {
  /** Points of a row; 1 where nothing is swept. */
  readonly length: number;
  readonly count: number;
  readonly readings = new Map<string, ReadColumn>();
  private readonly values: PointValues;
  private readonly columns: ReadonlyMap<string, Float64Array>;
  private selection: Selection = { places: [0], course: new Course(new Float64Array(), false) };
  private row = 0;
  /** Index of a place among those selected. */
  private at = 0;
  /** Reductions worked out for the present row and selection. */
  private reductions = new Map<Reduced, number | Float64Array>();

  constructor(
    private readonly contract: Contract,
    { traces }: Columns,
  ) {
    const { design, plan } = contract;
    this.values = new PointValues(design);
    this.columns = new Map(plan.traces.map(({ name }, i) => [name, traces[i]!]));
    this.length = plan.axes[0]?.values.length ?? 1;
    this.count = plan.points / this.length;
  }

  /** The draw of a row; 0 is nominal. */
  drawOf(row: number): number {
    return drawOf(this.contract.plan, row * this.length);
  }

  select(windows: readonly Window[]): Selection {
    const first = this.contract.plan.axes[0];
    if (first === undefined) return { places: [0], course: new Course(new Float64Array(), false) };
    const places = placesWithin(first, windows);
    const knob = Float64Array.from(places, (place) => first.values[place]!);
    return { places, course: new Course(knob, first.scale === "logarithmic") };
  }

  /** Whether a row lies in the windows of the outer knobs. */
  isWithin(row: number, windows: readonly Window[]): boolean {
    const { axes } = this.contract.plan;
    if (windows.length === 0 || axes.length < 2) return true;
    const places = placeOnAxes(this.contract.plan, row * this.length);
    return windows.every((window) => {
      const axis = axes.findIndex(({ knob }) => knob === window.knob);
      return axis < 1 || isInWindow(window, axes[axis]!.values[places[axis]!]!);
    });
  }

  /** An expression at every place selected in a row. */
  trace(typed: Typed, row: number, selection: Selection): Float64Array {
    this.stand(row, selection);
    return this.along(typed);
  }

  /** An expression that has one value in a row. */
  number(typed: Typed, row: number, selection: Selection): number {
    this.stand(row, selection);
    return selection.places.length === 0 ? Number.NaN : evaluate(typed, this);
  }

  private stand(row: number, selection: Selection): void {
    const isNew = row !== this.row || selection !== this.selection;
    if (isNew && this.reductions.size > 0) this.reductions = new Map();
    this.row = row;
    this.selection = selection;
    this.at = 0;
  }

  private get point(): number {
    return this.row * this.length + (this.selection.places[this.at] ?? 0);
  }

  private along(typed: Typed): Float64Array {
    const before = this.at;
    const values = Float64Array.from(this.selection.places, (_, at) => {
      this.at = at;
      return evaluate(typed, this);
    });
    this.at = before;
    return values;
  }

  knob(name: string): number {
    return this.turned().knob(name);
  }

  let(name: string): number {
    return this.turned().let(name);
  }

  signal(): number {
    return Number.NaN;
  }

  get thermalVoltage(): number {
    return this.turned().thermalVoltage;
  }

  private turned(): PointValues {
    const { plan } = this.contract;
    placeOnAxes(plan, this.point).forEach((place, axis) => {
      const { knob, values } = plan.axes[axis]!;
      this.values.turn(knob, values[place]!);
    });
    return this.values;
  }

  reduced(reduced: Reduced): number {
    if (reduced.op === "reduce") return this.reducedHere(reduced);
    if (reduced.op === "trace") return this.columns.get(reduced.name)?.[this.point] ?? Number.NaN;
    const column = this.readings.get(reduced.name);
    return column?.values[column.isTrace ? this.point : this.row] ?? Number.NaN;
  }

  private reducedHere(reduced: Extract<Reduced, { op: "reduce" }>): number {
    let value = this.reductions.get(reduced);
    if (value === undefined) {
      value = this.reduction(reduced);
      this.reductions.set(reduced, value);
    }
    return typeof value === "number" ? value : value[this.at]!;
  }

  private reduction({ reduction, args, at }: Extract<Reduced, { op: "reduce" }>): number | Float64Array {
    const { course } = this.selection;
    const [first, second] = args as [Typed, Typed?];
    switch (reduction) {
      case "deviation":
        return course.own.deviations(this.along(first));
      case "error_from": {
        const ideal = this.along(second!);
        return this.along(first).map((value, i) => value - ideal[i]!);
      }
      case "reach":
        return reach(this.along(first), evaluate(second!, this), course);
      case "at":
        return this.elsewhere(first, at!);
      default:
        return reduce(reduction, this.along(first), course);
    }
  }

  /** An expression where a knob has another value: one number for the first knob, and along the selection for an outer one. */
  private elsewhere(typed: Typed, { knob, value }: { knob: string; value: number }): number | Float64Array {
    const { plan } = this.contract;
    const axis = plan.axes.findIndex((one) => one.knob === knob);
    if (axis === -1) return this.along(typed);
    const place = plan.axes[axis]!.values.findIndex((one) => isInWindow({ low: value, high: value }, one));
    if (place === -1) return Number.NaN;
    const { row, at, selection, reductions } = this;
    let found: number | Float64Array;
    if (axis === 0) {
      this.at = selection.places.indexOf(place);
      if (this.at === -1) this.standAlone(place);
      found = evaluate(typed, this);
    } else {
      this.reductions = new Map();
      const stride = plan.axes.slice(1, axis).reduce((product, { values }) => product * values.length, 1);
      const now = Math.floor(row / stride) % plan.axes[axis]!.values.length;
      this.row = row + (place - now) * stride;
      found = this.along(typed);
    }
    Object.assign(this, { row, at, selection, reductions });
    return found;
  }

  /** At a place that the windows leave out. */
  private standAlone(place: number): void {
    const { values, scale } = this.contract.plan.axes[0]!;
    const course = new Course(Float64Array.of(values[place]!), scale === "logarithmic");
    this.selection = { places: [place], course };
    this.reductions = new Map();
    this.at = 0;
  }
}
