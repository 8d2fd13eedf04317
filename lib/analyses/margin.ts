import type { Relation, Typed } from "@/lib/language/ast";
import type { Rows, Selection } from "./rows";

/**
 * How far values are from breaking a requirement, in their unit: below 0 they break it, and at 0 too where the relation is strict.
 * NaN where something it needs is not known. Beside them what is compared with its limits, infinite on a side that has none; of
 * a trace that must rise or fall, its rise from the neighbour below.
 */
export interface Margins {
  readonly values: Float64Array;
  readonly isStrict: boolean;
  readonly compared: Float64Array;
  readonly low: Float64Array;
  readonly high: Float64Array;
}

/** The expressions that a relation brings. */
export function valuesOf(relation: Relation): readonly Typed[] {
  switch (relation.kind) {
    case "compare":
      return [relation.bound];
    case "within":
      return [relation.target, relation.half];
    case "between":
      return [relation.low, relation.high];
    default:
      return [];
  }
}

/** Margins of a row: at every place selected, or of a whole row where nothing in the requirement goes along it. */
export function marginsOf(
  value: Typed,
  relation: Relation,
  isTrace: boolean,
  rows: Rows,
  row: number,
  selection: Selection,
): Margins {
  const along = (typed: Typed) =>
    isTrace ? rows.trace(typed, row, selection) : Float64Array.of(rows.number(typed, row, selection));
  const found = along(value);
  const none = (sign: 1 | -1) => new Float64Array(found.length).fill(sign * Number.POSITIVE_INFINITY);
  switch (relation.kind) {
    case "compare": {
      const bound = along(relation.bound);
      const isUpper = relation.operator.startsWith("<");
      const isStrict = relation.operator.length === 1;
      const values = found.map((v, i) => (isUpper ? bound[i]! - v : v - bound[i]!));
      const limits = isUpper ? { low: none(-1), high: bound } : { low: bound, high: none(1) };
      return { values, isStrict, compared: found, ...limits };
    }
    case "within": {
      const target = along(relation.target);
      const half = along(relation.half);
      const width = half.map((one, i) => (relation.relative ? one * Math.abs(target[i]!) : one));
      const values = found.map((v, i) => width[i]! - Math.abs(v - target[i]!));
      const low = target.map((one, i) => one - width[i]!);
      const high = target.map((one, i) => one + width[i]!);
      return { values, isStrict: false, compared: found, low, high };
    }
    case "between": {
      const low = along(relation.low);
      const high = along(relation.high);
      const values = found.map((v, i) => Math.min(v - low[i]!, high[i]! - v));
      return { values, isStrict: false, compared: found, low, high };
    }
    default: {
      const sign = relation.kind === "rising" ? 1 : -1;
      const values = rises(found, selection, sign);
      const zero = new Float64Array(found.length);
      const limits = sign === 1 ? { low: zero, high: none(1) } : { low: none(-1), high: zero };
      return { values, isStrict: true, compared: values.map((rise) => sign * rise), ...limits };
    }
  }
}

/** The rise from the neighbour below on the knob to each point; infinite at the lowest. */
function rises(found: Float64Array, { course }: Selection, sign: 1 | -1): Float64Array {
  const values = new Float64Array(found.length).fill(Number.POSITIVE_INFINITY);
  course.rising.forEach((place, k) => {
    if (k > 0) values[place] = sign * (found[place]! - found[course.rising[k - 1]!]!);
    else if (Number.isNaN(found[place]!)) values[place] = Number.NaN;
  });
  return values;
}
