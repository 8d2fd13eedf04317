import Link from "next/link";
import { ButtonLink } from "@/app/_components/ui/button";
import { classNames } from "@/app/_components/ui/class-names";
import { formatCount } from "@/app/_components/ui/count";
import { Sparkline } from "@/app/_components/ui/sparkline";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { EmptyState } from "@/app/_components/ui/states";
import { Cell, HeadCell, Table } from "@/app/_components/ui/table";
import { When } from "@/app/_components/ui/when";
import type { HomeRun } from "./home-run";

const WIDE = "hidden md:table-cell";

/** The latest runs, each with its first trace in small. */
export function RecentRuns({
  workspace,
  runs,
}: {
  readonly workspace: string;
  readonly runs: readonly HomeRun[];
}) {
  return (
    <section aria-labelledby="recent" className="min-w-0">
      <div className="flex min-h-7 items-center justify-between">
        <h2 id="recent" className="caption">
          Recent runs
        </h2>
        <ButtonLink size="small" tone="quiet" href={`/${workspace}/runs`}>
          All runs
        </ButtonLink>
      </div>
      {runs.length === 0 ? (
        <EmptyState title="No runs yet">
          <p>Open a netlist and queue a run; its curve will stand here.</p>
        </EmptyState>
      ) : (
        <Table aria-labelledby="recent">
          <thead>
            <tr>
              <HeadCell>Run</HeadCell>
              <HeadCell className={WIDE}>First trace</HeadCell>
              <HeadCell figure className={WIDE}>
                Points
              </HeadCell>
              <HeadCell className={classNames(WIDE, "lg:hidden xl:table-cell")}>Queued</HeadCell>
              <HeadCell className="w-28 md:w-auto">State</HeadCell>
            </tr>
          </thead>
          <tbody>
            {runs.map((run) => (
              <tr key={run.id}>
                <Cell>
                  <Link
                    href={`/${workspace}/runs/${run.id}`}
                    className="inline-block min-h-6 break-words font-semibold underline-offset-3 hover:underline"
                  >
                    {run.title}
                  </Link>
                  <p className="text-quiet text-xs">
                    run {run.number}, revision {run.revision}, {run.requestedBy}
                  </p>
                </Cell>
                <Cell className={WIDE}>{run.sparkline !== null && <Sparkline data={run.sparkline} />}</Cell>
                <Cell figure className={WIDE}>
                  {formatCount(run.points)}
                </Cell>
                <Cell className={classNames(WIDE, "lg:hidden xl:table-cell")}>
                  <When iso={run.queuedAt} />
                </Cell>
                <Cell>
                  <StateBadge state={shownState(run)} failed={run.pointsFailed} />
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </section>
  );
}
