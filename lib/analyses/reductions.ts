import type { ReductionName } from "@/lib/language/ast";
import { log10, power } from "@/lib/units/elementary";
import { LineFit } from "./line";

/** The first knob over the points that a reduction goes along. */
export class Course {
  private readonly fits = new Map<"decades" | "units", LineFit>();
  /** Places in the order of a rising knob. */
  readonly rising: readonly number[];

  /** `knob`: its values, coherent SI; empty where nothing is swept. `isLogarithmic`: it is swept per decade. */
  constructor(
    readonly knob: Float64Array,
    readonly isLogarithmic: boolean,
  ) {
    this.rising = [...knob.keys()].sort((a, b) => knob[a]! - knob[b]!);
  }

  fit(over: "decades" | "units"): LineFit {
    const known = this.fits.get(over);
    if (known !== undefined) return known;
    const made = new LineFit(over === "units" ? this.knob : this.knob.map((value) => log10(Math.abs(value))));
    this.fits.set(over, made);
    return made;
  }

  /** The line over the knob as it is swept. */
  get own(): LineFit {
    return this.fit(this.isLogarithmic ? "decades" : "units");
  }
}

/** Reductions of one trace to one number. */
type Single = Exclude<ReductionName, "deviation" | "error_from" | "at" | "reach">;

/** A reduction of `ys`, one value a point of its course; NaN where any of them is no number. For `decades_where` a value is 1 or 0. */
export function reduce(name: Single, ys: Float64Array, course: Course): number {
  if (ys.length === 0 || !ys.every(Number.isFinite)) return Number.NaN;
  switch (name) {
    case "highest":
      return extreme(ys, 1);
    case "lowest":
      return extreme(ys, -1);
    case "mean":
      return ys.reduce((sum, y) => sum + y, 0) / ys.length;
    case "span":
      return extreme(ys, 1) - extreme(ys, -1);
    case "per_decade":
      return course.fit("decades").line(ys).slope;
    case "per_unit":
      return course.fit("units").line(ys).slope;
    case "intercept":
      return course.own.line(ys).height;
    case "decades_where":
      return widestRun(ys, course);
  }
}

function extreme(ys: Float64Array, sign: 1 | -1): number {
  return ys.reduce((best, y) => (sign * y > sign * best ? y : best));
}

/**
 * The knob value at which `ys` comes to `level` first, from the knob's low end, between two points by a straight line over the knob
 * as it is swept. NaN where it does not, or where a value before is no number.
 */
export function reach(ys: Float64Array, level: number, { knob, rising, isLogarithmic }: Course): number {
  for (let k = 0; k < rising.length; k++) {
    const place = rising[k]!;
    const above = ys[place]! - level;
    if (Number.isNaN(above)) return Number.NaN;
    if (above === 0) return knob[place]!;
    if (k === 0) continue;
    const before = rising[k - 1]!;
    const below = ys[before]! - level;
    if (above > 0 === below > 0) continue;
    const share = below / (below - above);
    const [a, b] = [knob[before]!, knob[place]!];
    return isLogarithmic ? a * power(b / a, share) : a + share * (b - a);
  }
  return Number.NaN;
}

/** The widest run of neighbouring points where `holds` is not 0, in decades of the knob from the first of them to the last. */
function widestRun(holds: Float64Array, { knob, rising }: Course): number {
  let widest = 0;
  let from: number | null = null;
  for (const place of rising) {
    if (holds[place] === 0) {
      from = null;
      continue;
    }
    from ??= knob[place]!;
    widest = Math.max(widest, Math.abs(log10(knob[place]! / from)));
  }
  return widest;
}
