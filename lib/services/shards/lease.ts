import { and, eq, type SQL, sql } from "drizzle-orm";
import { shard } from "@/db/schema/shard";
import type { Claim } from "./claim-shard";

/** The states of a run in which its shards may still be computed. */
export const RUN_OPEN: ("queued" | "running")[] = ["queued", "running"];

/** Which claim is meant. */
export type ClaimKey = Pick<Claim, "runId" | "index" | "attempt">;

/** When a lease of so many seconds from now ends, by the database's clock. */
export function leaseEnd(seconds: number): SQL {
  return sql`now() + make_interval(secs => ${seconds}::float8)`;
}

/** The shard of a claim that nobody has claimed since and whose result is not stored. */
export function heldBy({ runId, index, attempt }: ClaimKey): SQL | undefined {
  return and(
    eq(shard.runId, runId),
    eq(shard.index, index),
    eq(shard.attempt, attempt),
    eq(shard.status, "running"),
  );
}
