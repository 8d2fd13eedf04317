import { and, eq } from "drizzle-orm";
import type { z } from "zod";
import { database } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { compile } from "@/lib/analyses/compile";
import type { Plan } from "@/lib/analyses/plan";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { enqueueShards } from "@/lib/queue/producer";
import { addRevision } from "../netlists/add-revision";
import { findNetlist } from "../netlists/find-netlist";
import { fitText } from "../netlists/schemas";
import { readInput } from "../read-input";
import { type AddedRun, addRun } from "./add-run";
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
  const added = await database().transaction(async (tx) => {
    if (text === undefined) return addRun(tx, actor, asked, base, plan);
    const locked = await findNetlist(tx, actor, netlistId, true);
    authorize(actor, "run.start", locked);
    const saved = await addRevision(tx, actor, locked, { base, text });
    return addRun(tx, actor, locked, saved.revision, plan);
  });
  await enqueue(added);
  return { id: added.id, number: added.number };
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

/** The run stands in the table by now: should the queue not answer, the worker's sweep for lost shards puts it there later. */
async function enqueue({ id, shards }: AddedRun): Promise<void> {
  try {
    await enqueueShards(Array.from({ length: shards }, (_, index) => ({ runId: id, index })));
  } catch (error) {
    console.warn(`Run ${id} waits for the sweep of the table, since the queue did not answer.`, error);
  }
}
