import { and, asc, eq, gt } from "drizzle-orm";
import { z } from "zod";
import { database } from "@/db/client";
import { type EventData, event } from "@/db/schema/event";
import { run } from "@/db/schema/run";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "@/lib/services/read-input";

const shape = z.object({
  runId: z.uuid(),
  /** Sequence of the last event already known; 0 for none. */
  after: z.number().int().nonnegative(),
});

/** Events given at once, at most; the rest follow on the next call. */
const MOST = 500;

export interface RunEvent {
  /** From 1 without gaps within the run. */
  readonly sequence: number;
  readonly kind: "progress" | "status";
  readonly data: EventData;
}

/** The events of a run after a known one, in order, 500 at most. Throws "not found" when the run is not the actor's to see. */
export async function listEvents(actor: Actor, input: z.input<typeof shape>): Promise<RunEvent[]> {
  const { runId, after } = readInput(shape, input);
  const db = database();
  const [found] = await db.select({ workspaceId: run.workspaceId }).from(run).where(eq(run.id, runId));
  authorize(actor, "run.read", found);
  return db
    .select({ sequence: event.sequence, kind: event.kind, data: event.data })
    .from(event)
    .where(and(eq(event.runId, runId), gt(event.sequence, after)))
    .orderBy(asc(event.sequence))
    .limit(MOST);
}
