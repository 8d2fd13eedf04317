import { eq } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findNetlist } from "./find-netlist";

/** Puts an archived netlist back into the lists, as it was; one that was never archived stays as it is. */
export async function bringBackNetlist(actor: Actor, netlistId: string): Promise<{ archived: false }> {
  const db = database();
  const asked = await findNetlist(db, actor, netlistId);
  authorize(actor, "netlist.write", asked);
  await db.update(netlist).set({ archivedAt: null }).where(eq(netlist.id, asked.id));
  return { archived: false };
}
