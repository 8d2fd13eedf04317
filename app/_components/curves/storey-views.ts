import type { AllowedBand } from "@/lib/analyses/allowed-bands";
import { type Axis, labelsOf, placesOf, type Ruler } from "./axes";
import { branchLines } from "./branch-lines";
import { atLeast } from "./columns";
import { type CurveSet, columnOf, outerIndices } from "./curve-set";
import { type CurveView, drawnChoice } from "./curve-view";
import { formatKnob, shownValue } from "./figures-in-words";
import type { LineStyle } from "./line-style";
import { placesOfValues, valuesBetween, verticalRange } from "./range";
import { fitOf, LINEAR, type Mapping, placeOf } from "./scale";
import { type Line, type Storey, storeysOf, usualScale } from "./storeys";
import { ticksOf } from "./ticks";

/** The spread of the draws of one line: two columns in the order of `x`. */
export interface Band {
  readonly low: Float64Array;
  readonly high: Float64Array;
}

/** What stands behind and beside the lines of the nominal design. */
export interface Beside {
  readonly allowed: readonly AllowedBand[];
  /** By the key of a line; empty while the draws are being counted. */
  readonly bands: ReadonlyMap<string, Band>;
  /** The draw that is drawn beside the nominal one; null for none. */
  readonly worst: number | null;
}

export const NOTHING_BESIDE: Beside = { allowed: [], bands: new Map(), worst: null };

/** A part of a storey that a requirement allows: places on both axes, null on a side without a limit. */
export interface Shade {
  readonly label: string;
  readonly from: number;
  readonly to: number;
  readonly low: number | null;
  readonly high: number | null;
}

export interface BandView extends Band {
  readonly key: string;
  readonly style: LineStyle;
}

/** A piece of a branch of operating points over its own places. */
export interface BranchView {
  readonly x: Float64Array;
  readonly values: Float64Array;
  readonly isStable: boolean;
  readonly family: number;
  readonly style: LineStyle;
}

/** Where branches turn back, in places, and the value of the knob there in words; empty where another fold of the storey says it. */
export interface FoldView {
  readonly across: number;
  readonly value: number;
  readonly label: string;
}

export interface StoreyView extends Storey {
  /** Those of its lines that are drawn as they were swept; others are drawn as branches. */
  readonly swept: readonly Line[];
  readonly axis: Axis;
  readonly height: number;
  readonly branches: readonly BranchView[];
  readonly folds: readonly FoldView[];
  readonly bands: readonly BandView[];
  readonly worst: readonly Line[];
  readonly allowed: readonly Shade[];
}

/** Bands of more settings than this would cover each other. */
const FEW_BANDS = 6;

/** An axis makes room for limits that lie within so many times the span of what is drawn; those beyond would lay it flat. */
const REACH = 12;

/** The storeys with their vertical axes, fitted to what is in view of `horizontal`. */
export function storeyViews(
  set: CurveSet,
  view: CurveView,
  horizontal: Ruler,
  narrow: boolean | "brief",
  beside: Beside = NOTHING_BESIDE,
  x: Float64Array = placesOf(set, horizontal.mapping),
): StoreyView[] {
  const storeys = storeysOf(set, drawnChoice(set, view));
  const from = atLeast(x, horizontal.range.from);
  const after = atLeast(x, horizontal.range.to);
  const to = x[after] === horizontal.range.to ? after + 1 : after;
  return storeys.map((storey, index) => {
    const { lines } = storey;
    const bands = view.band === false ? [] : bandsOf(lines, beside);
    const worst = worstOf(set, lines, beside.worst);
    const branched = branchViews(set, lines, horizontal.mapping);
    const columns = [...lines, ...worst].map(({ values }) => values);
    const beyond = valuesBetween(branched.branches.map(({ values }) => values));
    const all = widest(valuesBetween(columns), beyond);
    const fit = all === null ? fitOf(1, 0) : fitOf(all.low, all.high);
    const scale = view.y[storey.key] ?? usualScale(set, fit);
    const mapping: Mapping = scale === "logarithmic" && fit.fits ? { scale, sign: fit.sign } : LINEAR;
    const edges = bands.flatMap(({ low, high }) => [low, high]);
    const seen = widest(valuesBetween([...columns, ...edges], from, to), beyond);
    const own = beside.allowed.filter((band) => isShown(set, storey, band));
    const found =
      placesOfValues(withLimits(seen, own), mapping) ??
      placesOfValues(valuesBetween(columns, from, to), mapping);
    const range = verticalRange(found, mapping);
    const height = heightOf(storeys.length, index, narrow);
    // Without a value there is nothing to number an axis by.
    const ticks = found === null ? [] : ticksOf(range.from, range.to, mapping, labelsIn(height));
    const axis = { mapping, range, ticks, labels: labelsOf(ticks, mapping, storey.unit, false), fit };
    const allowed = own.map((band) => shadeOf(set, band, horizontal.mapping, mapping));
    return { ...storey, ...branched, axis, height, bands, worst, allowed };
  });
}

