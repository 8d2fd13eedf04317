import { describe, expect, it, vi } from "vitest";
import { DIODE_TEXT, makeActor, makeNetlist, makeRun, makeWorkspace } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { duplicateRevision } from "@/lib/services/netlists/duplicate-revision";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { listRevisions } from "@/lib/services/netlists/list-revisions";
import { restoreRevision } from "@/lib/services/netlists/restore-revision";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { Summaries } from "@/lib/services/netlists/summaries";
import { listRuns } from "@/lib/services/runs/list-runs";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

const plain = (text: string | null) => text?.replaceAll("\u202f", " ") ?? null;
const SECOND = DIODE_TEXT.replace("2 fA", "3 fA");
const THIRD = SECOND.replace("5 per decade", "10 per decade");

/** A netlist of three revisions. */
async function threeRevisions(actor: Actor): Promise<string> {
  const { id } = await makeNetlist(actor);
  await saveRevision(actor, { netlistId: id, base: 1, text: SECOND, message: "More leakage" });
  await saveRevision(actor, { netlistId: id, base: 2, text: THIRD });
  return id;
}

describe("listRevisions", () => {
  it("lets whoever else waits come between two texts that it compares", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    let turn = 0;
    let isOver = false;
    const next = () => {
      turn += 1;
      if (!isOver) setImmediate(next);
    };
    next();
    const turns: number[] = [];
    const compared = vi.spyOn(Summaries.prototype, "of").mockImplementation(() => {
      turns.push(turn);
      return null;
    });
    try {
      await listRevisions(actor, { netlistId });
    } finally {
      compared.mockRestore();
      isOver = true;
    }
    expect(turns).toHaveLength(2);
    expect(turns[1]).toBeGreaterThan(turns[0]!);
  });

  it("lists the newest first, with who, message, and what changed in short", async () => {
    const actor = await makeActor("engineer", undefined, "Ilse Invented");
    const netlistId = await threeRevisions(actor);
    const { rows, total } = await listRevisions(actor, { netlistId });
    expect(total).toBe(3);
    expect(rows.map(({ number, message, author, lastRun }) => [number, message, author, lastRun])).toEqual([
      [3, null, "Ilse Invented", null],
      [2, "More leakage", "Ilse Invented", null],
      [1, null, "Ilse Invented", null],
    ]);
    expect(rows.map(({ changes }) => plain(changes))).toEqual([
      "sweep of I_in from 1 nA to 1 mA, 10 per decade",
      "junction Is 3 fA instead of 2 fA",
      null,
    ]);
    expect(rows.every(({ hash }) => /^[0-9a-f]{64}$/.test(hash))).toBe(true);
  });

  it("pages, and compares the last row of a page with the first of the next", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    const one = await listRevisions(actor, { netlistId, page: 2, size: 1 });
    expect(one).toMatchObject({ total: 3, rows: [{ number: 2 }] });
    expect(plain(one.rows[0]!.changes)).toBe("junction Is 3 fA instead of 2 fA");
  });

  it("says of a text with errors that it has them, and of comments that nothing else changed", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    await saveRevision(actor, { netlistId: id, base: 1, text: `# a note\n${DIODE_TEXT}` });
    await saveRevision(actor, { netlistId: id, base: 2, text: `${DIODE_TEXT}let late = 10k\n` });
    await saveRevision(actor, { netlistId: id, base: 3, text: SECOND });
    const { rows } = await listRevisions(actor, { netlistId: id });
    expect(rows.map(({ changes }) => changes)).toEqual([
      "The text before it has errors",
      "The text has errors",
      "Comments or layout only",
      null,
    ]);
  });

  it("leaves long texts uncompared", async () => {
    const actor = await makeActor();
    const long = `${"# a comment that is only long\n".repeat(2_000)}${DIODE_TEXT}`;
    const { id } = await makeNetlist(actor, long);
    await saveRevision(actor, { netlistId: id, base: 1, text: long.replace("2 fA", "3 fA") });
    const { rows } = await listRevisions(actor, { netlistId: id });
    expect(rows.map(({ changes }) => changes)).toEqual([null, null]);
  });

  it("gives each revision the newest run of its own", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const old = await makeRun(actor, { netlistId: id });
    await saveRevision(actor, { netlistId: id, base: 1, text: SECOND });
    await makeRun(actor, { netlistId: id });
    const newest = await makeRun(actor, { netlistId: id });
    const { rows } = await listRevisions(actor, { netlistId: id });
    expect(rows.map(({ lastRun }) => lastRun?.id)).toEqual([newest.id, old.id]);
    const { rows: runs } = await listRuns(actor, { netlistId: id, revision: 1 });
    expect(runs.map((one) => one.id)).toEqual([old.id]);
  });
});

