import { and, eq, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { user } from "@/db/schema/user";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findNetlist } from "./find-netlist";
import { lastRunOf, netlistColumns } from "./last-run";
import type { NetlistRow } from "./list-netlists";

/** A netlist with the text of its newest revision. */
export interface NetlistDetail extends NetlistRow {
  readonly text: string;
  /** SHA-256 of the canonical text. */
  readonly hash: string;
  readonly isArchived: boolean;
}

/** Throws "not found" for a netlist that is not in the actor's workspace. */
export async function getNetlist(actor: Actor, id: string): Promise<NetlistDetail> {
  const db = database();
  const asked = await findNetlist(db, actor, id);
  authorize(actor, "netlist.read", asked);
  const lastRun = lastRunOf(db);
  const [row] = await db
    .select({ ...netlistColumns(lastRun), text: revision.text, hash: revision.hash })
    .from(netlist)
    .innerJoin(user, eq(user.id, netlist.createdBy))
    .innerJoin(revision, and(eq(revision.netlistId, netlist.id), eq(revision.number, netlist.latestRevision)))
    .leftJoinLateral(lastRun, sql`true`)
    .where(eq(netlist.id, asked.id));
  return { ...row!, updatedAt: row!.updatedAt.toISOString(), isArchived: asked.archivedAt !== null };
}
