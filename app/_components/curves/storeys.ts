import { type CurveColumn, type CurveSet, columnOf, type Family } from "./curve-set";
import { FEW_STYLES, type LineStyle, styleInOrder, styleInTurn, styleOf } from "./line-style";
import { valuesBetween } from "./range";
import { fitOf, type LogarithmicFit, type Scale } from "./scale";

/** One curve: a trace at one setting of the outer sweeps. */
export interface Line {
  readonly key: string;
  readonly trace: string;
  readonly unit: string;
  readonly family: number;
  /** What stands beside its end; empty where the storey's name says it already. */
  readonly label: string;
  readonly style: LineStyle;
  /** In the order of the curve set's `x`; NaN where unsolved. */
  readonly values: Float64Array;
  /** Places of `x` that this line has no point at, by 1; null where it has one at each. */
  readonly absent: Uint8Array | null;
}

/** Traces of one unit, and of a size that can be seen together, on one vertical axis. */
export interface Storey {
  /** Tells storeys apart, also in addresses: the unit, "V small" for what would lie flat on the axis of "V", "V read" for readings. */
  readonly key: string;
  readonly unit: string;
  readonly traces: readonly string[];
  readonly lines: readonly Line[];
  /** Of readings, which are derived from the traces above. */
  readonly isReading: boolean;
}

/** Which traces and settings are drawn. */
export interface Choice {
  readonly traces: readonly string[];
  readonly families: readonly number[];
}

/** More settings than this are not drawn at once unless asked for. */
export const FAMILIES_AT_ONCE = 12;

/**
 * Over a ruler, values that reach over this many decades stand on a logarithmic axis unless the reader says otherwise. More than
 * the upper bound are no measure of anything: a value near zero is then a rest of rounding.
 */
const MANY_DECADES = { from: 3, to: 15 };

/** On a linear axis a trace so many times smaller than the largest is a flat line: an error beside its signal. */
const FLAT = 16;

/** The scale of a vertical axis when nobody chose. */
export function usualScale({ axis }: CurveSet, fit: LogarithmicFit): Scale {
  const many = fit.fits && fit.decades > MANY_DECADES.from && fit.decades < MANY_DECADES.to;
  return many && axis.scale === "logarithmic" ? "logarithmic" : "linear";
}

/** What is drawn when nobody chose: every trace, and every setting or twelve spread evenly from the first to the last. */
export function usualChoice(set: CurveSet): Choice {
  const count = set.families.length;
  const shown = Math.min(count, FAMILIES_AT_ONCE);
  const families = Array.from({ length: shown }, (_, i) =>
    shown < 2 ? 0 : Math.round((i * (count - 1)) / (shown - 1)),
  );
  return { traces: set.traces.map(({ name }) => name), families };
}

/** The storeys of a choice: traces in the order in which the netlist shows them, below them what it reads at each point. */
export function storeysOf(set: CurveSet, choice: Choice): Storey[] {
  const wanted = new Set(choice.traces);
  const drawn = new Set(choice.families);
  const chosen = set.traces.filter(({ name }) => wanted.has(name));
  const families = set.families.filter(({ index }) => drawn.has(index));
  const above = chosen.filter(({ isReading }) => !isReading);
  const below = chosen.filter(({ isReading }) => isReading);
  const groups = [
    ...unitsOf(above).flatMap((traces) => bySize(set, traces)),
    ...unitsOf(below).map((traces) => ({ ...whole(traces), key: `${traces[0]!.unit} read` })),
  ];
  // Of several sources laid over each other one may have a trace that another has not.
  const exists = ({ values }: Line) => set.source.styles === undefined || valuesBetween([values]) !== null;
  const crowded = groups.some(({ traces }) => traces.length > 1);
  return groups.map(({ key, unit, traces }) => {
    const lines = traces.flatMap((trace) => {
      const turn = set.traces.findIndex(({ name }) => name === trace.name);
      return families.map((family) => ({
        key: `${trace.name} ${family.index}`,
        trace: trace.name,
        unit,
        family: family.index,
        label: labelOf(trace.name, family, traces.length),
        style: lineStyle(set, crowded, turn, family.index),
        values: columnOf(set, trace, family.index),
        absent: set.source.absent?.[family.index] ?? null,
      }));
    });
    const names = traces.map(({ name }) => name);
    return { key, unit, traces: names, lines: lines.filter(exists), isReading: traces[0]!.isReading };
  });
}

interface Group {
  readonly key: string;
  readonly unit: string;
  readonly traces: readonly CurveColumn[];
}

function unitsOf(traces: readonly CurveColumn[]): (readonly CurveColumn[])[] {
  return [...new Set(traces.map(({ unit }) => unit))].map((unit) =>
    traces.filter((trace) => trace.unit === unit),
  );
}

function whole(traces: readonly CurveColumn[]): Group {
  const { unit } = traces[0]!;
  return { key: unit, unit, traces };
}

/** The traces of one unit in one group, or in two where a linear axis of them all would show the small ones as flat lines. */
function bySize(set: CurveSet, traces: readonly CurveColumn[]): Group[] {
  const all = whole(traces);
  if (traces.length < 2) return [all];
  const spans = traces.map((trace) =>
    valuesBetween(set.families.map(({ index }) => columnOf(set, trace, index))),
  );
  const low = Math.min(...spans.map((span) => span?.low ?? Number.POSITIVE_INFINITY));
  const high = Math.max(...spans.map((span) => span?.high ?? Number.NEGATIVE_INFINITY));
  if (usualScale(set, fitOf(low, high)) === "logarithmic") return [all];
  const most = Math.max(Math.abs(low), Math.abs(high));
  const isSmall = spans.map((span) => {
    const size = span === null ? 0 : Math.max(Math.abs(span.low), Math.abs(span.high));
    return size > 0 && size * FLAT < most;
  });
  if (!isSmall.includes(true)) return [all];
  return [
    { ...all, traces: traces.filter((_, i) => !isSmall[i]) },
    { ...all, key: `${all.unit} small`, traces: traces.filter((_, i) => isSmall[i]) },
  ];
}

/**
 * Where traces share a storey, colour tells the trace and dashes the setting; else one number tells both. More settings than there
 * are dash patterns stand in an order, and their colours follow it, with dashes for the trace.
 */
function lineStyle(set: CurveSet, crowded: boolean, trace: number, family: number): LineStyle {
  const { length } = set.families;
  const own = set.source.styles?.[family];
  // Dashes tell which branches are not stable.
  if (set.source.branches !== undefined) return styleOf(crowded ? trace : family, 0);
  if (own !== undefined) return styleOf(crowded ? trace : own.colour, own.dash);
  if (length === 1) return styleInTurn(trace);
  if (length > FEW_STYLES) return styleInOrder(family, length, crowded ? trace : 0);
  return crowded ? styleOf(trace, family) : styleInTurn(family);
}

function labelOf(trace: string, family: Family, tracesInStorey: number): string {
  if (tracesInStorey === 1) return family.label;
  return family.label === "" ? trace : `${trace}, ${family.label}`;
}
