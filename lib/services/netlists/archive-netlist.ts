import { and, eq, isNull } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findNetlist } from "./find-netlist";

/**
 * Takes a netlist out of the lists. Its revisions, its runs and every link to them stay, and `bringBackNetlist` undoes it; archiving
 * it again changes nothing.
 */
export async function archiveNetlist(actor: Actor, netlistId: string): Promise<{ archived: true }> {
  const db = database();
  const asked = await findNetlist(db, actor, netlistId);
  authorize(actor, "netlist.write", asked);
  await db
    .update(netlist)
    .set({ archivedAt: new Date() })
    .where(and(eq(netlist.id, asked.id), isNull(netlist.archivedAt)));
  return { archived: true };
}
