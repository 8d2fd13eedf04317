import { and, count, eq, inArray } from "drizzle-orm";
import type { z } from "zod";
import { database, type Queryable } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
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

/** Runs that one person may have queued or running in a workspace at a time. */
export const MOST_OPEN = 50;

/**
 * Queues a run of revision `base`; when `text` is given and differs from the newest revision, it is saved as the next one first.
 * Throws "invalid" with `details.diagnostics` when the text has errors (nothing is saved then), and "conflict" with
 * `details.latest` when the text was written upon a revision that is no longer the newest. Throws "too many" to a person who has
 * 50 runs open already.
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
  const { ahead, ...added } = await database().transaction(async (tx) => {
    if (text === undefined) return within(tx, actor, await addRun(tx, actor, asked, base, plan));
    const locked = await findNetlist(tx, actor, netlistId, true);
    authorize(actor, "run.start", locked);
    const saved = await addRevision(tx, actor, locked, { base, text });
    return within(tx, actor, await addRun(tx, actor, locked, saved.revision, plan));
  });
  await enqueue(added, ahead);
  return { id: added.id, number: added.number };
}

/**
 * The run that has just been added, and how many others the actor has open. Counted after adding, which holds the row of the
 * workspace, so that nobody adds beside it.
 */
async function within(tx: Queryable, actor: Actor, added: AddedRun): Promise<AddedRun & { ahead: number }> {
  const [open] = await tx
    .select({ runs: count() })
    .from(run)
    .where(
      and(
        eq(run.workspaceId, actor.workspaceId),
        inArray(run.status, ["queued", "running"]),
        eq(run.requestedBy, actor.userId),
      ),
    );
  const ahead = open!.runs - 1;
  if (ahead < MOST_OPEN) return { ...added, ahead };
  throw new AppError(
    "too many",
    `You have ${ahead} runs queued or running, and ${MOST_OPEN} is the most. Wait until one has ended, or cancel one.`,
  );
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
async function enqueue({ id, shards }: AddedRun, ahead: number): Promise<void> {
  try {
    await enqueueShards(
      Array.from({ length: shards }, (_, index) => ({ runId: id, index })),
      ahead,
    );
  } catch (error) {
    console.warn(`Run ${id} waits for the sweep of the table, since the queue did not answer.`, error);
  }
}
