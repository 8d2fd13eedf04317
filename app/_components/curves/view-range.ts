import type { Ruler } from "./axes";
import type { CurveSet } from "./curve-set";
import { coherentValue } from "./figures-in-words";
import type { Range } from "./range";
import { valueAt } from "./scale";

/** A view as close as this share of the whole ruler is the closest. */
const CLOSEST = 1e-7;

/** A range of places moved by a share of its width, as far as the whole ruler reaches. */
export function panned({ range, whole }: Pick<Ruler, "range" | "whole">, share: number): Range {
  const width = range.to - range.from;
  const wanted = share * width;
  const by = Math.max(whole.from - range.from, Math.min(whole.to - range.to, wanted));
  return { from: range.from + by, to: range.to + by };
}

/** A range `factor` times as wide, about a place that stays where it is in view; never wider than the whole ruler. */
export function stretched(
  { range, whole }: Pick<Ruler, "range" | "whole">,
  factor: number,
  about: number = (range.from + range.to) / 2,
): Range {
  const all = whole.to - whole.from;
  const width = Math.min(all, Math.max(CLOSEST * all, factor * (range.to - range.from)));
  const share = (about - range.from) / (range.to - range.from);
  const from = Math.max(whole.from, Math.min(whole.to - width, about - share * width));
  return { from, to: from + width };
}

/**
 * A range of places as values of the knob, in as few digits as keep its ends to a thousandth of its width, since they stand in
 * addresses and fields. Null for the whole ruler.
 */
export function valuesOf(set: CurveSet, { mapping, whole }: Ruler, { from, to }: Range): Range | null {
  const all = whole.to - whole.from;
  if (to - from >= all * (1 - 1e-9)) return null;
  const ends = [from, to].map((place) => coherentValue(set.axis, valueAt(mapping, place)));
  const width = Math.abs(ends[1]! - ends[0]!);
  const [low, high] = ends.map((value) => {
    const digits = value === 0 ? 5 : Math.ceil(Math.log10(Math.abs(value) / width)) + 4;
    return Number(value.toPrecision(Math.min(15, Math.max(5, digits))));
  });
  return { from: low!, to: high! };
}
