import type { SearchProgress } from "@/db/schema/event";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Verdict } from "@/lib/analyses/result";

export type RunStatus = (typeof run.$inferSelect)["status"];

/** A run as lists show it. Times are ISO 8601. */
export interface RunRow {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly netlistId: string;
  readonly netlistNumber: number;
  readonly revision: number;
  readonly hash: string;
  readonly status: RunStatus;
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** How far the search for several operating points is; null where the text does not ask for them. */
  readonly search: SearchProgress | null;
  readonly queuedAt: string;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
  /** Of the requirements; null before they are judged and where there are none. */
  readonly verdict: Verdict | null;
  /** One sentence why the whole run could not be computed; null otherwise. */
  readonly error: string | null;
  /** Name of whoever queued it. */
  readonly requestedBy: string;
  readonly engineVersion: string;
  readonly lastEvent: number;
}

/** What a query selects for `rowOf`; it joins netlist, revision and user. The plan stays out, since it may be large. */
export const RUN_COLUMNS = {
  id: run.id,
  number: run.number,
  title: run.title,
  netlistId: run.netlistId,
  netlistNumber: netlist.number,
  revision: run.revisionNumber,
  hash: revision.hash,
  status: run.status,
  points: run.points,
  pointsDone: run.pointsDone,
  pointsFailed: run.pointsFailed,
  rowsSought: run.rowsSought,
  rowsDone: run.rowsDone,
  queuedAt: run.queuedAt,
  startedAt: run.startedAt,
  finishedAt: run.finishedAt,
  verdict: run.verdict,
  error: run.error,
  requestedBy: user.name,
  engineVersion: run.engineVersion,
  lastEvent: run.lastEvent,
};

type Selected = Omit<RunRow, "search" | "queuedAt" | "startedAt" | "finishedAt"> & {
  readonly rowsSought: number;
  readonly rowsDone: number;
  readonly queuedAt: Date;
  readonly startedAt: Date | null;
  readonly finishedAt: Date | null;
};

/** A selected row with its times as strings. */
export function rowOf<R extends Selected>({ rowsSought, rowsDone, ...row }: R) {
  return {
    ...row,
    search: rowsSought === 0 ? null : { rows: rowsSought, rowsDone },
    queuedAt: row.queuedAt.toISOString(),
    startedAt: row.startedAt?.toISOString() ?? null,
    finishedAt: row.finishedAt?.toISOString() ?? null,
  };
}
