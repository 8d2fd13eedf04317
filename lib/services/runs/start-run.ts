import { and, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { database, type Queryable } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { workspace } from "@/db/schema/workspace";
import { compile } from "@/lib/analyses/compile";
import type { Plan } from "@/lib/analyses/plan";
import { shardsOf } from "@/lib/analyses/strands";
import { ENGINE_VERSION } from "@/lib/analyses/version";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { enqueueShards } from "@/lib/queue/producer";
import { appendEvent } from "../events/append-event";
import { addRevision } from "../netlists/add-revision";
import { findNetlist, type NetlistRecord } from "../netlists/find-netlist";
import { fitText } from "../netlists/schemas";
import { readInput } from "../read-input";
import { startInput } from "./schemas";

/**
 * Queues a run of revision `base`; when `text` is given and differs from the newest revision, it is saved as the next one first.
 * Throws "invalid" with `details.diagnostics` when the text has errors (nothing is saved then), and "conflict" with
 * `details.latest` when the text was written upon a revision that is no longer the newest.
 */
export async function startRun(
  actor: Actor,
  input: z.input<typeof startInput>,
): Promise<{ id: string; number: number }> {
  const { netlistId, base, text } = readInput(startInput, input);
  const asked = await findNetlist(database(), actor, netlistId);
  authorize(actor, "run.start", asked);
  if (text !== undefined) authorize(actor, "netlist.write", asked);
  const plan = planOf(text ?? (await textOf(asked.id, base)));
  const shards = shardsOf(plan);
  const made = await database().transaction(async (tx) => {
    const locked = await findNetlist(tx, actor, netlistId, true);
    authorize(actor, "run.start", locked);
    const saved = text === undefined ? base : (await addRevision(tx, actor, locked, { base, text })).revision;
    const added = await insertRun(tx, actor, locked, saved, plan, shards.length);
    const rows = shards.map(({ from, to }, index) => ({ runId: added.id, index, from, to }));
    await tx.insert(shard).values(rows);
    await appendEvent(tx, added.id, "status");
    return added;
  });
  try {
    await enqueueShards(shards.map((_, index) => ({ runId: made.id, index })));
  } catch (error) {
    // The run stands in the table; the worker's sweep for lost shards puts it on the queue.
    console.warn(`Run ${made.id} waits for the sweep of the table, since the queue did not answer.`, error);
  }
  return made;
}

async function textOf(netlistId: string, number: number): Promise<string> {
  const [row] = await database()
    .select({ text: revision.text })
    .from(revision)
    .where(and(eq(revision.netlistId, netlistId), eq(revision.number, number)));
  if (row === undefined) throw new AppError("not found", `This netlist has no revision ${number}.`);
  return row.text;
}

function planOf(text: string): Plan {
  fitText(text);
  const { diagnostics, job } = compile(text);
  if (job !== null) return job.plan;
  const errors = diagnostics.filter(({ severity }) => severity === "error").length;
  const counted = errors === 1 ? "an error" : `${errors} errors`;
  throw new AppError("invalid", `The netlist has ${counted}, so it cannot run. Mend it and queue again.`, {
    diagnostics,
  });
}

async function insertRun(
  tx: Queryable,
  actor: Actor,
  of: NetlistRecord,
  revisionNumber: number,
  plan: Plan,
  shards: number,
): Promise<{ id: string; number: number }> {
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
      title: plan.title || of.title,
      plan,
      points: plan.points,
      shardsLeft: shards,
      requestedBy: actor.userId,
      engineVersion: ENGINE_VERSION,
    })
    .returning({ id: run.id, number: run.number });
  return made!;
}
