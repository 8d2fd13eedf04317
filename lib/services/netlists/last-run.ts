import { and, desc, eq, type SQL } from "drizzle-orm";
import type { Queryable } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Verdict } from "@/lib/analyses/result";

/** The newest run of a netlist, as lists show it. */
export interface LastRun {
  readonly id: string;
  readonly number: number;
  readonly status: (typeof run.$inferSelect)["status"];
  readonly verdict: Verdict | null;
  readonly points: number;
  readonly pointsFailed: number;
}

/** A lateral subquery with the newest run of the netlist of the row outside. */
export function lastRunOf(db: Queryable) {
  return newest(db, eq(run.netlistId, netlist.id));
}

/** As `lastRunOf`, of the revision of the row outside. */
export function lastRunOfRevision(db: Queryable) {
  return newest(db, and(eq(run.netlistId, revision.netlistId), eq(run.revisionNumber, revision.number)));
}

function newest(db: Queryable, ofRow: SQL | undefined) {
  return db
    .select({
      id: run.id,
      number: run.number,
      status: run.status,
      verdict: run.verdict,
      points: run.points,
      pointsFailed: run.pointsFailed,
    })
    .from(run)
    .where(ofRow)
    .orderBy(desc(run.number))
    .limit(1)
    .as("last_run");
}

/** What is selected of a last run, which may be missing. */
export function shownRun(lastRun: ReturnType<typeof newest>) {
  const { id, number, status, verdict, points, pointsFailed } = lastRun;
  return { id, number, status, verdict, points, pointsFailed };
}

/** What every query of netlists selects; it joins the owner and, at its side, `lastRun`. */
export function netlistColumns(lastRun: ReturnType<typeof newest>) {
  return {
    id: netlist.id,
    number: netlist.number,
    title: netlist.title,
    owner: user.name,
    updatedAt: netlist.updatedAt,
    revision: netlist.latestRevision,
    lastRun: shownRun(lastRun),
  };
}
