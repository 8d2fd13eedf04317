import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { countOf } from "@/lib/analyses/plan";
import type { AxisDocument } from "@/lib/analyses/result";
import type { RunState } from "../run-shapes";

interface Props {
  readonly run: RunState;
  readonly savedBy: string;
  readonly savedAt: string;
}

/** What was run, by whom and when, with which engine; and what the plan was. */
export function ReportFacts({ run, savedBy, savedAt }: Props) {
  const { plan } = run;
  const facts: readonly (readonly [string, string])[] = [
    [
      "Netlist",
      `number ${run.netlistNumber}, revision ${run.revision}, saved by ${savedBy} on ${moment(savedAt)}`,
    ],
    ["Hash of the text", run.hash],
    ["Run", `number ${run.number}, asked for by ${run.requestedBy} on ${moment(run.queuedAt)}`],
    ["Ended", run.finishedAt === null ? "not yet" : moment(run.finishedAt)],
    ["Engine", `version ${run.engineVersion}`],
    ...plan.axes.map((axis) => [`Sweep of ${axis.knob}`, sweepInWords(axis)] as const),
    [
      "Draws",
      plan.draws === 0
        ? "none; the nominal design alone"
        : `${formatCount(plan.draws)} beside the nominal design`,
    ],
    ["Traces", plan.traces.map(({ name, unit }) => (unit === "1" ? name : `${name} (${unit})`)).join(", ")],
    [
      "Points",
      `${formatCount(run.pointsDone - run.pointsFailed)} solved, ${formatCount(run.pointsFailed)} failed, of ${formatCount(run.points)}`,
    ],
  ];
  return (
    <section aria-labelledby="report-facts" className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <h2 id="report-facts">Origin and plan</h2>
      <dl className="text-sm">
        {facts.map(([name, value]) => (
          <div key={name} className="grid grid-cols-[9rem_minmax(0,1fr)] gap-x-4 border-b py-1">
            <dt className="break-words text-quiet">{name}</dt>
            <dd className="break-words">{value}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

function sweepInWords(axis: AxisDocument): string {
  const { values, scale } = axis;
  const show = (value: number | undefined) => (value === undefined ? "" : formatKnob(axis, value));
  if (scale === "list" && values.length <= 6) return values.map(show).join(", ");
  const how = scale === "logarithmic" ? ", in equal ratios" : "";
  return `${show(values[0])} to ${show(values.at(-1))}, ${counted(countOf(axis), "point")}${how}`;
}

/** "2026-03-04 10:20 UTC", which reads alike wherever the sheet is read. */
function moment(iso: string): string {
  return `${iso.slice(0, 16).replace("T", " ")} UTC`;
}
