import { headers } from "next/headers";
import { AppError } from "@/lib/errors";
import type { Actor, User } from "@/lib/permissions/actor";
import { findUser } from "@/lib/services/sessions/find-user";
import { findActor, type Whereabouts } from "@/lib/services/workspaces/find-actor";
import { sessionIdIn } from "./session-cookie";

/**
 * Who sends the present request; null when signed out or when the session has ended. Route handlers pass their request, pages and
 * server actions nothing. Nothing is remembered between requests.
 */
export async function currentUser(request?: Request): Promise<User | null> {
  const cookieHeader = (request?.headers ?? (await headers())).get("cookie");
  const sessionId = await sessionIdIn(cookieHeader);
  return sessionId === null ? null : findUser(sessionId);
}

/** The member behind the request in the workspace of that slug. Throws "signed out", or "not found" for those who are no member. */
export function actorFor(workspaceSlug: string, request?: Request): Promise<Actor> {
  return actorAt({ slug: workspaceSlug }, request);
}

/** As `actorFor`, in the workspace that a netlist belongs to. */
export function actorForNetlist(netlistId: string, request?: Request): Promise<Actor> {
  return actorAt({ netlistId }, request);
}

/** As `actorFor`, in the workspace that a run belongs to. */
export function actorForRun(runId: string, request?: Request): Promise<Actor> {
  return actorAt({ runId }, request);
}

async function actorAt(where: Whereabouts, request: Request | undefined): Promise<Actor> {
  const user = await currentUser(request);
  if (user === null) throw new AppError("signed out", "You are signed out. Sign in and try again.");
  const actor = await findActor(user, where);
  if (actor === null) throw new AppError("not found", "There is no such thing, or it is not yours to see.");
  return actor;
}
