import type { Design, Knob, Typed, Window } from "@/lib/language/ast";
import { isInWindow } from "@/lib/language/window";
import type { Job } from "./compile";
import type { Plan } from "./plan";
import type { AxisDocument } from "./result";

/** One row of a run, nominal: the first sweep at one setting of the outer ones, with knobs turned by hand. */
export interface Excerpt {
  /** The whole run with its knobs turned; the row is solved as a part of it, and so to the same bytes. */
  readonly job: Job;
  /** Flat points [from, to) of `job`. */
  readonly from: number;
  readonly to: number;
  /** The row by itself: every outer axis has one value, and there are no draws. */
  readonly plan: Plan;
  /** What the row is judged by: requirements of a share of the draws are those of the nominal one. */
  readonly design: Design;
}

/**
 * The row of a job at the settings that `turned` gives, in coherent SI by knob: the default of a knob that is not swept, the setting
 * of an outer one. An outer sweep that is not set stands at the value nearest to its knob's default; one set to a value that
 * it does not have has that one instead. The first sweep is left as it is.
 */
export function excerptOf({ design, circuit, plan }: Job, turned: ReadonlyMap<string, number>): Excerpt {
  const knobs = design.knobs.map((knob) => {
    const value = turned.get(knob.name);
    return value === undefined ? knob : { ...knob, value: constant(knob.value, value) };
  });
  const axes: AxisDocument[] = [];
  const places: number[] = [];
  plan.axes.forEach((axis, index) => {
    const value = turned.get(axis.knob);
    const place =
      index === 0 ? 0 : value === undefined ? usualPlace(axis, design.knobs) : placeOf(axis, value);
    axes.push(place === -1 ? { ...axis, values: [value!] } : axis);
    places.push(Math.max(0, place));
  });
  const points = axes.reduce((product, { values }) => product * values.length, plan.draws + 1);
  const length = axes[0]?.values.length ?? 1;
  let from = 0;
  for (let axis = axes.length - 1; axis > 0; axis--) from = from * axes[axis]!.values.length + places[axis]!;
  from *= length;
  return {
    job: { design: { ...design, knobs }, circuit, plan: { ...plan, axes, points } },
    from,
    to: from + length,
    plan: {
      ...plan,
      axes: axes.map((axis, i) => (i === 0 ? axis : { ...axis, values: [axis.values[places[i]!]!] })),
      draws: 0,
      points: length,
    },
    design: {
      ...design,
      knobs,
      draws: null,
      requirements: design.requirements.map((one) => ({ ...one, share: null })),
    },
  };
}

/** The row with some of its places alone: a coarser one. They are solved each from the one before, in one go. */
export function thinned({ job, plan, design }: Excerpt, places: readonly number[]): Excerpt {
  const axes = plan.axes.map((axis, i) =>
    i === 0 ? { ...axis, values: places.map((place) => axis.values[place]!) } : axis,
  );
  const thin = { ...plan, axes, points: places.length };
  return { job: { ...job, plan: thin }, from: 0, to: places.length, plan: thin, design };
}

/** About `count` places of a row: its ends, and evenly between; and those at the ends of the windows that its contract has. */
export function coarsePlaces({ plan, design }: Excerpt, count: number): number[] {
  const [axis] = plan.axes;
  const last = plan.points - 1;
  const places = new Set([0, last]);
  for (let k = 1; k < count - 1; k++) places.add(Math.round((k * last) / (count - 1)));
  if (axis !== undefined) {
    for (const { knob, low, high } of windowsOf(design)) {
      if (knob !== axis.knob) continue;
      const inside = (value: number) => isInWindow({ low, high }, value);
      places.add(Math.max(0, axis.values.findIndex(inside)));
      places.add(Math.max(0, axis.values.findLastIndex(inside)));
    }
  }
  return [...places].sort((a, b) => a - b);
}

function windowsOf({ reads, requirements }: Design): Pick<Window, "knob" | "low" | "high">[] {
  return [...reads, ...requirements].flatMap(({ windows, value }) => [...windows, ...pointsNamed(value)]);
}

/** The settings that `at(trace, KNOB = value)` names in an expression. */
function pointsNamed(typed: Typed): Pick<Window, "knob" | "low" | "high">[] {
  switch (typed.op) {
    case "reduce": {
      const inside = typed.args.flatMap(pointsNamed);
      return typed.at === null
        ? inside
        : [...inside, { knob: typed.at.knob, low: typed.at.value, high: typed.at.value }];
    }
    case "call":
      return typed.args.flatMap(pointsNamed);
    case "negate":
      return pointsNamed(typed.operand);
    default:
      return "left" in typed ? [...pointsNamed(typed.left), ...pointsNamed(typed.right)] : [];
  }
}

/** What the contract says of other settings than the row's, by name: readings, and requirements by their place. */
export function elsewhereIn({ plan, design }: Excerpt): {
  readonly readings: ReadonlySet<string>;
  readonly requirements: ReadonlySet<number>;
} {
  const outer = new Map(plan.axes.slice(1).map(({ knob, values }) => [knob, values[0]!]));
  const leads = ({ knob, low, high }: Pick<Window, "knob" | "low" | "high">) =>
    outer.has(knob) && !isInWindow({ low, high }, outer.get(knob)!);
  const readings = new Set<string>();
  const isElsewhere = ({ value, windows }: { readonly value: Typed; readonly windows: readonly Window[] }) =>
    [...windows, ...pointsNamed(value)].some(leads) || readingsIn(value).some((name) => readings.has(name));
  for (const reading of design.reads) if (isElsewhere(reading)) readings.add(reading.name);
  const requirements = new Set<number>();
  design.requirements.forEach((one, index) => {
    if (isElsewhere(one)) requirements.add(index);
  });
  return { readings, requirements };
}

function readingsIn(typed: Typed): string[] {
  if (typed.op === "reading") return [typed.name];
  if (typed.op === "negate") return readingsIn(typed.operand);
  if (typed.op === "call" || typed.op === "reduce") return typed.args.flatMap(readingsIn);
  return "left" in typed ? [...readingsIn(typed.left), ...readingsIn(typed.right)] : [];
}

/** The place on an outer axis of its knob's default, or of the value next to it. */
function usualPlace({ knob, values }: AxisDocument, knobs: readonly Knob[]): number {
  const value = knobs.find(({ name }) => name === knob)?.value;
  const wanted = value?.op === "constant" ? value.value : Number.NaN;
  let best = 0;
  values.forEach((one, place) => {
    if (Math.abs(one - wanted) < Math.abs(values[best]! - wanted)) best = place;
  });
  return best;
}

function placeOf({ values }: AxisDocument, value: number): number {
  return values.findIndex((one) => isInWindow({ low: value, high: value }, one));
}

function constant(typed: Typed, value: number): Typed {
  return { op: "constant", value, dimension: typed.dimension };
}
