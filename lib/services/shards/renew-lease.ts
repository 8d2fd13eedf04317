import { and, eq, exists, inArray, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { event } from "@/db/schema/event";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { appendEvent } from "@/lib/services/events/append-event";
import { type ClaimKey, heldBy, leaseEnd, RUN_OPEN } from "./lease";

/** At most so many progress events a second for one run, however many shards are under way. */
const EVENTS_PER_SECOND = 5;

/**
 * Holds a claim for another `leaseSeconds` and notes how many of its points are solved. "lost" says that the work is for nothing:
 * the run was cancelled or failed, or somebody else has claimed the shard.
 */
export async function renewLease(
  claim: ClaimKey,
  input: { readonly leaseSeconds: number; readonly pointsUnderWay: number },
): Promise<"held" | "lost"> {
  const db = database();
  const open = db
    .select({ id: run.id })
    .from(run)
    .where(and(eq(run.id, claim.runId), inArray(run.status, RUN_OPEN)));
  const renewed = await db
    .update(shard)
    .set({ leaseUntil: leaseEnd(input.leaseSeconds), pointsUnderWay: input.pointsUnderWay })
    .where(and(heldBy(claim), exists(open)))
    .returning({ index: shard.index });
  if (renewed.length === 0) return "lost";
  if (input.pointsUnderWay > 0) await tellProgress(claim.runId);
  return "held";
}

/** Adds a progress event, unless the run's last event is quite new or another is being added. */
async function tellProgress(runId: string): Promise<void> {
  await database().transaction(async (transaction) => {
    const [held] = await transaction
      .select({ lastEvent: run.lastEvent })
      .from(run)
      .where(and(eq(run.id, runId), eq(run.status, "running")))
      .for("no key update", { skipLocked: true });
    if (held === undefined) return;
    // A look of its own: beside the lock it might see the event that was the last before the lock was got.
    const [recent] = await transaction
      .select({ sequence: event.sequence })
      .from(event)
      .where(
        and(
          eq(event.runId, runId),
          eq(event.sequence, held.lastEvent),
          sql`${event.at} > now() - make_interval(secs => ${1 / EVENTS_PER_SECOND}::float8)`,
        ),
      );
    if (recent === undefined) await appendEvent(transaction, runId, "progress");
  });
}
