import { formatAxis } from "@/lib/units/quantity";
import type { CurveSet } from "./curve-set";
import type { CurveView } from "./curve-view";
import { shownUnit, shownValue } from "./figures-in-words";
import { FEW_POINTS } from "./line-style";
import { type Range, verticalRange, zoomed } from "./range";
import { fitOf, LINEAR, type LogarithmicFit, type Mapping, placeOf } from "./scale";
import { decadeLabels, linearLabels, type TickLabels } from "./tick-labels";
import { type Tick, ticksOf } from "./ticks";

/** An axis ready to draw: its mapping, range in places, ticks and their labels. */
export interface Axis {
  readonly mapping: Mapping;
  readonly range: Range;
  readonly ticks: readonly Tick[];
  readonly labels: TickLabels;
  readonly fit: LogarithmicFit;
}

/** The horizontal axis also knows the range of the whole sweep. */
export interface Ruler extends Axis {
  readonly whole: Range;
}

/** Px along the ruler that a label takes with the room around it. */
const LABEL_ROOM = 60;

/** The horizontal axis for `width` px of room. */
export function horizontalAxis(set: CurveSet, view: CurveView, width: number): Ruler {
  const first = shownValue(set.axis, set.x[0] ?? 0);
  const last = shownValue(set.axis, set.x.at(-1) ?? 0);
  const fit = fitOf(set.x.length === 0 ? 1 : first, set.x.length === 0 ? 0 : last);
  const scale = view.x ?? (set.axis.scale === "logarithmic" ? "logarithmic" : "linear");
  const mapping: Mapping = scale === "logarithmic" && fit.fits ? { scale, sign: fit.sign } : LINEAR;
  const found =
    set.x.length === 0 ? { from: 0, to: 1 } : { from: placeOf(mapping, first)!, to: placeOf(mapping, last)! };
  const whole = found.from === found.to ? verticalRange(found, mapping) : withRoom(found, set.x.length);
  const range = zoomed(whole, view.zoom === null ? null : placesOfZoom(set, mapping, view.zoom));
  const ticks = ticksOf(range.from, range.to, mapping, Math.max(2, Math.floor(width / LABEL_ROOM)));
  return { mapping, range, whole, ticks, labels: labelsOf(ticks, mapping, shownUnit(set.axis), true), fit };
}

/** A sweep of few points, which are marked one by one, gets room so that the marks at its ends are whole. */
function withRoom({ from, to }: Range, points: number): Range {
  const room = points <= FEW_POINTS ? 0.02 * (to - from) : 0;
  return { from: from - room, to: to + room };
}

function placesOfZoom(set: CurveSet, mapping: Mapping, zoom: Range): Range | null {
  const from = placeOf(mapping, shownValue(set.axis, zoom.from));
  const to = placeOf(mapping, shownValue(set.axis, zoom.to));
  return from === null || to === null ? null : { from, to };
}

/** Places of the swept values along the horizontal axis, ascending. */
export function placesOf(set: CurveSet, mapping: Mapping): Float64Array {
  return set.x.map((value) => placeOf(mapping, shownValue(set.axis, value)) ?? Number.NaN);
}

/** A horizontal ruler carries its unit on each label; a vertical axis says it once, beside the name. */
export function labelsOf(
  ticks: readonly Tick[],
  mapping: Mapping,
  unit: string,
  carriesUnit: boolean,
): TickLabels {
  if (mapping.scale === "logarithmic") return decadeLabels(ticks, unit);
  if (!carriesUnit) return linearLabels(ticks, unit);
  const { unit: prefixed, texts } = linearLabels(ticks, unit);
  if (prefixed === unit && unit === "1") return { unit, texts };
  const tail = prefixed === unit && /·10/u.test([...texts.values()].join()) ? unit : prefixed;
  return {
    unit,
    texts: new Map(
      [...texts].map(([tick, text]) => [
        tick,
        tick.value === 0 ? formatAxis(0, unit) : `${text}\u202f${tail}`,
      ]),
    ),
  };
}
