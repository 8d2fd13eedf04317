import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { enqueueShards } from "@/lib/queue/producer";

/** Shards put back by one sweep, at most; the oldest first. */
const MOST = 1_000;

/**
 * Puts shards on the queue again whose job may be lost: queued for longer than `queuedSeconds`, or under a lease that has run out;
 * and the first shard of runs that are done and not judged.
 * Where the queue still has the job, adding it again does nothing. Answers how many shards were tried. Several sweeps at once
 * take different shards.
 */
export async function requeueLost(input: { readonly queuedSeconds: number }): Promise<number> {
  const { rows } = await database().execute<{ runId: string; index: number }>(sql`
    WITH lost AS (
      SELECT shard.run_id, shard.index
      FROM shard JOIN run ON run.id = shard.run_id
      WHERE run.status IN ('queued', 'running') AND (
        shard.status = 'queued' AND shard.queued_at < now() - make_interval(secs => ${input.queuedSeconds}::float8)
        OR shard.status = 'running' AND shard.lease_until < now())
      ORDER BY shard.queued_at, shard.index
      LIMIT ${MOST}
      FOR NO KEY UPDATE OF shard SKIP LOCKED
    )
    UPDATE shard SET queued_at = now() FROM lost
    WHERE shard.run_id = lost.run_id AND shard.index = lost.index
    RETURNING shard.run_id AS "runId", shard.index`);
  const unjudged = await database().execute<{ runId: string; index: number }>(sql`
    SELECT run.id AS "runId", 0 AS index FROM run
    WHERE run.status = 'done' AND run.judged_at IS NULL
      AND run.finished_at < now() - make_interval(secs => ${input.queuedSeconds}::float8)
    ORDER BY run.finished_at LIMIT ${MOST}`);
  rows.push(...unjudged.rows);
  if (rows.length > 0) await enqueueShards(rows.toSorted((a, b) => a.index - b.index));
  return rows.length;
}
