import { and, eq, inArray, sql } from "drizzle-orm";
import { type Database, database, type Queryable } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import type { StoredRow } from "@/lib/services/chunks/branch-columns";
import type { StoredShard } from "@/lib/services/chunks/columns";
import { appendEvent } from "@/lib/services/events/append-event";
import type { Claim } from "./claim-shard";
import { heldBy, RUN_OPEN } from "./lease";

/** Rows put in by one statement: eight parameters each, and PostgreSQL takes 65,535. */
const ROWS = 500;

/** What a shard came to: its solved points, or the branches of its row. */
export type ShardOutcome = StoredShard | StoredRow;

/**
 * Stores the result of a claimed shard: its chunks, its row, the counts of the run and an event, all or nothing. The last shard of
 * a run sets the run done. "refused", and nothing written, when the claim is not the newest or the run has ended meanwhile.
 * Storing once more what this claim has stored already changes nothing and answers "stored".
 */
export async function completeShard(claim: Claim, result: ShardOutcome): Promise<"stored" | "refused"> {
  const db = database();
  const written = await write(db, claim, result);
  if (written) return "stored";
  const { runId, index, attempt } = claim;
  const [row] = await db
    .select({ status: shard.status, attempt: shard.attempt })
    .from(shard)
    .where(and(eq(shard.runId, runId), eq(shard.index, index)));
  return row?.status === "done" && row.attempt === attempt ? "stored" : "refused";
}

class Refused extends Error {}

async function write(db: Database, claim: Claim, result: ShardOutcome): Promise<boolean> {
  try {
    await db.transaction(async (transaction) => {
      const done = await transaction
        .update(shard)
        .set({
          status: "done",
          leaseUntil: null,
          pointsUnderWay: 0,
          ...("found" in result
            ? { found: result.found }
            : { failures: result.failures, unstable: result.unstable }),
        })
        .where(heldBy(claim))
        .returning({ index: shard.index });
      if (done.length === 0) throw new Refused();
      await addChunks(transaction, claim, result);
      if (!(await count(transaction, claim, result))) throw new Refused();
      await appendEvent(transaction, claim.runId, "progress");
    });
    return true;
  } catch (error) {
    if (error instanceof Refused) return false;
    throw error;
  }
}

async function addChunks(transaction: Queryable, claim: Claim, { columns }: ShardOutcome): Promise<void> {
  const rows = columns.flatMap(({ column, chunks }) =>
    chunks.map(({ data, ...one }) => ({
      runId: claim.runId,
      shardIndex: claim.index,
      column,
      ...one,
      data: Buffer.from(data.buffer, data.byteOffset, data.byteLength),
    })),
  );
  for (let from = 0; from < rows.length; from += ROWS) {
    await transaction.insert(chunk).values(rows.slice(from, from + ROWS));
  }
}

/** Adds the shard to the counts of its run; false when the run has ended. */
async function count(transaction: Queryable, claim: Claim, result: ShardOutcome): Promise<boolean> {
  const last = sql`${run.shardsLeft} = 1`;
  const counts =
    "found" in result
      ? { rowsDone: sql`${run.rowsDone} + 1` }
      : {
          pointsDone: sql`${run.pointsDone} + ${claim.to - claim.from}`,
          pointsFailed: sql`${run.pointsFailed} + ${result.pointsFailed}`,
        };
  const counted = await transaction
    .update(run)
    .set({
      ...counts,
      shardsLeft: sql`${run.shardsLeft} - 1`,
      status: sql`CASE WHEN ${last} THEN 'done' ELSE 'running' END::run_status`,
      startedAt: sql`coalesce(${run.startedAt}, now())`,
      finishedAt: sql`CASE WHEN ${last} THEN now() END`,
    })
    .where(and(eq(run.id, claim.runId), inArray(run.status, RUN_OPEN)))
    .returning({ id: run.id });
  return counted.length > 0;
}
