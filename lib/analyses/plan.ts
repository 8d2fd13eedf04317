import type { Circuit } from "@/lib/circuit/circuit";
import type { Design } from "@/lib/language/ast";
import { unitOf } from "@/lib/units/quantity";
import type { AxisDocument } from "./result";

/** What a run will compute: plain JSON, stored with the run. A netlist without a sweep has no axis and one point. */
export interface Plan {
  readonly title: string;
  /** The first sweep first; points are numbered with the first axis fastest, then the outer axes, then draws. */
  readonly axes: readonly AxisDocument[];
  /** Random draws of the tolerances; with the nominal one, draw 0, there is one more. */
  readonly draws: number;
  readonly points: number;
  /** Operating points looked for at each setting; absent where the text does not ask for several. */
  readonly seek?: number;
  readonly traces: readonly { readonly name: string; readonly unit: string }[];
  /** Net voltages (`out.v`), then branch currents (`V1.i`, `A1.out.i`), in the order of the circuit. */
  readonly unknowns: readonly { readonly name: string; readonly unit: "V" | "A" }[];
}

export function planOf(design: Design, circuit: Circuit): Plan {
  const axes = design.sweeps.map(({ knob, dimension, scale, values }) => {
    return { knob, unit: unitOf(dimension), scale, values };
  });
  const draws = design.draws?.count ?? 0;
  return {
    title: design.title,
    axes,
    draws,
    points: axes.reduce((product, axis) => product * axis.values.length, draws + 1),
    ...(design.seek === null ? {} : { seek: design.seek }),
    traces: design.shows.map(({ name, value }) => ({ name, unit: unitOf(value.dimension) })),
    unknowns: circuit.unknowns,
  };
}

/** An axis with more values than this is long. */
const LONG = 1000;

/** The plan as a page needs it before the results: of the values of a long axis the first and the last, and how many there are. */
export function outlineOf(plan: Plan): Plan {
  const axes = plan.axes.map((axis) => {
    const { values } = axis;
    return values.length <= LONG
      ? axis
      : { ...axis, values: [values[0]!, values.at(-1)!], count: values.length };
  });
  return { ...plan, axes };
}

/** How many values an axis has, that of an outline too. */
export function countOf({ values, count = values.length }: AxisDocument): number {
  return count;
}

/** The place of a flat point on every axis, the first axis first; those of an outline too. */
export function placeOnAxes(plan: Plan, point: number): number[] {
  let rest = point;
  return plan.axes.map((axis) => {
    const count = countOf(axis);
    const place = rest % count;
    rest = (rest - place) / count;
    return place;
  });
}

/** The draw of a flat point; 0 is nominal. */
export function drawOf({ points, draws }: Plan, point: number): number {
  return Math.floor(point / (points / (draws + 1)));
}

/** The sweeps of the first knob in which several operating points are looked for: one a setting of the outer knobs, without draws. */
export function soughtRows({ axes, seek }: Plan): number {
  if (seek === undefined) return 0;
  return axes.slice(1).reduce((product, { values }) => product * values.length, 1);
}

/** Points of one sweep of the first knob; 1 where nothing is swept. */
export function rowLength({ axes }: Pick<Plan, "axes">): number {
  return axes[0]?.values.length ?? 1;
}
