import { type CurveSet, columnOf, type Family } from "./curve-set";
import { type LineStyle, styleInTurn, styleOf } from "./line-style";
import { type LogarithmicFit, logarithmicFit, type Scale } from "./scale";

/** One curve: a trace at one setting of the outer sweeps. */
export interface Line {
  readonly key: string;
  readonly trace: string;
  readonly unit: string;
  readonly family: number;
  /** What stands beside its end; empty where the storey's name says it already. */
  readonly label: string;
  readonly style: LineStyle;
  /** In the order of the curve set's `x`; null where unsolved. */
  readonly values: readonly (number | null)[];
}

/** Traces of one unit, and of a size that can be seen together, on one vertical axis. */
export interface Storey {
  /** Tells storeys apart, also in addresses: the unit, or "V small" for what would lie flat on the axis of "V". */
  readonly key: string;
  readonly unit: string;
  readonly traces: readonly string[];
  readonly lines: readonly Line[];
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
  return { traces: set.source.traces.map(({ name }) => name), families };
}

/** The storeys of a choice, in the order in which the netlist shows the traces. */
export function storeysOf(set: CurveSet, choice: Choice): Storey[] {
  const chosen = set.source.traces.filter(({ name }) => choice.traces.includes(name));
  const families = set.families.filter(({ index }) => choice.families.includes(index));
  const units = [...new Set(chosen.map(({ unit }) => unit))];
  const crowded = units.some((unit) => chosen.filter((trace) => trace.unit === unit).length > 1);
  const groups = units.flatMap((unit) =>
    bySize(
      set,
      unit,
      chosen.filter((trace) => trace.unit === unit),
    ),
  );
  return groups.map(({ key, unit, traces }) => {
    const lines = traces.flatMap((trace) =>
      families.map((family) => {
        const turn = set.source.traces.findIndex(({ name }) => name === trace.name);
        return {
          key: `${trace.name} ${family.index}`,
          trace: trace.name,
          unit,
          family: family.index,
          label: labelOf(trace.name, family, traces.length),
          style: lineStyle(set.families.length, crowded, turn, family.index),
          values: columnOf(set, trace, family.index),
        };
      }),
    );
    return { key, unit, traces: traces.map(({ name }) => name), lines };
  });
}

interface Group {
  readonly key: string;
  readonly unit: string;
  readonly traces: CurveSet["source"]["traces"];
}

/** The traces of one unit in one group, or in two where a linear axis of them all would show the small ones as flat lines. */
function bySize(set: CurveSet, unit: string, traces: Group["traces"]): Group[] {
  const whole = { key: unit, unit, traces };
  if (traces.length < 2 || usualScale(set, logarithmicFit(valuesOf(traces))) === "logarithmic")
    return [whole];
  const sizes = traces.map((trace) => sizeOf(trace.values));
  const most = Math.max(...sizes);
  const isSmall = (size: number) => size > 0 && size * FLAT < most;
  if (!sizes.some(isSmall)) return [whole];
  return [
    { ...whole, traces: traces.filter((_, i) => !isSmall(sizes[i]!)) },
    { key: `${unit} small`, unit, traces: traces.filter((_, i) => isSmall(sizes[i]!)) },
  ];
}

function* valuesOf(traces: Group["traces"]): Generator<number | null> {
  for (const { values } of traces) yield* values;
}

function sizeOf(values: readonly (number | null)[]): number {
  return values.reduce<number>((most, value) => Math.max(most, Math.abs(value ?? 0)), 0);
}

/** Where traces share a storey, colour tells the trace and dashes the setting; else one number tells both. */
function lineStyle(families: number, crowded: boolean, trace: number, family: number): LineStyle {
  if (families === 1) return styleInTurn(trace);
  return crowded ? styleOf(trace, family) : styleInTurn(family);
}

function labelOf(trace: string, family: Family, tracesInStorey: number): string {
  if (tracesInStorey === 1) return family.label;
  return family.label === "" ? trace : `${trace}, ${family.label}`;
}
