"use client";

import { useRouter } from "next/navigation";
import { type Ref, useEffect, useRef, useState, useTransition } from "react";
import { useDeeds } from "@/app/_components/palette/deed-registry";
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
  const again = () =>
    start(
      attempt(async () => {
        const { id } = await runAgain(run);
        router.push(`/${workspace}/runs/${id}`);
      }),
    );
  const againPlace = useRef<HTMLButtonElement>(null);
  const hadLife = useRef(isLive(run.status));
  useEffect(() => {
    const ended = hadLife.current && !isLive(run.status);
    hadLife.current = isLive(run.status);
    // The button that cancelled it is gone, and the focus with it: the one that takes that back stands in its place.
    if (ended && document.activeElement === document.body) againPlace.current?.focus();
  }, [run.status]);
  const againButton = (words: string, ref?: Ref<HTMLButtonElement>) => (
    <Button ref={ref} busy={starting} onClick={again}>
      {starting ? "Queueing…" : words}
    </Button>
  );
  const mayStop = isLive(run.status) && mayCancel;
  const halt = () => stop(attempt(async () => onRun(await cancel(run.id))));
  const paths = {
    compare: `/${workspace}/runs/compare?runs=${run.id}&with=before`,
    report: `/${workspace}/runs/${run.id}/report`,
    netlist: `/${workspace}/netlists/${run.netlistId}`,
  };
  useDeeds("here", [
    { id: "compare", words: "Compare with another run", also: "difference overlay", does: paths.compare },
    { id: "report", words: "Report to print", also: "pdf paper export", does: paths.report },
    ...(mayStop ? [{ id: "cancel", words: "Cancel run", also: "stop abort", does: halt }] : []),
    ...(mayAgain ? [{ id: "again", words: "Run again", also: "queue once more repeat", does: again }] : []),
    { id: "netlist", words: "Open netlist", also: "sheet text edit", does: paths.netlist },
    {
      id: "revision",
      words: `Revision ${run.revision} of the netlist`,
      also: "text",
      does: `${paths.netlist}/revisions/${run.revision}`,
    },
  ]);
  return (
    <>
      <PageHeader
        title={run.title}
        remark={`revision ${run.revision} · run ${run.number} · ${sizeInWords(run, proved)}`}
        actions={
          <>
            <ButtonLink href={paths.compare} prefetch={false}>
              Compare
            </ButtonLink>
            <ButtonLink href={paths.report} prefetch={false}>
              Report
            </ButtonLink>
            <ExportMenu workspace={workspace} run={run} figure={figure} attempt={attempt} />
            {mayStop && (
              <Button busy={cancelling} onClick={halt}>
                {cancelling ? "Cancelling…" : "Cancel run"}
              </Button>
            )}
            {mayAgain && againButton("Run again", againPlace)}
            <ButtonLink href={paths.netlist} prefetch={false}>
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
