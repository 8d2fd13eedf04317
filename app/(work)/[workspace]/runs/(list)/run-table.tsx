"use client";

import Link from "next/link";
import { classNames } from "@/app/_components/ui/class-names";
import { counted, formatCount } from "@/app/_components/ui/count";
import { formatSpan } from "@/app/_components/ui/span-of-time";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { ProgressLine } from "@/app/_components/ui/states";
import { Cell, HeadCell, Table } from "@/app/_components/ui/table";
import { When } from "@/app/_components/ui/when";
import type { RunRow } from "./use-runs";

/** Columns beside the title fold into a line under it where the page is narrow. */
const WIDE = "hidden md:table-cell";

export function RunTable({
  workspace,
  rows,
  stale,
  chosen,
  onChosen,
}: {
  readonly workspace: string;
  readonly rows: readonly RunRow[];
  /** The rows are of an earlier state while the new ones are fetched. */
  readonly stale: boolean;
  /** Ids of the runs chosen to be compared, in the order of choosing. */
  readonly chosen: readonly string[];
  readonly onChosen: (chosen: readonly string[]) => void;
}) {
  return (
    <Table aria-busy={stale} className={classNames("table-fixed md:table-auto", stale && "opacity-60")}>
      <caption className="sr-only">Runs, the newest first</caption>
      <thead>
        <tr>
          <HeadCell className="w-8">
            <span className="sr-only">Compare</span>
          </HeadCell>
          <HeadCell figure className={WIDE}>
            Run
          </HeadCell>
          <HeadCell>Netlist</HeadCell>
          <HeadCell className={WIDE}>Queued by</HeadCell>
          <HeadCell className={WIDE}>Queued</HeadCell>
          <HeadCell figure className={WIDE}>
            Points
          </HeadCell>
          <HeadCell figure className={WIDE}>
            Solved in
          </HeadCell>
          <HeadCell className="w-28 md:w-44">State</HeadCell>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id}>
            <Cell className="py-1!">
              <label className="flex size-7 items-center justify-center">
                <input
                  type="checkbox"
                  aria-label={`Compare run ${row.number}`}
                  checked={chosen.includes(row.id)}
                  onChange={({ target }) =>
                    onChosen(target.checked ? [...chosen, row.id] : chosen.filter((id) => id !== row.id))
                  }
                  className="size-3.5 accent-accent"
                />
              </label>
            </Cell>
            <Cell figure className={classNames(WIDE, "w-12 text-quiet")}>
              {row.number}
            </Cell>
            <Cell>
              <Link
                href={`/${workspace}/runs/${row.id}`}
                aria-label={`Run ${row.number} of ${row.title}`}
                className="inline-block min-h-6 break-words font-semibold underline-offset-3 hover:underline"
              >
                {row.title}
              </Link>
              <p className="text-quiet text-xs">
                revision {row.revision}
                <span className="md:hidden">
                  , run {row.number}, {row.requestedBy}, {counted(row.points, "point")},{" "}
                  <When iso={row.queuedAt} />
                </span>
              </p>
            </Cell>
            <Cell className={WIDE}>{row.requestedBy}</Cell>
            <Cell className={WIDE}>
              <When iso={row.queuedAt} />
            </Cell>
            <Cell figure className={WIDE}>
              {formatCount(row.points)}
            </Cell>
            <Cell figure className={WIDE}>
              {row.status === "done" ? formatSpan(row.startedAt, row.finishedAt) : ""}
            </Cell>
            <Cell>
              <StateBadge state={shownState(row)} failed={row.pointsFailed} />
              {row.status === "running" && (
                <ProgressLine done={row.pointsDone} total={row.points} label={`Run ${row.number}`} />
              )}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
