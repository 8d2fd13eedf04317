import type { Role } from "@/lib/permissions/actor";

/** The invented people of the demo's invented workspace, one of each role. */
export const DEMO_PEOPLE = [
  { email: "vera.viewer@northbench.example", name: "Vera Viewer", role: "viewer" },
  { email: "erik.engineer@northbench.example", name: "Erik Engineer", role: "engineer" },
  { email: "rosa.reviewer@northbench.example", name: "Rosa Reviewer", role: "reviewer" },
  { email: "adam.admin@northbench.example", name: "Adam Admin", role: "admin" },
] as const satisfies readonly { email: string; name: string; role: Role }[];
