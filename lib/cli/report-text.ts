import type { RunDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { branchRows, foldRows, missingLine } from "./branch-rows";
import { section } from "./section";
import { sparkline } from "./sparkline";
import type { Ink, Paint } from "./style";
import { knobValue, worstPlace, yieldText } from "./verdicts";

/** Failed points that are told one by one. */
const MOST_FAILURES = 3;

const INK: Readonly<Record<RunDocument["verdict"], Ink>> = {
  holds: "good",
  broken: "bad",
  "no data": "open",
};

/** A run for people, with the rows of its budget. `curve` is the width of the curves in characters, 0 for none. */
export function reportText(
  document: RunDocument,
  budget: readonly (readonly string[])[],
  file: string,
  paint: Paint,
  curve: number,
): string {
  const title = document.title === "" ? file : `${document.title} (${file})`;
  return [
    paint("strong", title),
    `${paint(INK[document.verdict], verdict(document))}: ${account(document)}`,
    ...failures(document),
    ...unstable(document),
    ...section(paint, axes(document)),
    ...section(paint, traces(document, curve)),
    ...section(paint, readings(document)),
    ...section(paint, requirements(document, paint)),
    ...remarks(document),
    ...section(paint, budget),
    ...section(paint, branchRows(document)),
    ...section(paint, foldRows(document)),
    ...missingLine(document),
    "",
  ]
    .map((line) => `${line}\n`)
    .join("");
}

/** Where nothing is required, nothing holds either: it is only solved or not. */
function verdict({ verdict: judged, requirements: required }: RunDocument): string {
  return required.length === 0 ? "nothing is required" : judged;
}

function account({ points }: RunDocument): string {
  const all = points.outcome.length;
  const solved = points.outcome.filter((outcome) => outcome === "converged").length;
  const share = solved === all ? `${all} points solved` : `${solved} of ${all} points solved`;
  const each = points.iterations.reduce((sum, count) => sum + count, 0) / Math.max(1, all);
  const bounds = points.bound.filter((bound) => bound !== null);
  const allProved = solved === all ? "all" : "each of these";
  const proof =
    bounds.length === 0
      ? "none proved"
      : `${bounds.length === solved ? allProved : bounds.length} proved, within ${formatQuantity(Math.max(...bounds), "V", 2)} at most`;
  return `${share}, ${each.toFixed(1)} iterations a point, ${proof}`;
}

/** A sentence where the circuit would leave points that are solved. */
function unstable({ unstable: ranges = [], branches }: RunDocument): string[] {
  const count = ranges.reduce((sum, { from, to }) => sum + to - from, 0);
  if (count === 0) return [];
  const seek = branches === undefined ? "; `seek 3` looks for others" : "";
  return [`  not stable at ${count} of the points: the circuit would leave them${seek}`];
}

function failures({ failures: failed, axes: swept }: RunDocument): string[] {
  const lines = failed.slice(0, MOST_FAILURES).map(({ point, outcome, unsettled }) => {
    let rest = point;
    const at = swept.map(({ knob, unit, values }) => {
      const value = values[rest % values.length]!;
      rest = Math.floor(rest / values.length);
      return `${knob} = ${knobValue(knob, value, unit)}`;
    });
    const what = unsettled.length === 0 ? "" : `; unsettled: ${unsettled.join(", ")}`;
    return `  not solved${at.length === 0 ? "" : ` at ${at.join(", ")}`}: ${outcome}${what}`;
  });
  const more = failed.length - lines.length;
  return more > 0 ? [...lines, `  and ${more} more`] : lines;
}

function axes({ axes: swept, draws }: RunDocument): string[][] {
  const rows = swept.map(({ knob, unit, values, scale }) => {
    const ends = [values[0]!, values[values.length - 1]!].map((value) => knobValue(knob, value, unit));
    const range = values.length === 1 ? ends[0]! : ends.join(" to ");
    const spacing = { logarithmic: "evenly over decades", linear: "evenly", list: "listed" }[scale];
    return [knob, range, `${values.length} values, ${spacing}`];
  });
  if (draws > 1) rows.push(["draws", "", String(draws)]);
  return [["sweep", "range", "values"], ...rows];
}

/** Lowest and highest value over the whole run; the curve is that of the first axis at the first values of the others. */
function traces({ traces: kept, axes: swept }: RunDocument, curve: number): string[][] {
  const length = swept[0]?.values.length ?? 1;
  const rows = kept.map(({ name, unit, values }) => {
    const line = length > 1 && curve > 0 ? [sparkline(values.slice(0, length), curve)] : [];
    return [name, ...ends(values, unit), ...line];
  });
  const over = length > 1 && curve > 0 ? [`over ${swept[0]!.knob}`] : [];
  return [["trace", "lowest", "highest", ...over], ...rows];
}

function readings({ readings: read }: RunDocument): string[][] {
  const rows = read.map(({ name, unit, values }) => {
    const known = values.filter((value) => value !== null);
    if (values.length === 1) return [name, known.length === 0 ? "no data" : formatQuantity(known[0]!, unit)];
    return [name, ...ends(values, unit)];
  });
  return [["reading", "lowest", "highest"], ...rows];
}

function ends(values: readonly (number | null)[], unit: string): string[] {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of values) {
    if (value === null) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return low > high ? ["no data", ""] : [formatQuantity(low, unit), formatQuantity(high, unit)];
}

function requirements({ requirements: judged }: RunDocument, paint: Paint): string[][] {
  const rows = judged.map((line) => [
    line.label,
    paint(INK[line.verdict], line.verdict.padEnd("no data".length)),
    line.margin === null ? "" : formatQuantity(line.margin, line.unit),
    worstPlace(line),
    yieldText(line),
  ]);
  return [
    ["requirement", paint("faint", "verdict".padEnd(7)), "margin", "at its worst", "holds in"],
    ...rows,
  ];
}

/** What must be known of requirements besides their verdicts. */
function remarks({ requirements: judged }: RunDocument): string[] {
  return judged.flatMap(({ label, remark }) => (remark === undefined ? [] : [`  ${label}: ${remark}`]));
}
