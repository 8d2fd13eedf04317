import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { DIODE_TEXT, makeActor, makeNetlist, makeRun, makeWorkspace } from "@/db/factories";
import { run } from "@/db/schema/run";
import type { Actor } from "@/lib/permissions/actor";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { listNews } from "@/lib/services/workspaces/list-news";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

const changed = DIODE_TEXT.replace("2 fA", "3 fA");

/** A netlist of Ilse's, and Otto beside her in the workspace. */
async function bench() {
  const workspace = await makeWorkspace();
  const ilse = await makeActor("engineer", workspace, "Ilse Invented");
  const otto = await makeActor("viewer", workspace, "Otto Invented");
  const { id: netlistId } = await makeNetlist(ilse);
  const { now } = await listNews(ilse, { netlistId });
  return { ilse, otto, netlistId, after: now };
}

async function endedRun(actor: Actor, netlistId: string, row: Partial<typeof run.$inferInsert>) {
  const { id } = await makeRun(actor, { netlistId });
  await database().update(run).set(row).where(eq(run.id, id));
  return id;
}

describe("listNews", () => {
  it("tells nothing where nothing happened, and goes on by the clock of the database", async () => {
    const { ilse, netlistId, after } = await bench();
    const later = await listNews(ilse, { after, netlistId });
    expect(later).toMatchObject({ runs: [], revisions: [] });
    expect(Date.parse(later.now)).toBeGreaterThanOrEqual(Date.parse(after));
  });

  it("takes any moment, were it before all that a database can name", async () => {
    const { ilse, netlistId } = await bench();
    for (const after of ["0000-01-01T00:00:00Z", "0001-01-01T00:00:00Z", "9999-12-31T23:59:59Z"])
      expect((await listNews(ilse, { after, netlistId })).runs).toEqual([]);
  });

  it("tells again what happened within the seconds before, so that nothing falls between two answers", async () => {
    const { ilse, netlistId } = await bench();
    const now = new Date();
    const id = await endedRun(ilse, netlistId, { status: "done", finishedAt: now, judgedAt: now });
    const first = await listNews(ilse, {});
    expect(first.runs.map((one) => one.id)).toEqual([id]);
    expect((await listNews(ilse, { after: first.now })).runs).toEqual(first.runs);
  });

  it("tells of runs that ended: one's own anywhere, others' of the netlist looked at, done ones when judged", async () => {
    const { ilse, otto, netlistId, after } = await bench();
    const now = new Date();
    const judged = await endedRun(ilse, netlistId, {
      status: "done",
      finishedAt: now,
      judgedAt: now,
      verdict: "broken",
    });
    await endedRun(ilse, netlistId, { status: "done", finishedAt: now });
    await endedRun(ilse, netlistId, { status: "failed", finishedAt: new Date(now.getTime() - 60_000) });
    const own = await listNews(ilse, { after });
    expect(own.runs).toMatchObject([
      { id: judged, verdict: "broken", isOwn: true, requestedBy: "Ilse Invented" },
    ]);
    expect((await listNews(otto, { after })).runs).toEqual([]);
    expect((await listNews(otto, { after, netlistId })).runs).toMatchObject([{ id: judged, isOwn: false }]);
  });

  it("tells of revisions that others saved of the netlist looked at, not of one's own", async () => {
    const { ilse, otto, netlistId, after } = await bench();
    await saveRevision(ilse, { netlistId, base: 1, text: changed });
    expect((await listNews(ilse, { after, netlistId })).revisions).toEqual([]);
    const { revisions } = await listNews(otto, { after, netlistId });
    // The first one was saved within the seconds that are looked back.
    expect(revisions.at(-1)).toMatchObject({ netlistId, number: 2, author: "Ilse Invented" });
  });

  it("tells nothing of another workspace", async () => {
    const { ilse, netlistId, after } = await bench();
    await saveRevision(ilse, { netlistId, base: 1, text: changed });
    const stranger = await makeActor("admin");
    expect(await listNews(stranger, { after, netlistId })).toMatchObject({ runs: [], revisions: [] });
  });

  it("refuses what is no moment", async () => {
    await expect(listNews(await makeActor(), { after: "yesterday" })).rejects.toMatchObject({
      code: "invalid",
    });
  });
});
