import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { AppError } from "@/lib/errors";
import { ROLES, type Role } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { ACTIONS, type Action, can } from "@/lib/permissions/can";

/** The table of roles in the product's design, row by row: who may do what. */
const TABLE: Readonly<Record<Action, Readonly<Record<Role, boolean>>>> = {
  "workspace.read": { viewer: true, engineer: true, reviewer: true, admin: true },
  "netlist.read": { viewer: true, engineer: true, reviewer: true, admin: true },
  "netlist.write": { viewer: false, engineer: true, reviewer: true, admin: true },
  "run.read": { viewer: true, engineer: true, reviewer: true, admin: true },
  "run.start": { viewer: false, engineer: true, reviewer: true, admin: true },
  "run.cancel": { viewer: false, engineer: true, reviewer: true, admin: true },
};

const HERE = "5b1c0e34-64d4-4d6e-9a1c-0d6b0f6a7c01";

function actor(role: Role, workspaceId = HERE) {
  return { userId: "u", name: "n", email: "e", sessionId: "s", workspaceId, workspaceSlug: "bench", role };
}

function refusal(work: () => void): string | null {
  try {
    work();
    return null;
  } catch (error) {
    return error instanceof AppError ? error.code : "another error";
  }
}

describe("can", () => {
  it.each(ACTIONS.flatMap((action) => ROLES.map((role) => ({ action, role }))))(
    "$action as $role is as the table of roles says",
    ({ action, role }) => {
      expect(can(actor(role), action, { workspaceId: HERE })).toBe(TABLE[action][role]);
    },
  );

  it("allows nobody anything in another workspace", () => {
    const another = fc.uuid().filter((id) => id !== HERE);
    fc.assert(
      fc.property(
        fc.constantFrom(...ROLES),
        fc.constantFrom(...ACTIONS),
        another,
        (role, action, workspaceId) => {
          expect(can(actor(role), action, { workspaceId })).toBe(false);
        },
      ),
    );
  });
});

describe("authorize", () => {
  it("answers 'not found' for another workspace's thing and for none, whatever the role", () => {
    const elsewhere = fc.option(
      fc.uuid().filter((id) => id !== HERE),
      { nil: undefined },
    );
    fc.assert(
      fc.property(
        fc.constantFrom(...ROLES),
        fc.constantFrom(...ACTIONS),
        elsewhere,
        (role, action, workspaceId) => {
          const resource = workspaceId === undefined ? undefined : { workspaceId };
          expect(refusal(() => authorize(actor(role), action, resource))).toBe("not found");
        },
      ),
    );
  });

  it.each(ACTIONS.flatMap((action) => ROLES.map((role) => ({ action, role }))))(
    "$action as $role at home is let through or 'not allowed'",
    ({ action, role }) => {
      const expected = TABLE[action][role] ? null : "not allowed";
      expect(refusal(() => authorize(actor(role), action, { workspaceId: HERE }))).toBe(expected);
    },
  );
});
