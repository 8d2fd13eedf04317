import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { shard } from "@/db/schema/shard";
import { type ClaimKey, heldBy } from "./lease";

/** Gives a claim back, so that any worker may take the shard at once. Changes nothing when the claim is not the newest. */
export async function releaseShard(claim: ClaimKey): Promise<void> {
  await database()
    .update(shard)
    .set({ status: "queued", queuedAt: sql`now()`, leaseUntil: null, pointsUnderWay: 0 })
    .where(heldBy(claim));
}
