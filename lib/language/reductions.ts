import type { ReductionName } from "./ast";

/**
 * What a reduction takes and gives. `values` are the arguments before a binding; `bound` says that `KNOB = value` follows them.
 * "sweep": one number per sweep of the first knob; "point": one a point. `line` asks for two points, on a best straight line
 * or to go from one to the other; `decades` asks for a knob of one sign.
 */
export interface ReductionShape {
  readonly values: 1 | 2;
  readonly bound: boolean;
  readonly gives: "sweep" | "point";
  readonly line: boolean;
  readonly decades: boolean;
  /** One line for the reference and the hover. */
  readonly about: string;
}

function shape(
  about: string,
  { values = 1, bound = false, gives = "sweep", line = false, decades = false }: Partial<ReductionShape> = {},
): ReductionShape {
  return { values, bound, gives, line, decades, about };
}

export const REDUCTIONS: Readonly<Record<ReductionName, ReductionShape>> = {
  highest: shape("the highest value of a trace"),
  lowest: shape("the lowest value of a trace"),
  mean: shape("the mean of a trace over the points of the sweep"),
  span: shape("highest less lowest value of a trace"),
  per_decade: shape("slope of the best straight line over the decades of the first knob", {
    line: true,
    decades: true,
  }),
  per_unit: shape("slope of the best straight line over the first knob", { line: true }),
  intercept: shape(
    "value of the best straight line where the first knob is 0, or 1 in its coherent unit where it is swept per decade",
    { line: true },
  ),
  deviation: shape("a trace less its best straight line, over decades where the first knob is swept so", {
    gives: "point",
    line: true,
  }),
  error_from: shape("a trace less what it should be", { values: 2, gives: "point" }),
  reach: shape("the value of the first knob at which a trace comes to a level first, from the low end", {
    values: 2,
    line: true,
  }),
  decades_where: shape("the widest run of the first knob, in decades, over which a comparison holds", {
    decades: true,
  }),
  at: shape("the value where a knob has the value given", { bound: true }),
};

export function isReductionName(name: string): name is ReductionName {
  return Object.hasOwn(REDUCTIONS, name);
}
