"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { counted, formatCount } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { PageHeader } from "@/app/_components/ui/page-header";
import { formatSpan } from "@/app/_components/ui/span-of-time";
import { cancel, runAgain } from "./fetch-run";
import { isLive, type RunState } from "./run-shapes";

interface Props {
  readonly workspace: string;
  readonly run: RunState;
  readonly mayStart: boolean;
  readonly mayCancel: boolean;
  readonly onRun: (run: RunState) => void;
}

/** What was run, in one line, and what one can do about it. */
export function RunHeader({ workspace, run, mayStart, mayCancel, onRun }: Props) {
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
  return (
    <>
      <PageHeader
        title={run.title}
        remark={`run ${run.number}, revision ${run.revision}, ${sizeInWords(run)}`}
        actions={
          <>
            {isLive(run.status) && mayCancel && (
              <Button
                tone="danger"
                busy={cancelling}
                onClick={() => stop(attempt(async () => onRun(await cancel(run.id))))}
              >
                {cancelling ? "Cancelling…" : "Cancel run"}
              </Button>
            )}
            {!isLive(run.status) && mayStart && (
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
                {starting ? "Queueing…" : "Run again"}
              </Button>
            )}
            <ButtonLink href={`/${workspace}/netlists/${run.netlistId}`} prefetch={false}>
              Open netlist
            </ButtonLink>
          </>
        }
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

/** "4 × 301 points solved in 38 ms", the outer sweeps first. */
function sizeInWords({ plan, points, status, startedAt, finishedAt }: RunState): string {
  const factors = plan.axes.map(({ values }) => formatCount(values.length)).reverse();
  const size = factors.length > 1 ? `${factors.join(" × ")} points` : counted(points, "point");
  const took = status === "done" ? formatSpan(startedAt, finishedAt) : "";
  return took === "" ? size : `${size} solved in ${took}`;
}
