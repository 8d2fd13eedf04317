import { and, eq, inArray, lt, or, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { leaseEnd, RUN_OPEN } from "./lease";

/** The right to compute a shard and to write its result. It lasts until the lease ends or a newer attempt is made. */
export interface Claim {
  readonly runId: string;
  readonly index: number;
  /** Counts claims of this shard from 1: the newest alone is heard. */
  readonly attempt: number;
  /** Whether the points are to be solved, or their branches to be looked for. */
  readonly kind: "points" | "branches";
  /** The flat points [from, to) of the run. */
  readonly from: number;
  readonly to: number;
  /** Points of the whole run. */
  readonly points: number;
  /** The netlist text of the run's revision. */
  readonly text: string;
  /** The engine that the run was planned with. */
  readonly engineVersion: string;
  /** Whether the run had been begun before this claim. */
  readonly begun: boolean;
}

export type Claimed =
  | { readonly kind: "claimed"; readonly claim: Claim }
  /** Another worker holds the lease for so long, ms. */
  | { readonly kind: "held"; readonly milliseconds: number }
  /** Nothing to do: the shard is stored, or its run has ended or never was. */
  | { readonly kind: "over" };

/**
 * Claims a shard for `worker` by one conditional update: when it is queued, or its lease has run out, and its run goes on. Of two
 * that try at once, one gets it.
 */
export async function claimShard(input: {
  readonly runId: string;
  readonly index: number;
  readonly worker: string;
  readonly leaseSeconds: number;
}): Promise<Claimed> {
  const { runId, index, worker, leaseSeconds } = input;
  const db = database();
  const [row] = await db
    .update(shard)
    .set({
      status: "running",
      attempt: sql`${shard.attempt} + 1`,
      claimedAt: sql`now()`,
      claimedBy: worker,
      leaseUntil: leaseEnd(leaseSeconds),
      pointsUnderWay: 0,
    })
    .from(run)
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .where(
      and(
        eq(shard.runId, runId),
        eq(shard.index, index),
        eq(run.id, runId),
        inArray(run.status, RUN_OPEN),
        or(eq(shard.status, "queued"), and(eq(shard.status, "running"), lt(shard.leaseUntil, sql`now()`))),
      ),
    )
    .returning({
      attempt: shard.attempt,
      kind: shard.kind,
      from: shard.from,
      to: shard.to,
      points: run.points,
      text: revision.text,
      engineVersion: run.engineVersion,
      status: run.status,
    });
  if (row !== undefined) {
    const { status, ...rest } = row;
    return { kind: "claimed", claim: { runId, index, ...rest, begun: status === "running" } };
  }
  const [holder] = await db
    .select({ milliseconds: sql<number>`(extract(epoch FROM ${shard.leaseUntil} - now()) * 1000)::float8` })
    .from(shard)
    .innerJoin(run, eq(run.id, shard.runId))
    .where(
      and(
        eq(shard.runId, runId),
        eq(shard.index, index),
        eq(shard.status, "running"),
        inArray(run.status, RUN_OPEN),
      ),
    );
  return holder === undefined
    ? { kind: "over" }
    : { kind: "held", milliseconds: Math.max(0, holder.milliseconds) };
}
