import { describe, expect, it } from "vitest";
import { makeActor, makeNetlist, makeWorkspace } from "@/db/factories";
import { archiveNetlist } from "@/lib/services/netlists/archive-netlist";
import { bringBackNetlist } from "@/lib/services/netlists/bring-back-netlist";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { listNetlists } from "@/lib/services/netlists/list-netlists";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

describe("archiving a netlist", () => {
  it("takes it out of the list into that of the archived ones, and bringing it back undoes just that", async () => {
    const actor = await makeActor();
    const [kept, gone] = [await makeNetlist(actor), await makeNetlist(actor)];
    const before = await listNetlists(actor, {});
    const ids = async (which: "in use" | "archived") =>
      (await listNetlists(actor, { which })).rows.map(({ id }) => id);

    expect(await archiveNetlist(actor, gone.id)).toEqual({ archived: true });
    expect(await archiveNetlist(actor, gone.id)).toEqual({ archived: true });
    expect(await ids("in use")).toEqual([kept.id]);
    expect(await ids("archived")).toEqual([gone.id]);
    expect((await getNetlist(actor, gone.id)).isArchived).toBe(true);

    expect(await bringBackNetlist(actor, gone.id)).toEqual({ archived: false });
    expect(await listNetlists(actor, {})).toEqual(before);
    expect(await ids("archived")).toEqual([]);
    expect((await getNetlist(actor, gone.id)).isArchived).toBe(false);
  });

  it.each(["engineer", "reviewer", "admin"] as const)("is for writers: %s", async (role) => {
    const workspaceId = await makeWorkspace();
    const { id } = await makeNetlist(await makeActor("engineer", workspaceId));
    const actor = await makeActor(role, workspaceId);
    await archiveNetlist(actor, id);
    await bringBackNetlist(actor, id);
  });

  it("is not for viewers, and there is no netlist to archive for a member of another workspace", async () => {
    const workspaceId = await makeWorkspace();
    const { id } = await makeNetlist(await makeActor("engineer", workspaceId));
    const viewer = await makeActor("viewer", workspaceId);
    const stranger = await makeActor("admin");
    for (const verb of [archiveNetlist, bringBackNetlist]) {
      await expect(verb(viewer, id)).rejects.toMatchObject({ code: "not allowed" });
      await expect(verb(stranger, id)).rejects.toMatchObject({ code: "not found" });
    }
  });
});
