import { eq, sql } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database, type Queryable } from "@/db/client";
import { DIODE_TEXT, makeActor, makeNetlist, makeRun, makeWorkspace } from "@/db/factories";
import { netlist } from "@/db/schema/netlist";
import { run } from "@/db/schema/run";
import type { Actor } from "@/lib/permissions/actor";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { listNetlists } from "@/lib/services/netlists/list-netlists";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { searching } from "@/lib/services/netlists/search";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

type Input = Parameters<typeof listNetlists>[1];

async function titled(actor: Actor, ...titles: string[]): Promise<string[]> {
  const ids: string[] = [];
  for (const title of titles) ids.push((await createNetlist(actor, { title, text: "" })).id);
  return ids;
}

async function titles(actor: Actor, input: Input): Promise<string[]> {
  return (await listNetlists(actor, input)).rows.map(({ title }) => title);
}

describe("the order of the list", () => {
  it("is by title, whatever the case of its letters, both ways", async () => {
    const actor = await makeActor();
    await titled(actor, "beta", "Alpha", "alpha two", "Gamma");
    const sorted = ["Alpha", "alpha two", "beta", "Gamma"];
    expect(await titles(actor, { sort: "title", direction: "ascending" })).toEqual(sorted);
    expect(await titles(actor, { sort: "title", direction: "descending" })).toEqual(sorted.toReversed());
  });

  it("is by the newest save unless asked otherwise", async () => {
    const actor = await makeActor();
    const [first] = await titled(actor, "one", "two", "three");
    await saveRevision(actor, { netlistId: first!, base: 1, text: "# a change\n" });
    expect(await titles(actor, {})).toEqual(["one", "three", "two"]);
  });

  it("is by owner", async () => {
    const room = await makeWorkspace();
    await titled(await makeActor("engineer", room, "Zoe Invented"), "by Zoe");
    const actor = await makeActor("engineer", room, "Abel Invented");
    await titled(actor, "by Abel");
    expect(await titles(actor, { sort: "owner", direction: "ascending" })).toEqual(["by Abel", "by Zoe"]);
  });

  it("is by the state of the newest run, those that never ran at the end", async () => {
    const actor = await makeActor();
    await titled(actor, "never");
    const text = (title: string) => DIODE_TEXT.replace("A diode", title);
    const { id: done } = await makeNetlist(actor, text("done"));
    const { id: queued } = await makeNetlist(actor, text("queued"));
    for (const netlistId of [done, done, queued]) await makeRun(actor, { netlistId });
    await database().update(run).set({ status: "done" }).where(eq(run.netlistId, done));
    const states = async (direction: "ascending" | "descending") =>
      (await listNetlists(actor, { sort: "status", direction })).rows.map(({ title, lastRun }) => [
        title,
        lastRun?.status ?? null,
        lastRun?.number ?? null,
      ]);
    const [one, other, last] = [
      ["queued", "queued", 3],
      ["done", "done", 2],
      ["never", null, null],
    ];
    expect(await states("ascending")).toEqual([one, other, last]);
    expect(await states("descending")).toEqual([other, one, last]);
  });
});

describe("pages of the list", () => {
  it("cover all rows once, in order, and know how many there are", async () => {
    const actor = await makeActor();
    await titled(actor, ..."gfedcba");
    const pages = await Promise.all(
      [1, 2, 3, 4].map((page) =>
        listNetlists(actor, { sort: "title", direction: "ascending", page, size: 3 }),
      ),
    );
    expect(pages.map(({ rows }) => rows.map(({ title }) => title).join(""))).toEqual(["abc", "def", "g", ""]);
    expect(pages.map(({ total }) => total)).toEqual([7, 7, 7, 7]);
  });

  it.each([
    { page: 0 },
    { size: 101 },
    { size: 0 },
    { page: 1.5 },
    { sort: "id; drop table run" as "title" },
  ])("refuse %j", async (input) => {
    await expect(listNetlists(await makeActor(), input)).rejects.toMatchObject({ code: "invalid" });
  });
});

describe("the search", () => {
  it("finds words in title, owner and newest text, in any order and case, and all have to occur", async () => {
    const actor = await makeActor("engineer", undefined, "Ottilie Invented");
    await createNetlist(actor, { title: "Ratio head", text: "# measures absorbance\n" });
    await createNetlist(actor, { title: "Root", text: "# flow\n" });
    expect(await titles(actor, { query: "RATIO" })).toEqual(["Ratio head"]);
    expect(await titles(actor, { query: "absorbance  ratio ottilie" })).toEqual(["Ratio head"]);
    expect(await titles(actor, { query: "flow ratio" })).toEqual([]);
    expect((await listNetlists(actor, { query: "ottilie" })).total).toBe(2);
  });

  it("looks at the newest text only", async () => {
    const actor = await makeActor();
    const { id } = await createNetlist(actor, { title: "x", text: "# oldword\n" });
    await saveRevision(actor, { netlistId: id, base: 1, text: "# newword\n" });
    expect(await titles(actor, { query: "oldword" })).toEqual([]);
    expect(await titles(actor, { query: "newword" })).toEqual(["x"]);
  });

  it.each(["%", "_", "\\", "50%_\\x", "'; drop table netlist; --", '"', "$1"])(
    "takes %j for itself, not for a pattern or a statement",
    async (odd) => {
      const actor = await makeActor();
      await titled(actor, "plain", `odd ${odd} one`);
      expect(await titles(actor, { query: odd })).toEqual([`odd ${odd} one`]);
    },
  );

  it("refuses NUL and more than 200 characters", async () => {
    const actor = await makeActor();
    for (const query of ["a\0b", "x".repeat(201)]) {
      await expect(listNetlists(actor, { query })).rejects.toMatchObject({ code: "invalid" });
    }
  });
});

describe("the list", () => {
  it("shows nothing of other workspaces, and nothing archived", async () => {
    await makeNetlist(await makeActor());
    const actor = await makeActor("viewer");
    expect(await listNetlists(actor, {})).toEqual({ rows: [], total: 0 });
    const writer = await makeActor();
    const [id] = await titled(writer, "kept", "gone");
    await database().update(netlist).set({ archivedAt: new Date() }).where(eq(netlist.title, "gone"));
    const { rows, total } = await listNetlists(writer, {});
    expect([rows.map((row) => row.id), total]).toEqual([[id], 1]);
  });
});

describe("a search that costs too much", () => {
  const sleep = (seconds: number) => (db: Queryable) => db.execute(sql`select pg_sleep(${seconds})`);

  it("is ended after five seconds, and says so", async () => {
    await expect(searching(await makeActor(), "x", sleep(60))).rejects.toMatchObject({
      code: "invalid",
      message: expect.stringContaining("longer than 5 s"),
    });
  });

  it("is refused beside three others of the same person, and not to anybody else", async () => {
    const actor = await makeActor();
    const going = Array.from({ length: 3 }, () => searching(actor, "x", sleep(2)));
    await expect(listNetlists(actor, { query: "x" })).rejects.toMatchObject({ code: "too many" });
    expect((await listNetlists(actor, {})).total).toBe(0);
    expect((await listNetlists(await makeActor(), { query: "x" })).total).toBe(0);
    await Promise.all(going);
    expect((await listNetlists(actor, { query: "x" })).total).toBe(0);
  });

  it("leaves its connection without a limit", async () => {
    const actor = await makeActor();
    await searching(actor, "x", (db) => db.execute(sql`select 1`));
    const { rows } = await database().execute<{ limit: string }>(
      sql`select current_setting('statement_timeout') as limit`,
    );
    expect(rows[0]!.limit).toBe("0");
  });
});
