import { counted, formatCount } from "@/app/_components/ui/count";
import { outcomeInWords } from "@/lib/analyses/reasons";
import { formatQuantity } from "@/lib/units/quantity";
import type { CurveSet } from "./curve-set";
import { type Account, spansInWords } from "./failed-spans";
import { formatKnob } from "./figures-in-words";
import { valuesBetween } from "./range";
import type { Line, Storey } from "./storeys";

/** What a plot shows, in sentences: what is drawn over what, where each trace goes, how many points failed and where. */
export function summarise(set: CurveSet, storeys: readonly Storey[], account: Account): string {
  if (account.waiting === account.points) return pointsInWords(set, account);
  const first = set.x[0];
  const last = set.x.at(-1);
  if (first === undefined || last === undefined) return "The sweep has no points.";
  const over = `${set.axis.knob} from ${formatKnob(set.axis, first)} to ${formatKnob(set.axis, last)}`;
  const settings = set.families.length > 1 ? `, ${settingsDrawn(set, storeys)}` : "";
  const traces = storeys.flatMap(({ traces, lines }) =>
    traces.map((name) => course(lines.filter((line) => line.trace === name))),
  );
  if (set.source.traces.length === 0) return `No trace was kept. ${pointsInWords(set, account)}`;
  if (traces.length === 0) return `No trace is chosen. ${pointsInWords(set, account)}`;
  return `Over ${over}${settings}: ${traces.join("; ")}. ${pointsInWords(set, account)}${branchesInWords(set)}`;
}

/** How many operating points were looked for and where branches of them turn back; at most four folds are spelt out. */
function branchesInWords({ axis, source: { branches = [] } }: CurveSet): string {
  if (branches.length === 0) return "";
  const most = Math.max(...branches.map((row) => row.branches.length));
  const folds = [
    ...new Set(branches.flatMap((row) => row.folds.map(({ value }) => formatKnob(axis, value, 4)))),
  ];
  const where =
    folds.slice(0, 4).join(", ") + (folds.length > 4 ? ` and ${folds.length - 4} more places` : "");
  const turns = folds.length === 0 ? "none turns back" : `they turn back at ${axis.knob} ${where}`;
  return most < 2
    ? " There is one branch of operating points."
    : ` There are ${most} branches of operating points; ${turns}.`;
}

function settingsDrawn(set: CurveSet, storeys: readonly Storey[]): string {
  const drawn = new Set(storeys.flatMap(({ lines }) => lines.map(({ family }) => family))).size;
  const knobs = set.outer.map(({ knob }) => knob).join(" and ");
  const isNamed = set.outer.some(({ names }) => names !== undefined);
  if (isNamed && drawn === set.families.length) return counted(drawn, "curve");
  const all = counted(set.families.length, isNamed ? "curve" : "setting");
  if (isNamed) return `${formatCount(drawn)} of ${all}`;
  return `at ${drawn === set.families.length ? all : `${formatCount(drawn)} of ${all}`} of ${knobs}`;
}

/** "out rises from −0.66 V to −0.60 V", or its lowest and highest value where the lines do not all go one way. */
function course(lines: readonly Line[]): string {
  const [line] = lines;
  if (line === undefined) return "no setting is chosen";
  const found = valuesBetween(lines.map(({ values }) => values));
  if (found === null) return `${line.trace} has no value`;
  const { low, high } = found;
  // What is smaller than rounding leaves of the largest value is zero to a reader.
  const rest = 1e-15 * Math.max(Math.abs(low), Math.abs(high));
  const show = (value: number) => formatQuantity(Math.abs(value) < rest ? 0 : value, line.unit);
  if (show(low) === show(high)) return `${line.trace} is ${show(low)} throughout`;
  const ways = new Set(lines.map(({ values: column }) => way(column)));
  if (ways.size === 1 && ways.has("level"))
    return `${line.trace} is level in each, between ${show(low)} and ${show(high)}`;
  if (ways.size > 1 || ways.has("turns")) return `${line.trace} lies between ${show(low)} and ${show(high)}`;
  const [verb, from, to] = ways.has("rises") ? ["rises", low, high] : ["falls", high, low];
  return lines.length === 1
    ? `${line.trace} ${verb} from ${show(from)} to ${show(to)}`
    : `${line.trace} ${verb} in each, between ${show(low)} and ${show(high)}`;
}

/** Which way a line goes; level where it stays within a millionth of its largest value, less than any figure here shows. */
function way(column: Float64Array): "level" | "rises" | "falls" | "turns" {
  const found = valuesBetween([column]);
  if (found === null) return "level";
  const size = Math.max(Math.abs(found.low), Math.abs(found.high));
  if (found.high - found.low <= 1e-6 * size) return "level";
  let rises = true;
  let falls = true;
  let before = Number.NaN;
  for (let i = 0; i < column.length && (rises || falls); i++) {
    const value = column[i]!;
    if (Number.isNaN(value)) continue;
    if (value < before) rises = false;
    if (value > before) falls = false;
    before = value;
  }
  return rises ? "rises" : falls ? "falls" : "turns";
}

/** "All 51 points are solved." or what failed, where and how, and what is still to come. */
export function pointsInWords(set: CurveSet, account: Account): string {
  const { points, solved, failed, waiting } = account;
  if (solved === points)
    return points === 1 ? "Its one point is solved." : `All ${formatCount(points)} points are solved.`;
  if (waiting === points) return `None of ${counted(points, "point")} is solved.`;
  const parts = [`${formatCount(solved)} of ${counted(points, "point")} are solved`];
  if (failed > 0) {
    const where = spansInWords(set, account.spans);
    parts.push(
      `${formatCount(failed)} failed (${account.outcomes.map(outcomeInWords).join(", ")}) at ${where}, and nothing is drawn there`,
    );
  }
  if (waiting > 0) parts.push(`${formatCount(waiting)} are not solved`);
  return `${parts.join("; ")}.`;
}
