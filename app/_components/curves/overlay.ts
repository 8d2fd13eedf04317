import { columnFrom } from "./columns";
import { curveSet } from "./curve-set";
import type { CurveAxis, CurveSource, CurveTrace } from "./curve-source";
import { FEW_STYLES } from "./line-style";

/** A source among others on one figure, and what tells it from them: "revision 12", "R_out 10 kΩ". */
export interface Labelled {
  readonly label: string;
  readonly source: CurveSource;
}

export type Overlaid = { readonly source: CurveSource } | { readonly problem: string };

/** One curve of the figure: a setting of one of the sources. */
interface Part {
  readonly source: CurveSource;
  readonly family: number;
  readonly label: string;
  readonly style: { readonly colour: number; readonly dash: number };
}

/**
 * Several runs, revisions or settings on one figure: their curves side by side over all values that any of them swept. A curve has
 * points where its own source has; between them it goes straight on, and nothing is made up there. Traces are the same where name
 * and unit are. Sources that sweep another knob first cannot lie on one ruler, and the problem says so.
 */
export function overlay(sources: readonly Labelled[]): Overlaid {
  const [first] = sources;
  const axis = first?.source.axes[0];
  if (axis === undefined) return { problem: "There is no sweep to lay over another." };
  const other = sources.find(
    ({ source }) => source.axes[0]?.knob !== axis.knob || source.axes[0].unit !== axis.unit,
  );
  if (other !== undefined) {
    const swept = other.source.axes[0]?.knob ?? "nothing";
    return {
      problem: `“${first!.label}” sweeps ${axis.knob} and “${other.label}” sweeps ${swept}, so they have no ruler in common.`,
    };
  }
  const x = [...new Set(sources.flatMap(({ source }) => source.axes[0]!.values))].sort((a, b) => a - b);
  const at = new Map(x.map((value, place) => [value, place]));
  const parts = partsOf(sources);
  const placed = parts.map((part) => part.source.axes[0]!.values.map((value) => at.get(value)!));
  const values = (
    trace: Pick<CurveTrace, "name" | "unit">,
    of: (source: CurveSource) => readonly CurveTrace[],
  ) => {
    const column = new Float64Array(x.length * parts.length).fill(Number.NaN);
    parts.forEach(({ source, family }, i) => {
      const found = of(source).find(({ name, unit }) => name === trace.name && unit === trace.unit);
      if (found === undefined) return;
      const own = columnFrom(found.values);
      const length = source.axes[0]!.values.length;
      placed[i]!.forEach((place, k) => {
        column[i * x.length + place] = own[family * length + k] ?? Number.NaN;
      });
    });
    return { ...trace, values: column };
  };
  const outcome = new Array(x.length * parts.length).fill(null);
  parts.forEach(({ source, family }, i) => {
    placed[i]!.forEach((place, k) => {
      outcome[i * x.length + place] = source.points.outcome[family * placed[i]!.length + k] ?? null;
    });
  });
  const curves: CurveAxis = {
    knob: "curve",
    unit: "1",
    scale: "list",
    values: parts.map((_, i) => i),
    names: parts.map(({ label }) => label),
  };
  return {
    source: {
      axes: [{ ...axis, values: x }, curves],
      traces: allOf(sources, tracesIn).map((trace) => values(trace, tracesIn)),
      read: allOf(sources, readIn).map((trace) => values(trace, readIn)),
      points: { outcome },
      styles: parts.map(({ style }) => style),
      absent: placed.map((places) => (places.length === x.length ? null : lackOf(x.length, places))),
    },
  };
}

function tracesIn({ traces }: CurveSource): readonly CurveTrace[] {
  return traces;
}

function readIn(source: CurveSource): readonly CurveTrace[] {
  return curveSet(source)?.traces.filter(({ isReading }) => isReading) ?? [];
}

/** The traces of all sources, each once. */
function allOf(
  sources: readonly Labelled[],
  of: (source: CurveSource) => readonly CurveTrace[],
): Pick<CurveTrace, "name" | "unit">[] {
  const found = new Map<string, Pick<CurveTrace, "name" | "unit">>();
  for (const { source } of sources) {
    for (const { name, unit } of of(source)) if (!found.has(name)) found.set(name, { name, unit });
  }
  return [...found.values()];
}

/**
 * Settings of the same label have one colour. Each curve has dashes of its own as long as there are patterns for all, so that no two are
 * told apart by colour alone; of more curves, those of one source share a pattern and labels tell the settings.
 */
function partsOf(sources: readonly Labelled[]): Part[] {
  const found = sources.flatMap(({ label, source }, of) =>
    curveSet(source)!.families.map((family) => ({ label, source, of, family })),
  );
  const settings = [...new Set(found.map(({ family }) => family.label))];
  const isFew = found.length <= FEW_STYLES;
  return found.map(({ label, source, of, family }, k) => ({
    source,
    family: family.index,
    label: family.label === "" ? label : `${label}, ${family.label}`,
    style: {
      colour: settings.length === 1 ? of : settings.indexOf(family.label),
      dash: isFew ? k : of,
    },
  }));
}

function lackOf(length: number, places: readonly number[]): Uint8Array {
  const lack = new Uint8Array(length).fill(1);
  for (const place of places) lack[place] = 0;
  return lack;
}
