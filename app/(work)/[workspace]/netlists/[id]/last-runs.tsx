"use client";

import { useQuery } from "@tanstack/react-query";
import Link from "next/link";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { formatCount } from "@/app/_components/ui/count";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { ProgressLine } from "@/app/_components/ui/states";
import { When } from "@/app/_components/ui/when";
import { ask } from "./ask";
import { RUNS_SHOWN, type RunLine, type RunLines } from "./run-line";

interface Props {
  readonly workspace: string;
  readonly netlistId: string;
  /** Only the runs of this revision. */
  readonly revision?: number;
  readonly title: string;
  readonly first: RunLines;
}

/** The latest runs of this netlist with their state; looked up every two seconds while one of them moves. */
export function LastRuns({ workspace, netlistId, revision, title, first }: Props) {
  const { data, error, refetch } = useQuery({
    queryKey: ["runs", workspace, netlistId, revision ?? "all"],
    initialData: first,
    queryFn: async () => {
      const search = new URLSearchParams({ workspace, netlistId, page: "1", size: String(RUNS_SHOWN) });
      if (revision !== undefined) search.set("revision", String(revision));
      const answer = await ask<RunLines>(`/api/v1/runs?${search}`);
      if (!answer.ok) throw new Error(answer.detail);
      return answer.body;
    },
    refetchInterval: (query) => (query.state.data?.rows.some(isMoving) ? 2000 : false),
  });
  return (
    <section aria-labelledby="last-runs">
      <div className="flex min-h-7 items-center justify-between gap-4">
        <h2 id="last-runs" className="caption">
          {revision === undefined ? "Last runs" : `Runs of revision ${revision}`}
        </h2>
        {data.total > RUNS_SHOWN && (
          <ButtonLink
            size="small"
            tone="quiet"
            href={`/${workspace}/runs?query=${encodeURIComponent(title)}`}
          >
            All {formatCount(data.total)}
          </ButtonLink>
        )}
      </div>
      {error !== null && (
        <p role="alert" className="mt-2 text-broken text-sm">
          This list may be out of date. {error.message}{" "}
          <Button size="small" onClick={() => refetch()}>
            Try again
          </Button>
        </p>
      )}
      {data.rows.length === 0 ? (
        <p className="mt-2 border-y py-3 text-quiet text-sm">
          Not run yet. The curves of the first run will be listed here.
        </p>
      ) : (
        <ul className="mt-2 border-t">
          {data.rows.map((run, index) => (
            <RunItem key={run.id} workspace={workspace} run={run} newest={index === 0} />
          ))}
        </ul>
      )}
    </section>
  );
}

interface ItemProps {
  readonly workspace: string;
  readonly run: RunLine;
  readonly newest: boolean;
}

// The newest run is fetched ahead with the code of its page, so that the page of the next one stands at once.
function RunItem({ workspace, run, newest }: ItemProps) {
  return (
    <li className="grid gap-1 border-b py-2">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <Link
          href={`/${workspace}/runs/${run.id}`}
          prefetch={newest ? true : null}
          className="inline-block min-h-6 font-semibold text-sm underline-offset-3 hover:underline"
        >
          Run {run.number}
        </Link>
        <StateBadge state={shownState(run)} failed={run.pointsFailed} />
      </div>
      <p className="text-quiet text-xs">
        revision {run.revision}, {formatCount(run.points)} points, {run.requestedBy},{" "}
        <When iso={run.queuedAt} />
      </p>
      {run.error !== null && <p className="text-quiet text-xs">{run.error}</p>}
      {isMoving(run) && <ProgressLine done={run.pointsDone} total={run.points} label={`Run ${run.number}`} />}
    </li>
  );
}

function isMoving({ status }: RunLine): boolean {
  return status === "queued" || status === "running";
}
