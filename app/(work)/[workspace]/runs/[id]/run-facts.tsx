import Link from "next/link";
import type { ReactNode } from "react";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { formatSpan } from "@/app/_components/ui/span-of-time";
import { When } from "@/app/_components/ui/when";
import { countOf } from "@/lib/analyses/plan";
import type { AxisDocument } from "@/lib/analyses/result";
import type { RunState } from "./run-shapes";

/** Everything about the run that is not a result, and the ways to take its results along. */
export function RunFacts({ workspace, run }: { readonly workspace: string; readonly run: RunState }) {
  const waited = formatSpan(run.queuedAt, run.startedAt);
  const took = formatSpan(run.startedAt, run.finishedAt);
  return (
    <section aria-labelledby="facts">
      <h2 id="facts" className="caption">
        This run
      </h2>
      <dl className="mt-2 border-t">
        <Fact name="Netlist">
          <Link className="link" href={`/${workspace}/netlists/${run.netlistId}`} prefetch={false}>
            {run.title}
          </Link>
          , number {run.netlistNumber}
        </Fact>
        <Fact name="Revision">
          {run.revision}
          <span className="figures ml-2 break-all text-quiet text-xs" title={run.hash}>
            {run.hash.slice(0, 12)}
          </span>
        </Fact>
        {run.plan.axes.map((axis) => (
          <Fact key={axis.knob} name={`Sweep of ${axis.knob}`}>
            {sweepInWords(axis)}
          </Fact>
        ))}
        {run.plan.draws > 0 && (
          <Fact name="Draws">
            {formatCount(run.plan.draws)} beside the nominal design, which the curves show
          </Fact>
        )}
        <Fact name="Points">
          {formatCount(run.pointsDone - run.pointsFailed)} solved, {formatCount(run.pointsFailed)} failed, of{" "}
          {formatCount(run.points)}
        </Fact>
        <Fact name="Queued">
          <When iso={run.queuedAt} /> by {run.requestedBy}
        </Fact>
        {waited !== "" && (
          <Fact name="Time">
            {waited} waiting{took !== "" && `, ${took} in work`}
          </Fact>
        )}
        <Fact name="Engine">version {run.engineVersion}</Fact>
        <Fact name="Take along">
          <a
            className="link mr-4"
            href={`/${workspace}/runs/${run.id}/points.csv`}
            download={`run-${run.number}.csv`}
          >
            Points as CSV
          </a>
          <a className="link" href={`/api/v1/runs/${run.id}`} download={`run-${run.number}.json`}>
            Run document as JSON
          </a>
        </Fact>
      </dl>
    </section>
  );
}

function Fact({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <div className="grid grid-cols-[9rem_minmax(0,1fr)] gap-x-4 border-b py-2 text-sm">
      <dt className="break-words text-quiet">{name}</dt>
      <dd className="min-w-0 break-words">{children}</dd>
    </div>
  );
}

function sweepInWords(axis: AxisDocument): string {
  const { values, scale } = axis;
  const show = (value: number | undefined) => (value === undefined ? "" : formatKnob(axis, value));
  if (scale === "list" && countOf(axis) <= 6) return values.map(show).join(", ");
  const how = scale === "logarithmic" ? ", in equal ratios" : "";
  return `${show(values[0])} to ${show(values.at(-1))}, ${counted(countOf(axis), "point")}${how}`;
}
