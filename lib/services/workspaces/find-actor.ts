import { and, eq, type SQL } from "drizzle-orm";
import { z } from "zod";
import { database } from "@/db/client";
import { membership } from "@/db/schema/membership";
import { netlist } from "@/db/schema/netlist";
import { run } from "@/db/schema/run";
import { workspace } from "@/db/schema/workspace";
import type { Actor, User } from "@/lib/permissions/actor";

/** How a request names its workspace: by slug, or by a thing that belongs to it. */
export type Whereabouts =
  | { readonly slug: string }
  | { readonly netlistId: string }
  | { readonly runId: string };

/** What may be a slug: anything else is asked of no database, which would choke on a NUL. */
const SLUG = /^[\w-]{1,100}$/;

/**
 * `user` as a member of a workspace, with the role the database holds now. Null when there is no such workspace or thing, or
 * when the user is no member: the two look the same from outside. For lib/auth alone.
 */
export async function findActor(user: User, where: Whereabouts): Promise<Actor | null> {
  const db = database();
  let match: SQL | undefined;
  if ("slug" in where) {
    // A server action may be sent anything for a text.
    if (typeof where.slug !== "string" || !SLUG.test(where.slug)) return null;
    match = eq(workspace.slug, where.slug);
  } else {
    const id = "runId" in where ? where.runId : where.netlistId;
    if (!z.uuid().safeParse(id).success) return null;
    const thing = "runId" in where ? run : netlist;
    match = eq(workspace.id, db.select({ id: thing.workspaceId }).from(thing).where(eq(thing.id, id)));
  }
  const [row] = await db
    .select({ workspaceId: workspace.id, workspaceSlug: workspace.slug, role: membership.role })
    .from(membership)
    .innerJoin(workspace, eq(workspace.id, membership.workspaceId))
    .where(and(eq(membership.userId, user.userId), match));
  return row === undefined ? null : { ...user, ...row };
}
