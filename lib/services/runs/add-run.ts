import { eq, sql } from "drizzle-orm";
import type { Queryable } from "@/db/client";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { workspace } from "@/db/schema/workspace";
import { type Plan, rowLength, soughtRows } from "@/lib/analyses/plan";
import { shardsOf } from "@/lib/analyses/strands";
import { ENGINE_VERSION } from "@/lib/analyses/version";
import type { Actor } from "@/lib/permissions/actor";
import { appendEvent } from "../events/append-event";
import { asTitle } from "../netlists/canonical";
import type { NetlistRecord } from "../netlists/find-netlist";
import { previewOf } from "./preview";

export interface AddedRun {
  readonly id: string;
  readonly number: number;
  /** How many shards it was cut into; they are numbered from 0. */
  readonly shards: number;
}

/**
 * Writes a queued run of a revision with its shards and its first event, inside the transaction `tx`. Nothing is put on the
 * queue. For services that have authorised it.
 */
export async function addRun(
  tx: Queryable,
  actor: Actor,
  of: Pick<NetlistRecord, "id" | "title">,
  revisionNumber: number,
  plan: Plan,
): Promise<AddedRun> {
  const points = shardsOf(plan);
  const rows = soughtRows(plan);
  const length = rowLength(plan);
  const shards = [
    ...points.map((range) => ({ kind: "points" as const, ...range })),
    ...Array.from({ length: rows }, (_, row) => {
      return { kind: "branches" as const, from: row * length, to: (row + 1) * length };
    }),
  ];
  const [taken] = await tx
    .update(workspace)
    .set({ lastRunNumber: sql`${workspace.lastRunNumber} + 1` })
    .where(eq(workspace.id, actor.workspaceId))
    .returning({ number: workspace.lastRunNumber });
  const [made] = await tx
    .insert(run)
    .values({
      workspaceId: actor.workspaceId,
      number: taken!.number,
      netlistId: of.id,
      revisionNumber,
      title: asTitle(plan.title) || of.title,
      plan,
      preview: previewOf(plan),
      points: plan.points,
      shardsLeft: shards.length,
      rowsSought: rows,
      requestedBy: actor.userId,
      engineVersion: ENGINE_VERSION,
    })
    .returning({ id: run.id, number: run.number });
  const { id, number } = made!;
  await tx.insert(shard).values(shards.map((one, index) => ({ runId: id, index, ...one })));
  await appendEvent(tx, id, "status");
  return { id, number, shards: shards.length };
}
