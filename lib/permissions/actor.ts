export const ROLES = ["viewer", "engineer", "reviewer", "admin"] as const;
export type Role = (typeof ROLES)[number];

/** Somebody who is signed in. */
export interface User {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly sessionId: string;
}

/** Somebody who is signed in, acting in one workspace with the role the database gives at this request. */
export interface Actor extends User {
  readonly workspaceId: string;
  readonly workspaceSlug: string;
  readonly role: Role;
}
