import { shownLinesOf } from "@/app/_components/editor/plain-lines";
import { formatCount } from "@/app/_components/ui/count";
import { BranchList } from "../branch-list";
import { Cautions, type VoltageSpan } from "../cautions";
import type { RunState } from "../run-shapes";
import { UnstablePoints } from "../unstable-points";
import type { DrawnReport } from "./drawn-report";
import { ReportBudgets } from "./report-budgets";
import { ReportFacts } from "./report-facts";
import { ReportFailures } from "./report-failures";
import { ReportFigure } from "./report-figure";
import { ReportReadings } from "./report-readings";
import { ReportRequirements } from "./report-requirements";

interface Props extends DrawnReport {
  readonly run: RunState;
  /** Of the revision that was run. */
  readonly text: string;
  readonly savedBy: string;
  readonly savedAt: string;
  readonly span: VoltageSpan | null;
}

/** Everything that a run came to, on sheets. */
export function ReportView({ run, printed, figure, remark, text, savedBy, savedAt, span }: Props) {
  const { plan } = run;
  const missing = incompleteness(run);
  return (
    <article className="report mx-auto grid w-full min-w-0 grid-cols-[minmax(0,1fr)] gap-7 px-4 py-6 md:px-6 print:p-0">
      <header className="grid gap-1 border-ink border-b-2 pb-3">
        <p className="caption">
          {missing === null ? "Report of a run" : "Preliminary report of a run that is not complete"}
        </p>
        <h1 className="break-words text-2xl">{run.title}</h1>
        <p>{run.verdict === null ? "No requirement has been judged." : `Verdict: ${run.verdict}.`}</p>
      </header>
      {missing !== null && (
        <p className="border-2 border-ink p-3 font-semibold" data-incomplete>
          {missing}
        </p>
      )}
      <ReportFacts run={run} savedBy={savedBy} savedAt={savedAt} />
      <section aria-labelledby="report-requirements" className="grid grid-cols-[minmax(0,1fr)] gap-3">
        <h2 id="report-requirements">Requirements</h2>
        <ReportRequirements requirements={printed.requirements} />
      </section>
      {remark !== null && <p className="border-y py-2">{remark}</p>}
      {figure !== null && <ReportFigure figure={figure} />}
      <ReportReadings readings={printed.readings} axes={plan.axes} draws={plan.draws} />
      <ReportBudgets judgement={run.judgement} />
      <BranchList branches={printed.branches ?? []} axes={plan.axes} search={run.search ?? null} />
      <UnstablePoints
        ranges={printed.unstable ?? []}
        axes={plan.axes}
        ofOneDraw={plan.points / (plan.draws + 1)}
      />
      <ReportFailures failures={printed.failures} axes={plan.axes} />
      <Cautions span={span} power={run.judgement?.power ?? null} draws={plan.draws} />
      <section aria-labelledby="report-circuit" className="grid grid-cols-[minmax(0,1fr)] gap-3">
        <h2 id="report-circuit">Circuit, sweeps and requirements as written</h2>
        <ol className="figures list-decimal pl-10 text-xs marker:text-quiet">
          {shownLinesOf(text.trimEnd().replaceAll("\r\n", "\n")).map(({ at, pieces }) => (
            <li key={at} className="pl-2">
              <code className="whitespace-pre-wrap break-words">
                {pieces.map((piece) => piece.text).join("") || "\u00a0"}
              </code>
            </li>
          ))}
        </ol>
      </section>
    </article>
  );
}

/** What a reader must know before anything else; null for a whole run. */
function incompleteness({ status, points, pointsDone, error }: RunState): string | null {
  if (status === "done" && pointsDone === points) return null;
  const how = {
    queued: "It is queued",
    running: "It is being computed",
    cancelled: "It was cancelled",
    failed: "It failed",
    done: "It ended early",
  }[status];
  return `This run is not complete. ${how}: ${formatCount(pointsDone)} of ${formatCount(points)} points are in, and whatever is judged here is judged on those alone.${error === null ? "" : ` ${error}`}`;
}
