import type { Axis } from "./axes";
import { placeLabels } from "./label-places";
import { inView } from "./line-path";
import { placeOf } from "./scale";
import type { StoreyView } from "./storey-views";
import type { Line } from "./storeys";

/** Px between the middles of two labels. */
const GAP = 15;
/** Px from the edge of a storey to the middle of its outermost label, so that storeys keep their labels apart. */
const EDGE = 5;

/** The lines of a storey that are named at their ends, and where, px from its top; moved apart where they would touch. */
export function lineEnds(
  storey: StoreyView,
  horizontal: Axis,
  x: Float64Array,
  followed: number | null,
): { readonly line: Line; readonly at: number }[] {
  const { axis, height, lines } = storey;
  const down = (place: number) => (height * (axis.range.to - place)) / (axis.range.to - axis.range.from);
  const wishes = lines.flatMap((line) => {
    const at = lastPlace(line, x, horizontal, axis);
    return line.label === "" || at === null ? [] : [{ key: line.key, at: down(at) - EDGE }];
  });
  const kept = lines.find(({ family }) => family === followed)?.key ?? null;
  const places = placeLabels(wishes, height - 2 * EDGE, GAP, kept);
  return lines.flatMap((line) => {
    const at = places.get(line.key);
    return at === undefined ? [] : [{ line, at: at + EDGE }];
  });
}

/** The place on the vertical axis where a line last stands inside the view. */
function lastPlace({ values }: Line, x: Float64Array, horizontal: Axis, axis: Axis): number | null {
  const { from, to } = horizontal.range;
  for (let i = inView(x, horizontal.range).end - 1; i >= 0 && x[i]! >= from; i--) {
    if (x[i]! <= to && Number.isFinite(values[i])) return placeOf(axis.mapping, values[i]!);
  }
  return null;
}