/** How many labels a vertical axis carries at most: a low one four, since a value is read between two. */
function labelsIn(height: number): number {
  return Math.max(Math.floor(height / 40), Math.min(4, Math.floor(height / 24)));
}

function bandsOf(lines: readonly Line[], { bands }: Beside): BandView[] {
  if (new Set(lines.map(({ family }) => family)).size > FEW_BANDS) return [];
  return lines.flatMap(({ key, style }) => {
    const band = bands.get(key);
    return band === undefined ? [] : [{ key, style, ...band }];
  });
}

function worstOf(set: CurveSet, lines: readonly Line[], draw: number | null): Line[] {
  if (draw === null || draw > set.draws) return [];
  return lines.flatMap((line) => {
    const trace = set.traces.find(({ name }) => name === line.trace);
    if (trace === undefined) return [];
    return [{ ...line, key: `${line.key} worst`, values: columnOf(set, trace, line.family, draw) }];
  });
}

/** The branches take the place of the line as it was swept, which jumps from one to another where the first ends. */
function branchViews(
  set: CurveSet,
  lines: readonly Line[],
  across: Mapping,
): Pick<StoreyView, "swept" | "branches" | "folds"> {
  const place = (value: number) => placeOf(across, shownValue(set.axis, value)) ?? Number.NaN;
  const found = lines.map((line) => ({ line, own: branchLines(set, line.trace, line.family) }));
  const named = new Set<string>();
  return {
    swept: found.flatMap(({ line, own }) => ((own?.pieces.length ?? 0) === 0 ? [line] : [])),
    branches: found.flatMap(({ line: { family, style }, own }) =>
      (own?.pieces ?? []).map((piece) => ({ ...piece, x: piece.x.map(place), family, style })),
    ),
    folds: found.flatMap(({ own }) =>
      (own?.folds ?? []).map(({ x, value }) => {
        const label = formatKnob(set.axis, x, 4);
        const isNew = !named.has(label);
        named.add(label);
        return { across: place(x), value, label: isNew ? label : "" };
      }),
    ),
  };
}

type Span = { readonly low: number; readonly high: number } | null;

function widest(a: Span, b: Span): Span {
  if (a === null || b === null) return a ?? b;
  return { low: Math.min(a.low, b.low), high: Math.max(a.high, b.high) };
}

/** Whether a band belongs to a trace of the storey and to one of the settings drawn in it. */
function isShown(set: CurveSet, { lines }: Storey, { trace, at }: AllowedBand): boolean {
  return lines.some((line) => {
    if (line.trace !== trace) return false;
    const indices = outerIndices(set.outer, line.family);
    return at.every(({ knob, low, high }) => {
      const axis = set.outer.findIndex((one) => one.knob === knob);
      const value = set.outer[axis]?.values[indices[axis] ?? 0];
      const room = 1e-9 * Math.max(Math.abs(low), Math.abs(high));
      return value === undefined || (value >= low - room && value <= high + room);
    });
  });
}

function withLimits(seen: Span, allowed: readonly AllowedBand[]): Span {
  if (seen === null) return null;
  let { low, high } = seen;
  const most = REACH * (seen.high - seen.low);
  for (const limit of allowed.flatMap((band) => [band.low, band.high])) {
    if (limit === null || limit < seen.high - most || limit > seen.low + most) continue;
    low = Math.min(low, limit);
    high = Math.max(high, limit);
  }
  return { low, high };
}

function shadeOf(set: CurveSet, band: AllowedBand, across: Mapping, upward: Mapping): Shade {
  const along = (value: number) => placeOf(across, shownValue(set.axis, value)) ?? Number.NaN;
  const place = (value: number | null) => (value === null ? null : placeOf(upward, value));
  return {
    label: band.label,
    from: along(band.from),
    to: along(band.to),
    low: place(band.low),
    high: place(band.high),
  };
}

function heightOf(storeys: number, index: number, narrow: boolean | "brief"): number {
  if (narrow === "brief") return storeys === 1 ? 264 : index === 0 ? 200 : 112;
  if (storeys === 1) return narrow ? 280 : 368;
  if (index === 0) return narrow ? 220 : 272;
  return narrow ? 150 : 176;
}