describe("getRevision", () => {
  it("gives the text as it was saved", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    const found = await getRevision(actor, netlistId, 2);
    expect(found).toMatchObject({ netlistId, number: 2, text: SECOND, message: "More leakage" });
  });

  it.each([0, 4, -1, 1.5, Number.NaN, 2 ** 40])("has no revision %d", async (number) => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    await expect(getRevision(actor, netlistId, number)).rejects.toMatchObject({ code: "not found" });
  });
});

describe("restoreRevision", () => {
  it("adds the old text as a new revision that says so, and can be taken back the same way", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    const restored = await restoreRevision(actor, { netlistId, number: 1, base: 3 });
    expect(restored).toMatchObject({ revision: 4, changed: true });
    expect(await getRevision(actor, netlistId, 4)).toMatchObject({
      text: DIODE_TEXT,
      hash: (await getRevision(actor, netlistId, 1)).hash,
      message: "Text of revision 1 restored",
    });
    const undone = await restoreRevision(actor, { netlistId, number: 3, base: 4, message: "Taken back" });
    expect(undone).toMatchObject({ revision: 5, changed: true });
    expect(await getRevision(actor, netlistId, 5)).toMatchObject({ text: THIRD, message: "Taken back" });
  });

  it("adds nothing where the newest has that text already", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    expect(await restoreRevision(actor, { netlistId, number: 3, base: 3 })).toMatchObject({
      revision: 3,
      changed: false,
    });
  });

  it("does not put aside a newer revision that the reader has not seen", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    await expect(restoreRevision(actor, { netlistId, number: 1, base: 2 })).rejects.toMatchObject({
      code: "conflict",
      details: { latest: 3 },
    });
  });
});

describe("duplicateRevision", () => {
  it("makes a netlist of its own with the text of that revision under another title", async () => {
    const actor = await makeActor();
    const netlistId = await threeRevisions(actor);
    const { id } = await duplicateRevision(actor, { netlistId, number: 2 });
    expect(id).not.toBe(netlistId);
    expect(await getNetlist(actor, id)).toMatchObject({
      title: "Copy of A diode",
      revision: 1,
      text: SECOND.replace("A diode", "Copy of A diode"),
    });
    expect((await getRevision(actor, id, 1)).message).toBe("Made from revision 2 of netlist 1");
  });

  it("keeps a text without a title to the letter", async () => {
    const actor = await makeActor();
    const text = DIODE_TEXT.replace('title "A diode"\n', "");
    const { id: netlistId } = await makeNetlist(actor, text);
    const { id } = await duplicateRevision(actor, { netlistId, number: 1 });
    expect(await getNetlist(actor, id)).toMatchObject({ title: "Copy of Untitled", text });
  });
});

describe("who may", () => {
  const deeds: [string, (actor: Actor, netlistId: string) => Promise<unknown>, boolean][] = [
    ["list", (actor, netlistId) => listRevisions(actor, { netlistId }), true],
    ["read one", (actor, netlistId) => getRevision(actor, netlistId, 1), true],
    ["restore", (actor, netlistId) => restoreRevision(actor, { netlistId, number: 1, base: 3 }), false],
    ["duplicate", (actor, netlistId) => duplicateRevision(actor, { netlistId, number: 1 }), false],
  ];

  it.each(deeds)("%s", async (_, deed, viewerMay) => {
    const workspace = await makeWorkspace();
    for (const role of ["viewer", "engineer", "reviewer", "admin"] as const) {
      const netlistId = await threeRevisions(await makeActor("engineer", workspace));
      const actor = await makeActor(role, workspace);
      const done = deed(actor, netlistId);
      if (role !== "viewer" || viewerMay) await expect(done).resolves.toBeDefined();
      else await expect(done).rejects.toMatchObject({ code: "not allowed" });
    }
  });

  it.each(deeds)("not %s what is another workspace's, or nobody's", async (_, deed) => {
    const netlistId = await threeRevisions(await makeActor());
    for (const id of [netlistId, "00000000-0000-4000-8000-000000000000", "nothing"]) {
      await expect(deed(await makeActor("admin"), id)).rejects.toMatchObject({ code: "not found" });
    }
  });
});
