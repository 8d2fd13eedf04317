import { columnFrom } from "./columns";
import type { CurveSet } from "./curve-set";
import { bandOf } from "./draw-bands";
import type { Band } from "./storey-views";

/** The bands of the draws of the traces named, by the key of a line, counted at once; none without draws. */
export function figureBands(set: CurveSet, traces: readonly string[]): ReadonlyMap<string, Band> {
  const bands = new Map<string, Band>();
  if (set.draws === 0) return bands;
  const drawn = { length: set.x.length, families: set.families.length, draws: set.draws };
  for (const { name, values } of set.traces) {
    if (!traces.includes(name) || values.length === 0) continue;
    const { low, high } = bandOf(columnFrom(values), drawn);
    for (const { index } of set.families) {
      bands.set(`${name} ${index}`, { low: ordered(set, low, index), high: ordered(set, high, index) });
    }
  }
  return bands;
}

/** A setting's part of a flat column, in the order of `x`. */
export function ordered(
  { order, isAscending, x }: CurveSet,
  flat: Float64Array,
  family: number,
): Float64Array {
  const from = family * x.length;
  if (isAscending) return flat.subarray(from, from + x.length);
  return Float64Array.from(order, (index) => flat[from + index]!);
}
