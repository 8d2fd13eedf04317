import type { Actor, Role } from "./actor";

const EVERYONE: readonly Role[] = ["viewer", "engineer", "reviewer", "admin"];
const WRITERS: readonly Role[] = ["engineer", "reviewer", "admin"];

/** Who may do what (the table of roles). */
const ALLOWED = {
  "workspace.read": EVERYONE,
  "netlist.read": EVERYONE,
  "netlist.write": WRITERS,
  "run.read": EVERYONE,
  "run.start": WRITERS,
  "run.cancel": WRITERS,
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof ALLOWED;
export const ACTIONS = Object.keys(ALLOWED) as readonly Action[];

/** What an action is done to: anything that belongs to a workspace. */
export interface Resource {
  readonly workspaceId: string;
}

/** Whether `actor` may do `action` to `resource`. Nobody may do anything in a workspace other than the one they act in. */
export function can(actor: Pick<Actor, "workspaceId" | "role">, action: Action, resource: Resource): boolean {
  const allowed: readonly Role[] = ALLOWED[action];
  return actor.workspaceId === resource.workspaceId && allowed.includes(actor.role);
}
