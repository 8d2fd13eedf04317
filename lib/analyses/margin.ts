import type { Relation, Typed } from "@/lib/language/ast";
import type { Rows, Selection } from "./rows";

/**
 * How far a value is from breaking a requirement, in the value's unit: below 0 it breaks it, and at 0 too where the relation is
 * strict. NaN where something it needs is not known.
 */
export interface Margins {
  readonly values: Float64Array;
  readonly isStrict: boolean;
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
  switch (relation.kind) {
    case "compare": {
      const bound = along(relation.bound);
      const isUpper = relation.operator.startsWith("<");
      const isStrict = relation.operator.length === 1;
      return { values: found.map((v, i) => (isUpper ? bound[i]! - v : v - bound[i]!)), isStrict };
    }
    case "within": {
      const target = along(relation.target);
      const half = along(relation.half);
      const width = (i: number) => (relation.relative ? half[i]! * Math.abs(target[i]!) : half[i]!);
      return { values: found.map((v, i) => width(i) - Math.abs(v - target[i]!)), isStrict: false };
    }
    case "between": {
      const low = along(relation.low);
      const high = along(relation.high);
      return { values: found.map((v, i) => Math.min(v - low[i]!, high[i]! - v)), isStrict: false };
    }
    default:
      return { values: rises(found, selection, relation.kind === "rising" ? 1 : -1), isStrict: true };
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
