import { eq } from "drizzle-orm";
import { database } from "@/db/client";
import { overview } from "@/db/schema/overview";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findRun } from "./find-run";

/** Whether a run has an overview: large ones get it when they are judged. */
export async function hasRunOverview(actor: Actor, id: string): Promise<boolean> {
  const asked = await findRun(database(), actor, id);
  authorize(actor, "run.read", asked);
  return (await database().$count(overview, eq(overview.runId, asked.id))) > 0;
}

/** What a large run looks like from afar (lib/analyses/overview.ts). Throws "not found" for a run without an overview. */
export async function getRunOverview(actor: Actor, id: string): Promise<Uint8Array<ArrayBuffer>> {
  const asked = await findRun(database(), actor, id);
  authorize(actor, "run.read", asked);
  const [row] = await database()
    .select({ data: overview.data })
    .from(overview)
    .where(eq(overview.runId, asked.id));
  if (row === undefined) throw new AppError("not found", "This run is read as a whole: it has no overview.");
  return Uint8Array.from(row.data);
}
