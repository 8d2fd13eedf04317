import { valueIn } from "./columns";
import { placeOf } from "./scale";
import type { StoreyView } from "./storey-views";

/** Px from the top of a storey to a value on it; null where the axis does not hold it. */
export function downIn({ axis, height }: Pick<StoreyView, "axis" | "height">, value: number): number | null {
  const place = placeOf(axis.mapping, value);
  if (place === null) return null;
  return (height * (axis.range.to - place)) / (axis.range.to - axis.range.from);
}

/** The setting whose line passes nearest to a height (px from the top of the first storey) at a place; null where none is solved. */
export function nearestLine(storeys: readonly StoreyView[], place: number, top: number): number | null {
  let best: { family: number; distance: number } | null = null;
  let offset = 0;
  for (const storey of storeys) {
    const inside = top >= offset && top <= offset + storey.height;
    for (const line of inside ? storey.lines : []) {
      const value = valueIn(line.values, place);
      const down = value === null ? null : downIn(storey, value);
      if (down === null) continue;
      const distance = Math.abs(offset + down - top);
      if (best === null || distance < best.distance) best = { family: line.family, distance };
    }
    offset += storey.height + STOREY_GAP;
  }
  return best?.family ?? null;
}

/** Px between two storeys. */
export const STOREY_GAP = 20;
