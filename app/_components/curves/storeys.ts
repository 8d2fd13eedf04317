import { type CurveSet, columnOf, type Family } from "./curve-set";
import { type LineStyle, styleInTurn, styleOf } from "./line-style";

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

/** Traces of one unit on one vertical axis. */
export interface Storey {
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
  return units.map((unit) => {
    const traces = chosen.filter((trace) => trace.unit === unit);
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
    return { unit, traces: traces.map(({ name }) => name), lines };
  });
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
