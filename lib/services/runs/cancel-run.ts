import { and, eq, inArray, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { run } from "@/db/schema/run";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { appendEvent } from "../events/append-event";
import { findRun } from "./find-run";
import { getRun, type RunSummary } from "./get-run";

/**
 * Stops a run that is queued or running; what is stored of it stays. Cancelling it again changes nothing. Throws "conflict" when
 * it has finished otherwise. Its workers learn of it by the event and at their next word with the database.
 */
export async function cancelRun(actor: Actor, id: string): Promise<RunSummary> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.cancel", asked);
  await db.transaction(async (tx) => {
    const [stopped] = await tx
      .update(run)
      .set({ status: "cancelled", finishedAt: sql`now()` })
      .where(and(eq(run.id, asked.id), inArray(run.status, ["queued", "running"])))
      .returning({ id: run.id });
    if (stopped !== undefined) await appendEvent(tx, asked.id, "status");
  });
  const after = await getRun(actor, asked.id);
  if (after.status !== "cancelled") {
    throw new AppError(
      "conflict",
      `Run ${after.number} has finished already, so there is nothing to cancel.`,
      {
        status: after.status,
      },
    );
  }
  return after;
}
