import { and, eq, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { run } from "@/db/schema/run";
import { appendEvent } from "@/lib/services/events/append-event";

/** Sets a queued run to running, with its event. Changes nothing in any other state. */
export async function beginRun(runId: string): Promise<void> {
  await database().transaction(async (transaction) => {
    const begun = await transaction
      .update(run)
      .set({ status: "running", startedAt: sql`now()` })
      .where(and(eq(run.id, runId), eq(run.status, "queued")))
      .returning({ id: run.id });
    if (begun.length > 0) await appendEvent(transaction, runId, "status");
  });
}
