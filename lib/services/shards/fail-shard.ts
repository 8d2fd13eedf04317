import { and, eq, exists, inArray, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { appendEvent } from "@/lib/services/events/append-event";
import { type ClaimKey, heldBy, RUN_OPEN } from "./lease";

/**
 * Ends the run of a claimed shard as failed, with `sentence` as the reason people read: what went wrong and how to mend it. What
 * other shards stored stays. "refused", and nothing written, when the claim is not the newest or the run has ended meanwhile.
 */
export async function failShard(claim: ClaimKey, sentence: string): Promise<"failed" | "refused"> {
  return database().transaction(async (transaction) => {
    const held = transaction.select({ index: shard.index }).from(shard).where(heldBy(claim));
    const failed = await transaction
      .update(run)
      .set({ status: "failed", error: sentence, finishedAt: sql`now()` })
      .where(and(eq(run.id, claim.runId), inArray(run.status, RUN_OPEN), exists(held)))
      .returning({ id: run.id });
    if (failed.length === 0) return "refused";
    await appendEvent(transaction, claim.runId, "status");
    return "failed";
  });
}
