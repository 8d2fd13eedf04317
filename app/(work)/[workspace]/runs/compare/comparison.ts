import { columnFrom } from "@/app/_components/curves/columns";
import { curveSet } from "@/app/_components/curves/curve-set";
import type { CurveSource, CurveTrace } from "@/app/_components/curves/curve-source";
import { difference } from "@/app/_components/curves/difference";
import { type Labelled, overlay } from "@/app/_components/curves/overlay";

/** What several runs come to on one figure, and what cannot be shown with them: whole sentences. */
export interface Comparison {
  /** Null where there is nothing to draw. */
  readonly source: CurveSource | null;
  readonly apart: readonly string[];
}

/** Every run on the ruler of the first one that sweeps anything. */
export function laidOver(runs: readonly Labelled[]): Comparison {
  const { fitting, apart } = onOneRuler(runs);
  if (fitting.length === 0) return { source: null, apart };
  const found = overlay(fitting);
  if ("problem" in found) return { source: null, apart: [...apart, found.problem] };
  return { source: found.source, apart: [...apart, ...tracesApart(fitting)] };
}

/** Every other curve less that of the first run, at its own setting, or at one setting of the first run, in words, for all. */
export function subtracted(runs: readonly Labelled[], origin: string | null): Comparison {
  const { fitting, apart } = onOneRuler(runs);
  const [first, ...others] = fitting;
  if (first === undefined) return { source: null, apart };
  const differences =
    origin === null ? others.map((one) => ({ one, from: first })) : fromSetting(fitting, origin);
  const found: Labelled[] = [];
  const problems: string[] = [];
  const notes: string[] = [];
  for (const { one, from } of differences) {
    const common = commonWith(from, one);
    const made = difference(common.from, one);
    if ("problem" in made) problems.push(made.problem);
    else {
      const { note, ...source } = made.source;
      // "At values that both have" goes without saying; what was left out or taken between values does not.
      if (common.note !== null) notes.push(common.note);
      else if (note?.includes("between its neighbours")) notes.push(note);
      found.push({ label: one.label, source });
    }
  }
  if (found.length === 0) return { source: null, apart: [...apart, ...problems] };
  const all = overlay(found);
  if ("problem" in all) return { source: null, apart: [...apart, ...problems, all.problem] };
  return { source: all.source, apart: [...apart, ...problems, ...notes, ...tracesApart(fitting)] };
}

/** Settings of a run's outer knobs in words; one empty text where it has none. */
export function settingsIn(source: CurveSource): string[] {
  return curveSet(source)?.families.map(({ label }) => label) ?? [];
}

/** Values in common that are enough for a difference without reading between points. */
const ENOUGH = 2;

/** A run at those values of the first knob that the other swept too, where there are enough of them: nothing is then made up. */
function commonWith(from: Labelled, other: Labelled): { from: Labelled; note: string | null } {
  const { knob, values } = from.source.axes[0]!;
  const theirs = new Set(other.source.axes[0]!.values);
  const places = values.flatMap((value, place) => (theirs.has(value) ? [place] : []));
  if (places.length === values.length || places.length < ENOUGH) return { from, note: null };
  const left = values.length - places.length;
  return {
    from: { label: from.label, source: atPlaces(from.source, places) },
    note: `Run ${other.label} was solved at ${places.length} of the ${values.length} values of ${knob} of run ${from.label}; the other ${left} ${left === 1 ? "is" : "are"} left out.`,
  };
}

/** Places of the first axis alone, at every setting of the outer ones. */
function atPlaces(source: CurveSource, places: readonly number[]): CurveSource {
  const [axis, ...outer] = source.axes;
  const length = axis!.values.length;
  const settings = settingsIn(source).length;
  const points = Array.from({ length: settings }, (_, setting) =>
    places.map((place) => setting * length + place),
  ).flat();
  const cut = ({ name, unit, values }: CurveTrace): CurveTrace => {
    const column = columnFrom(values);
    return { name, unit, values: Float64Array.from(points, (point) => column[point] ?? Number.NaN) };
  };
  return {
    axes: [{ ...axis!, values: places.map((place) => axis!.values[place]!) }, ...outer],
    traces: source.traces.map(cut),
    read: readIn(source).map(cut),
    points: { outcome: points.map((point) => source.points.outcome[point] ?? null) },
  };
}

function readIn(source: CurveSource): CurveTrace[] {
  return curveSet(source)!.traces.filter(({ isReading }) => isReading);
}

/** Every setting of every run but the origin itself, to be measured from that setting of the first run. */
function fromSetting(runs: readonly Labelled[], origin: string): { one: Labelled; from: Labelled }[] {
  const first = runs[0]!;
  const at = settingsIn(first.source).indexOf(origin);
  if (at === -1) return [];
  const from = settingOf(first, at, origin);
  return runs.flatMap((run) =>
    settingsIn(run.source).flatMap((setting, family) =>
      run === first && family === at ? [] : [{ one: settingOf(run, family, setting), from }],
    ),
  );
}

/** One setting of a run as a source of its own. */
function settingOf({ label, source }: Labelled, family: number, setting: string): Labelled {
  const axis = source.axes[0]!;
  const length = axis.values.length;
  const cut = (trace: CurveTrace): CurveTrace => ({
    ...trace,
    values: columnFrom(trace.values).slice(family * length, (family + 1) * length),
  });
  return {
    label: setting === "" ? label : `${label}, ${setting}`,
    source: {
      axes: [axis],
      traces: source.traces.map(cut),
      read: readIn(source).map(({ name, unit, values }) => cut({ name, unit, values })),
      points: { outcome: source.points.outcome.slice(family * length, (family + 1) * length) },
    },
  };
}

/** Those that sweep the knob of the first one that sweeps anything; why the others do not fit. */
function onOneRuler(runs: readonly Labelled[]): { fitting: Labelled[]; apart: string[] } {
  const first = runs.find(({ source }) => source.axes.length > 0);
  const axis = first?.source.axes[0];
  const apart: string[] = [];
  const fitting = runs.filter(({ label, source }) => {
    const own = source.axes[0];
    if (own === undefined) apart.push(`Run ${label} sweeps nothing, so it has no curve.`);
    else if (own.knob === axis!.knob && own.unit === axis!.unit) return true;
    else
      apart.push(
        `Run ${label} sweeps ${own.knob} and run ${first!.label} ${axis!.knob}, so they have no ruler in common.`,
      );
    return false;
  });
  return { fitting, apart };
}

/** Traces and readings that not all runs have, or not in the same unit. */
function tracesApart(runs: readonly Labelled[]): string[] {
  const units = new Map<string, Map<string, string[]>>();
  for (const { label, source } of runs) {
    for (const { name, unit } of curveSet(source)!.traces) {
      const own = units.get(name) ?? new Map<string, string[]>();
      own.set(unit, [...(own.get(unit) ?? []), label]);
      units.set(name, own);
    }
  }
  return [...units].flatMap(([name, own]) => {
    if (own.size > 1) {
      const each = [...own].map(
        ([unit, labels]) => `in ${unit === "1" ? "no unit" : unit} in ${listed(labels)}`,
      );
      return [`${name} is ${each.join(" and ")}: two things of one name, which are not compared.`];
    }
    const having = [...own.values()][0]!;
    return having.length === runs.length
      ? []
      : [`Only ${listed(having)} ${having.length === 1 ? "has" : "have"} ${name}.`];
  });
}

function listed(labels: readonly string[]): string {
  return `${labels.length === 1 ? "run" : "runs"} ${labels.join(", ")}`;
}
