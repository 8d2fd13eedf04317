import Link from "next/link";
import { counted, formatCount } from "@/app/_components/ui/count";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { StateMark } from "@/app/_components/ui/state-mark";
import { ProgressLine } from "@/app/_components/ui/states";
import type { HomeRun } from "./home-run";

/** What asks for somebody: runs under way with their progress, and netlists whose latest run failed or has failed points. */
export function Attention({
  workspace,
  failing,
  running,
}: {
  readonly workspace: string;
  readonly failing: readonly HomeRun[];
  readonly running: readonly HomeRun[];
}) {
  return (
    <section aria-labelledby="attention">
      <h2 id="attention" className="caption flex min-h-7 items-center">
        Needs attention
      </h2>
      {failing.length === 0 && running.length === 0 && (
        <p className="mt-2 flex items-baseline gap-2 border-y py-3 text-sm">
          <span className="text-holds">
            <StateMark shape="check" />
          </span>
          Nothing. Every netlist’s latest run solved all its points.
        </p>
      )}
      <ul className="mt-2 grid border-t empty:hidden">
        {running.map((run) => (
          <li key={run.id} className="grid gap-2 border-b py-3">
            <RunLine workspace={workspace} run={run} />
            <div className="flex items-center gap-4">
              <ProgressLine done={run.pointsDone} total={run.points} label={`Run ${run.number}`} />
              <span className="figures shrink-0 text-quiet text-xs">
                {formatCount(run.pointsDone)} of {counted(run.points, "point")}
              </span>
            </div>
          </li>
        ))}
        {failing.map((run) => (
          <li key={run.id} className="grid gap-1 border-b py-3">
            <RunLine workspace={workspace} run={run} />
            {run.error !== null && <p className="text-quiet text-sm">{run.error}</p>}
          </li>
        ))}
      </ul>
    </section>
  );
}

function RunLine({ workspace, run }: { readonly workspace: string; readonly run: HomeRun }) {
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
      <p className="min-w-0">
        <Link
          href={`/${workspace}/runs/${run.id}`}
          className="inline-block min-h-6 break-words font-semibold text-sm underline-offset-3 hover:underline"
        >
          {run.title}
        </Link>{" "}
        <span className="whitespace-nowrap text-quiet text-xs">
          run {run.number}, revision {run.revision}
        </span>
      </p>
      <StateBadge state={shownState(run)} failed={run.pointsFailed} />
    </div>
  );
}
