import { eq, sql } from "drizzle-orm";
import type { Queryable } from "@/db/client";
import { type EventData, event, type eventKind } from "@/db/schema/event";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { RUN_CHANNEL } from "./channel";

/** Points of running shards that are solved but not stored yet. */
const underWay = sql<number>`coalesce((
  select sum(${shard.pointsUnderWay}) from ${shard}
  where ${shard.runId} = ${run.id} and ${shard.status} = 'running'
), 0)::int`;

/**
 * Records the state that the run row has now as its next event, inside the caller's transaction, and wakes readers at commit.
 * Locks the run row until then, so that sequences have no gaps. Undefined when there is no such run.
 */
export async function appendEvent(
  tx: Queryable,
  runId: string,
  kind: (typeof eventKind.enumValues)[number],
): Promise<(EventData & { readonly sequence: number }) | undefined> {
  const [row] = await tx
    .update(run)
    .set({ lastEvent: sql`${run.lastEvent} + 1` })
    .where(eq(run.id, runId))
    .returning({
      sequence: run.lastEvent,
      status: run.status,
      points: run.points,
      pointsDone: run.pointsDone,
      pointsFailed: run.pointsFailed,
      rows: run.rowsSought,
      rowsDone: run.rowsDone,
      underWay,
    });
  if (row === undefined) return undefined;
  const { sequence, underWay: more, rows, rowsDone, ...counts } = row;
  const state: EventData = rows === 0 ? counts : { ...counts, search: { rows, rowsDone } };
  const live = state.status === "running" || state.status === "queued";
  const data: EventData = live
    ? { ...state, pointsDone: Math.min(state.points, state.pointsDone + more) }
    : state;
  await tx.insert(event).values({ runId, sequence, kind, data });
  await tx.execute(sql`select pg_notify(${RUN_CHANNEL}, ${`${runId} ${state.status}`})`);
  return { ...data, sequence };
}
