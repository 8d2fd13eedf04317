import { and, asc, desc, eq, gt, inArray, ne, or, sql } from "drizzle-orm";
import { z } from "zod";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Verdict } from "@/lib/analyses/result";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import type { RunStatus } from "../runs/run-columns";

export const newsInput = z.object({
  /** `now` of the answer before; without it the moment itself: what is told then is known already. */
  after: z.iso.datetime().optional(),
  /** The netlist that is being looked at. */
  netlistId: z.uuid().optional(),
});

/** News of each kind in one answer, the latest of them. */
const MOST = 5;
/** What was written by a transaction that began before the last answer and ended after it is still told: so far back is looked, s. */
const OVERLAP = 15;

export interface News {
  /** The moment of the answer by the clock of the database, ISO 8601. */
  readonly now: string;
  /** Runs that ended and are judged: the actor's own, and those of the netlist looked at. Some may have been told before. */
  readonly runs: readonly {
    readonly id: string;
    readonly number: number;
    readonly title: string;
    readonly netlistId: string;
    readonly status: RunStatus;
    readonly verdict: Verdict | null;
    readonly pointsFailed: number;
    readonly requestedBy: string;
    readonly isOwn: boolean;
  }[];
  /** Revisions of the netlist looked at that others saved. */
  readonly revisions: readonly {
    readonly netlistId: string;
    readonly number: number;
    readonly title: string;
    readonly author: string;
  }[];
}

/** What has happened in the actor's workspace that concerns them, since the last answer. */
export async function listNews(actor: Actor, input: z.input<typeof newsInput>): Promise<News> {
  authorize(actor, "workspace.read", { workspaceId: actor.workspaceId });
  const { after, netlistId } = readInput(newsInput, input);
  const db = database();
  const [clock] = (await db.execute<{ now: string }>(sql`select now()::text as now`)).rows;
  const now = new Date(clock!.now).toISOString();
  // PostgreSQL does not read years as JavaScript writes the first ones; before all of them nothing happened here.
  const since = new Date(Math.max(0, Date.parse(after ?? now) - OVERLAP * 1000));
  const isOwn = eq(run.requestedBy, actor.userId);
  const ended = or(
    and(inArray(run.status, ["failed", "cancelled"]), gt(run.finishedAt, since)),
    and(eq(run.status, "done"), gt(run.judgedAt, since)),
  );
  const [runs, revisions] = await Promise.all([
    db
      .select({
        id: run.id,
        number: run.number,
        title: run.title,
        netlistId: run.netlistId,
        status: run.status,
        verdict: run.verdict,
        pointsFailed: run.pointsFailed,
        requestedBy: user.name,
        isOwn: sql<boolean>`${isOwn}`,
      })
      .from(run)
      .innerJoin(user, eq(user.id, run.requestedBy))
      .where(
        and(
          eq(run.workspaceId, actor.workspaceId),
          ended,
          netlistId === undefined ? isOwn : or(isOwn, eq(run.netlistId, netlistId)),
        ),
      )
      .orderBy(desc(run.finishedAt))
      .limit(MOST),
    netlistId === undefined
      ? []
      : db
          .select({
            netlistId: revision.netlistId,
            number: revision.number,
            title: netlist.title,
            author: user.name,
          })
          .from(revision)
          .innerJoin(netlist, eq(netlist.id, revision.netlistId))
          .innerJoin(user, eq(user.id, revision.authorId))
          .where(
            and(
              eq(netlist.workspaceId, actor.workspaceId),
              eq(revision.netlistId, netlistId),
              ne(revision.authorId, actor.userId),
              gt(revision.createdAt, since),
            ),
          )
          .orderBy(asc(revision.number))
          .limit(MOST),
  ]);
  return { now, runs, revisions };
}
