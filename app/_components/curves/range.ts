import { endsIn } from "./pyramid";
import { type Mapping, placeOf } from "./scale";
import { niceStep } from "./ticks";

/** From and to, in places along an axis; `from` below `to`. */
export interface Range {
  readonly from: number;
  readonly to: number;
}

/** Lowest and highest value among the points [from, to) of columns; null when there is none. */
export function valuesBetween(
  columns: Iterable<Float64Array>,
  from = 0,
  to = Number.POSITIVE_INFINITY,
): { readonly low: number; readonly high: number } | null {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const column of columns) {
    const ends = endsIn(column, from, Math.min(to, column.length));
    if (ends === null) continue;
    low = Math.min(low, column[ends.low]!);
    high = Math.max(high, column[ends.high]!);
  }
  return low <= high ? { low, high } : null;
}

/** The places of a span of values; null where the axis cannot hold it. */
export function placesOfValues(
  found: { readonly low: number; readonly high: number } | null,
  mapping: Mapping,
): Range | null {
  if (found === null) return null;
  const from = placeOf(mapping, found.low);
  const to = placeOf(mapping, found.high);
  return from === null || to === null ? null : { from, to };
}

/**
 * The range of a vertical axis that shows `found` whole and ends on a tick: whole steps on a linear axis, whole decades on a
 * logarithmic one that reaches over more than one. Values that differ by less than rounding stand in the middle of a band.
 */
export function verticalRange(found: Range | null, mapping: Mapping): Range {
  if (found === null) return { from: 0, to: 1 };
  const { from, to } = found;
  const size = Math.max(Math.abs(from), Math.abs(to));
  if (to - from <= 1e-12 * size || to === from) {
    const half = mapping.scale === "logarithmic" ? 0.5 : size === 0 ? 1 : 0.1 * size;
    return { from: from - half, to: to + half };
  }
  if (mapping.scale === "logarithmic" && to - from < 1) {
    const room = 0.06 * (to - from);
    return { from: from - room, to: to + room };
  }
  const step = mapping.scale === "logarithmic" ? 1 : niceStep(to - from, 5);
  return { from: step * Math.floor(from / step + 1e-9), to: step * Math.ceil(to / step - 1e-9) };
}

/** The part of `whole` that `wanted` names; the whole where they do not meet or too little would be left to see. */
export function zoomed(whole: Range, wanted: Range | null): Range {
  if (wanted === null) return whole;
  const from = Math.max(whole.from, wanted.from);
  const to = Math.min(whole.to, wanted.to);
  return to - from > 1e-9 * (whole.to - whole.from) ? { from, to } : whole;
}
