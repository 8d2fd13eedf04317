import { formatAxis } from "@/lib/units/quantity";
import type { CurveSet } from "./curve-set";
import { shownUnit, shownValue } from "./figures-in-words";
import { FEW_POINTS } from "./line-style";
import { extent, type Range, verticalRange, zoomed } from "./range";
import { LINEAR, type LogarithmicFit, logarithmicFit, type Mapping, placeOf, type Scale } from "./scale";
import { type Choice, type Storey, storeysOf, usualChoice, usualScale } from "./storeys";
import { decadeLabels, linearLabels, type TickLabels } from "./tick-labels";
import { type Tick, ticksOf } from "./ticks";

/** What a reader chose about a plot; null (or a missing unit) leaves it as it usually is. */
export interface CurveView {
  readonly traces: readonly string[] | null;
  readonly families: readonly number[] | null;
  readonly x: Scale | null;
  /** By the key of a storey, which is its unit unless a unit has two. */
  readonly y: Readonly<Record<string, Scale>>;
  /** Part of the sweep that is in view, in coherent values of the first knob. */
  readonly zoom: Range | null;
}

export const USUAL_VIEW: CurveView = { traces: null, families: null, x: null, y: {}, zoom: null };

/** An axis ready to draw: its mapping, range in places, ticks and their labels. */
export interface Axis {
  readonly mapping: Mapping;
  readonly range: Range;
  readonly ticks: readonly Tick[];
  readonly labels: TickLabels;
  readonly fit: LogarithmicFit;
}

export interface StoreyView extends Storey {
  readonly axis: Axis;
  readonly height: number;
}

/** Px along the ruler that a label takes with the room around it. */
const LABEL_ROOM = 60;

/**
 * The choice a view makes among what the run has. Names and numbers that it does not have fall out; where none of those asked for
 * is left, an old address perhaps, the usual ones stand.
 */
export function choiceOf(set: CurveSet, view: CurveView): Choice {
  const usual = usualChoice(set);
  const known = <T>(asked: readonly T[] | null, has: (one: T) => boolean, otherwise: readonly T[]) => {
    const left = asked?.filter(has) ?? otherwise;
    return left.length === 0 && asked?.length !== 0 ? otherwise : left;
  };
  return {
    traces: known(view.traces, (name) => usual.traces.includes(name), usual.traces),
    families: known(view.families, (index) => index < set.families.length, usual.families),
  };
}

/** The horizontal axis for `width` px of room. */
export function horizontalAxis(set: CurveSet, view: CurveView, width: number): Axis {
  const shown = set.x.map((value) => shownValue(set.axis, value));
  const fit = logarithmicFit(shown);
  const scale = view.x ?? (set.axis.scale === "logarithmic" ? "logarithmic" : "linear");
  const mapping: Mapping = scale === "logarithmic" && fit.fits ? { scale, sign: fit.sign } : LINEAR;
  const found = extent([shown], mapping) ?? { from: 0, to: 1 };
  const whole = found.from === found.to ? verticalRange(found, mapping) : withRoom(found, set.x.length);
  const range = zoomed(whole, view.zoom === null ? null : placesOfZoom(set, mapping, view.zoom));
  const ticks = ticksOf(range.from, range.to, mapping, Math.max(2, Math.floor(width / LABEL_ROOM)));
  return { mapping, range, ticks, labels: labelsOf(ticks, mapping, shownUnit(set.axis), true), fit };
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

/** The storeys with their vertical axes, fitted to what is in view of `horizontal`. */
export function storeyViews(set: CurveSet, view: CurveView, horizontal: Axis, narrow: boolean): StoreyView[] {
  const storeys = storeysOf(set, choiceOf(set, view));
  const places = placesOf(set, horizontal.mapping);
  const inView = places.map((place) => place >= horizontal.range.from && place <= horizontal.range.to);
  return storeys.map((storey, index) => {
    const columns = storey.lines.map(({ values }) => values);
    const fit = logarithmicFit(columns.flat());
    const scale = view.y[storey.key] ?? usualScale(set, fit);
    const mapping: Mapping = scale === "logarithmic" && fit.fits ? { scale, sign: fit.sign } : LINEAR;
    const visible = columns.map((column) => column.filter((_, i) => inView[i]));
    const found = extent(visible, mapping);
    const range = verticalRange(found, mapping);
    const height = heightOf(storeys.length, index, narrow);
    // Without a value there is nothing to number an axis by.
    const ticks = found === null ? [] : ticksOf(range.from, range.to, mapping, Math.floor(height / 40));
    const axis = { mapping, range, ticks, labels: labelsOf(ticks, mapping, storey.unit, false), fit };
    return { ...storey, axis, height };
  });
}

/** Places of the swept values along the horizontal axis, ascending. */
export function placesOf(set: CurveSet, mapping: Mapping): number[] {
  return set.x.map((value) => placeOf(mapping, shownValue(set.axis, value)) ?? Number.NaN);
}

function heightOf(storeys: number, index: number, narrow: boolean): number {
  if (storeys === 1) return narrow ? 280 : 368;
  if (index === 0) return narrow ? 220 : 272;
  return narrow ? 150 : 176;
}

/** A horizontal ruler carries its unit on each label; a vertical axis says it once, beside the name. */
function labelsOf(ticks: readonly Tick[], mapping: Mapping, unit: string, whole: boolean): TickLabels {
  if (mapping.scale === "logarithmic") return decadeLabels(ticks, unit);
  if (!whole) return linearLabels(ticks, unit);
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
