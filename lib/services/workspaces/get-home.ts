import { and, asc, count, desc, eq, gt, inArray, isNull, or, type SQL } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Verdict } from "@/lib/analyses/result";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import type { RunStatus } from "../runs/run-columns";
import { type SparklineData, sparklinesOf } from "../runs/sparkline";

/** Rows of each part of the page, at most. */
const MOST = { failing: 10, running: 10, recent: 8 } as const;

/** A run as the home page lists it; `sparkline` only among the recent ones. */
export interface HomeRun {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly revision: number;
  readonly status: RunStatus;
  readonly verdict: Verdict | null;
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** ISO 8601. */
  readonly queuedAt: string;
  readonly requestedBy: string;
  readonly error: string | null;
  readonly sparkline: SparklineData | null;
}

export interface Home {
  readonly counts: { readonly netlists: number; readonly runs: number };
  /** Newest runs of netlists that failed, left points unsolved, or broke a requirement; the newest first. */
  readonly failing: readonly HomeRun[];
  /** Queued and running, the oldest first. */
  readonly running: readonly HomeRun[];
  readonly recentRuns: readonly HomeRun[];
}

/** What needs attention in the actor's workspace, and its newest runs with a small curve of each. */
export async function getHome(actor: Actor): Promise<Home> {
  authorize(actor, "workspace.read", { workspaceId: actor.workspaceId });
  const db = database();
  const inWorkspace = eq(run.workspaceId, actor.workspaceId);
  const newest = db
    .selectDistinctOn([run.netlistId], { id: run.id })
    .from(run)
    .innerJoin(netlist, and(eq(netlist.id, run.netlistId), isNull(netlist.archivedAt)))
    .where(inWorkspace)
    .orderBy(run.netlistId, desc(run.number));
  const broken = or(
    eq(run.status, "failed"),
    and(eq(run.status, "done"), or(gt(run.pointsFailed, 0), inArray(run.verdict, ["broken", "no data"]))),
  );
  const [netlists, runs, failing, running, recent] = await Promise.all([
    db
      .select({ total: count() })
      .from(netlist)
      .where(and(eq(netlist.workspaceId, actor.workspaceId), isNull(netlist.archivedAt))),
    db.select({ total: count() }).from(run).where(inWorkspace),
    runsWhere(and(inWorkspace, inArray(run.id, newest), broken), desc(run.number), MOST.failing),
    runsWhere(and(inWorkspace, inArray(run.status, ["queued", "running"])), asc(run.number), MOST.running),
    runsWhere(inWorkspace, desc(run.number), MOST.recent),
  ]);
  const curves = await sparklinesOf(recent.map(({ id }) => id));
  return {
    counts: { netlists: netlists[0]?.total ?? 0, runs: runs[0]?.total ?? 0 },
    failing,
    running,
    recentRuns: recent.map((row) => ({ ...row, sparkline: curves.get(row.id) ?? null })),
  };
}

async function runsWhere(matches: SQL | undefined, order: SQL, most: number): Promise<HomeRun[]> {
  const rows = await database()
    .select({
      id: run.id,
      number: run.number,
      title: run.title,
      revision: run.revisionNumber,
      status: run.status,
      verdict: run.verdict,
      points: run.points,
      pointsDone: run.pointsDone,
      pointsFailed: run.pointsFailed,
      queuedAt: run.queuedAt,
      requestedBy: user.name,
      error: run.error,
    })
    .from(run)
    .innerJoin(user, eq(user.id, run.requestedBy))
    .where(matches)
    .orderBy(order)
    .limit(most);
  return rows.map((row) => ({ ...row, queuedAt: row.queuedAt.toISOString(), sparkline: null }));
}
