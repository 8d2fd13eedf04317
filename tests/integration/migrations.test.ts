import { readFile } from "node:fs/promises";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeNetlist } from "@/db/factories";
import { migrate } from "@/db/migrate";
import { ownDatabase } from "./own-database";

ownDatabase({ migrated: false });

interface Journal {
  readonly entries: readonly { readonly idx: number; readonly when: number; readonly tag: string }[];
}

async function journal(): Promise<Journal> {
  return JSON.parse(await readFile("drizzle/meta/_journal.json", "utf8"));
}

describe("migrations", () => {
  it("run by three processes at once are each applied once", async () => {
    const url = process.env.DATABASE_URL!;
    await Promise.all([migrate(url), migrate(url), migrate(url)]);
    await migrate(url);
    const { rows } = await database().$client.query(
      "SELECT created_at FROM drizzle.__drizzle_migrations ORDER BY id",
    );
    const { entries } = await journal();
    expect(rows.map(({ created_at }) => Number(created_at))).toEqual(entries.map(({ when }) => when));
  });

  it("stand in the journal in the order of their times, since the migrator skips what is older than the last", async () => {
    const { entries } = await journal();
    expect(entries.map(({ idx }) => idx)).toEqual(entries.map((_, i) => i));
    const times = entries.map(({ when }) => when);
    expect(times).toEqual([...new Set(times)].sort((a, b) => a - b));
    for (const { tag } of entries) expect(tag).toMatch(/^\d{4}_[a-z0-9]+(_[a-z0-9]+)*$/);
  });
});

describe("a revision", () => {
  it.each([
    ["UPDATE", "UPDATE revision SET text = 'x' WHERE netlist_id = $1"],
    ["DELETE", "DELETE FROM revision WHERE netlist_id = $1"],
  ])("refuses %s", async (_, statement) => {
    const { id } = await makeNetlist(await makeActor());
    await expect(database().$client.query(statement, [id])).rejects.toMatchObject({
      message: `revision 1 of netlist ${id} is immutable`,
    });
  });

  it("refuses TRUNCATE", async () => {
    await makeNetlist(await makeActor());
    await expect(database().$client.query("TRUNCATE revision CASCADE")).rejects.toThrow(/immutable/);
    const { rows } = await database().$client.query("SELECT count(*)::int AS n FROM revision");
    expect(rows[0].n).toBeGreaterThan(0);
  });
});

describe("the tables", () => {
  it.each([
    ["figures", "chunk", "data"],
    ["plans", "run", "plan"],
  ])("compress stored %s with lz4", async (_, table, column) => {
    const { rows } = await database().$client.query(
      "SELECT attcompression FROM pg_attribute WHERE attrelid = $1::regclass AND attname = $2",
      [table, column],
    );
    // "l" is lz4: the manual's chapter on pg_attribute.
    expect(rows).toEqual([{ attcompression: "l" }]);
  });

  it("take no workspace whose slug would not fit an address", async () => {
    const insert = "INSERT INTO workspace (slug, name) VALUES ($1, 'x')";
    for (const slug of ["", "A", "a b", "-a", "a-", "a/b", "a--b"]) {
      await expect(database().$client.query(insert, [slug])).rejects.toMatchObject({ code: "23514" });
    }
  });

  it("take one account for an address, whatever the case of its letters", async () => {
    const insert = `INSERT INTO "user" (email, name, password_hash) VALUES ($1, 'x', 'x')`;
    await database().$client.query(insert, ["one@bench.example"]);
    await expect(database().$client.query(insert, ["One@Bench.example"])).rejects.toMatchObject({
      code: "23505",
    });
  });
});
