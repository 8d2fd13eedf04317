import { eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { database, type Queryable } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { workspace } from "@/db/schema/workspace";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { hashOf, titleIn } from "./canonical";
import { createInput, fitText } from "./schemas";

/**
 * A new netlist with its first revision. It is called what its text says, else `title`, else "Untitled". The text may have
 * mistakes: they are told while writing, and stop a run.
 */
export async function createNetlist(
  actor: Actor,
  input: z.input<typeof createInput>,
): Promise<{ id: string }> {
  authorize(actor, "netlist.write", { workspaceId: actor.workspaceId });
  const { title, text, message } = readInput(createInput, input);
  fitText(text);
  const hash = hashOf(text);
  return database().transaction(async (tx) => {
    const [made] = await tx
      .insert(netlist)
      .values({
        workspaceId: actor.workspaceId,
        number: await nextNumber(tx, actor.workspaceId),
        title: titleIn(text) ?? (title || "Untitled"),
        createdBy: actor.userId,
        latestRevision: 1,
      })
      .returning({ id: netlist.id });
    const { id } = made!;
    await tx
      .insert(revision)
      .values({ netlistId: id, number: 1, hash, text, message: message || null, authorId: actor.userId });
    return { id };
  });
}

async function nextNumber(tx: Queryable, workspaceId: string): Promise<number> {
  const [row] = await tx
    .update(workspace)
    .set({ lastNetlistNumber: sql`${workspace.lastNetlistNumber} + 1` })
    .where(eq(workspace.id, workspaceId))
    .returning({ number: workspace.lastNetlistNumber });
  return row!.number;
}
