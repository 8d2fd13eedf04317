import { and, eq } from "drizzle-orm";
import { z } from "zod";
import type { Queryable } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import type { Actor } from "@/lib/permissions/actor";

export type NetlistRecord = typeof netlist.$inferSelect;

/**
 * The netlist of that id in the actor's workspace, for `authorize` to judge; undefined when there is none. With `lock` its row
 * stays locked to the end of the transaction `db`.
 */
export async function findNetlist(
  db: Queryable,
  actor: Actor,
  id: string,
  lock = false,
): Promise<NetlistRecord | undefined> {
  if (!z.uuid().safeParse(id).success) return undefined;
  const found = db
    .select()
    .from(netlist)
    .where(and(eq(netlist.id, id), eq(netlist.workspaceId, actor.workspaceId)));
  const [row] = await (lock ? found.for("update") : found);
  return row;
}
