import { AppError } from "@/lib/errors";
import type { Actor } from "./actor";
import { type Action, can, type Resource } from "./can";

const DEEDS: Readonly<Record<Action, string>> = {
  "workspace.read": "read this workspace",
  "netlist.read": "read netlists",
  "netlist.write": "write netlists",
  "run.read": "read runs",
  "run.start": "queue runs",
  "run.cancel": "cancel runs",
};

/**
 * Throws unless `actor` may do `action`. A resource that is missing (undefined) or another workspace's is "not found", so that
 * nobody learns what others have; a role too low is "not allowed".
 */
export function authorize<R extends Resource>(
  actor: Actor,
  action: Action,
  resource: R | undefined,
): asserts resource is R {
  if (resource === undefined || resource.workspaceId !== actor.workspaceId) {
    throw new AppError("not found", "There is no such thing in this workspace.");
  }
  if (!can(actor, action, resource)) {
    throw new AppError(
      "not allowed",
      `As ${actor.role} you may not ${DEEDS[action]}. Ask an admin of the workspace for another role.`,
    );
  }
}
