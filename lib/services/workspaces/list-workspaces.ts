import { asc, eq } from "drizzle-orm";
import { database } from "@/db/client";
import { membership } from "@/db/schema/membership";
import { workspace } from "@/db/schema/workspace";
import type { Role, User } from "@/lib/permissions/actor";

export interface WorkspaceRow {
  readonly slug: string;
  readonly name: string;
  readonly role: Role;
}

/** The workspaces `user` is a member of, by name. Needs no authorisation: one always may know one's own memberships. */
export async function listWorkspaces(user: User): Promise<WorkspaceRow[]> {
  return database()
    .select({ slug: workspace.slug, name: workspace.name, role: membership.role })
    .from(membership)
    .innerJoin(workspace, eq(workspace.id, membership.workspaceId))
    .where(eq(membership.userId, user.userId))
    .orderBy(asc(workspace.name));
}
