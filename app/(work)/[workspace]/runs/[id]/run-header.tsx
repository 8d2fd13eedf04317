"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { counted, formatCount } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { PageHeader } from "@/app/_components/ui/page-header";
import { formatSpan } from "@/app/_components/ui/span-of-time";
import { countOf } from "@/lib/analyses/plan";
import { ExportMenu, type SeenFigure } from "./export-menu";
import { cancel, runAgain } from "./fetch-run";
import { isLive, type RunState } from "./run-shapes";
import { StaleNotice } from "./stale-notice";

interface Props {
  readonly workspace: string;
  readonly run: RunState;
  readonly mayStart: boolean;
  readonly mayCancel: boolean;
  readonly onRun: (run: RunState) => void;
  /** Solved points with a proof; null while that is not known. */
  readonly proved: number | null;
  /** Number of the netlist's newest revision. */
  readonly latestRevision: number;
  /** The plot as it is seen; null while there is none. */
  readonly figure: SeenFigure | null;
}

/** What was run, in one line, and what one can do about it. */
export function RunHeader(props: Props) {
  const { workspace, run, mayStart, mayCancel, onRun, proved, latestRevision, figure } = props;
  const router = useRouter();
  const [problem, setProblem] = useState<string | null>(null);
  const [starting, start] = useTransition();
  const [cancelling, stop] = useTransition();
  const attempt = (deed: () => Promise<void>) => async () => {
    setProblem(null);
    try {
      await deed();
    } catch (error) {
      setProblem(
        error instanceof Error && !(error instanceof TypeError)
          ? error.message
          : "The service did not answer. Nothing has changed; try again.",
      );
    }
  };
  const mayAgain = !isLive(run.status) && mayStart;
  const againButton = (words: string) => (
    <Button
      busy={starting}
      onClick={() =>
        start(
          attempt(async () => {
            const { id } = await runAgain(run);
            router.push(`/${workspace}/runs/${id}`);
          }),
        )
      }
    >
      {starting ? "Queueing…" : words}
    </Button>
  );
  return (
    <>
      <PageHeader
        title={run.title}
        remark={`revision ${run.revision} · run ${run.number} · ${sizeInWords(run, proved)}`}
        actions={
          <>
            <ButtonLink href={`/${workspace}/runs/compare?runs=${run.id}`} prefetch={false}>
              Compare
            </ButtonLink>
            <ButtonLink href={`/${workspace}/runs/${run.id}/report`} prefetch={false}>
              Report
            </ButtonLink>
            <ExportMenu workspace={workspace} run={run} figure={figure} attempt={attempt} />
            {isLive(run.status) && mayCancel && (
              <Button
                tone="danger"
                busy={cancelling}
                onClick={() => stop(attempt(async () => onRun(await cancel(run.id))))}
              >
                {cancelling ? "Cancelling…" : "Cancel run"}
              </Button>
            )}
            {mayAgain && againButton("Run again")}
            <ButtonLink href={`/${workspace}/netlists/${run.netlistId}`} prefetch={false}>
              Open netlist
            </ButtonLink>
          </>
        }
      />
      <StaleNotice
        workspace={workspace}
        run={run}
        latestRevision={latestRevision}
        again={mayAgain ? againButton("Queue it again") : null}
      />
      {problem !== null && (
        <div className="px-4 pt-4 md:px-6">
          <Notice tone="broken" announce>
            <p>{problem}</p>
          </Notice>
        </div>
      )}
    </>
  );
}

/** "400 draws and nominal × 3 temperatures × 121 points, 145 563 solved and proved in 1.4 s", the outer sweeps first. */
function sizeInWords(run: RunState, proved: number | null): string {
  const { plan, points, status, startedAt, finishedAt, pointsDone, pointsFailed } = run;
  const [first, ...outer] = plan.axes;
  const factors = [
    ...(plan.draws > 0 ? [`${counted(plan.draws, "draw")} and nominal`] : []),
    ...outer.map((axis) => settings(axis.knob, countOf(axis))).reverse(),
    counted(first === undefined ? 1 : countOf(first), "point"),
  ];
  const size = factors.length > 1 ? factors.join(" × ") : counted(points, "point");
  const solved = pointsDone - pointsFailed;
  const took = status === "done" ? formatSpan(startedAt, finishedAt) : "";
  if (took === "") return size;
  const how =
    proved === null || solved === 0
      ? "solved"
      : proved === solved
        ? "solved and proved"
        : `solved, ${formatCount(proved)} proved,`;
  return `${size}, ${formatCount(solved)} ${how} in ${took}`;
}

function settings(knob: string, count: number): string {
  return knob === "temperature" ? counted(count, knob) : `${counted(count, "value")} of ${knob}`;
}
