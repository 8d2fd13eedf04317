import { mkdtemp, readdir, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { eq } from "drizzle-orm";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { database } from "@/db/client";
import { DEMO_PEOPLE } from "@/db/demo-people";
import { STORY, textsOf } from "@/db/demo-story";
import { DIODE_TEXT } from "@/db/factories";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import { workspace } from "@/db/schema/workspace";
import { seed } from "@/db/seed";
import { passwordMatches } from "@/lib/auth/password";
import { ownDatabase } from "./own-database";

ownDatabase();

/** The seed sets and keeps DATABASE_URL, and closes the connections that the test then opens anew. */
const url = () => process.env.DATABASE_URL!;

async function state() {
  const db = database();
  const netlists = await db.select().from(netlist).orderBy(netlist.number);
  const runs = await db.select().from(run).orderBy(run.number);
  return { netlists, runs };
}

describe("the demo", () => {
  beforeAll(async () => {
    vi.stubEnv("SWEEPWRIGHT_DEMO_PASSWORD", "a password of the test");
    await Promise.all([seed(url()), seed(url()), seed(url())]);
  });
  afterAll(() => void vi.unstubAllEnvs());

  it("made by three processes at once is made once: each example with one queued run, and the story after them", async () => {
    const files = (await readdir("examples")).filter((name) => name.endsWith(".swn"));
    const { netlists, runs } = await state();
    expect(files.length).toBeGreaterThanOrEqual(5);
    expect(netlists.map(({ number }) => number)).toEqual([...files, "the story"].map((_, i) => i + 1));
    const told = netlists.at(-1)!.id;
    const ran = runs.map(({ netlistId }) => netlistId);
    expect(ran.filter((id) => id !== told).sort()).toEqual(
      netlists
        .map(({ id }) => id)
        .slice(0, -1)
        .sort(),
    );
    expect(ran.filter((id) => id === told)).toHaveLength(STORY.length);
    expect(new Set(runs.map(({ status }) => status))).toEqual(new Set(["queued"]));
  });

  it("says that it is invented, and each of its four people has a hash of the demo password", async () => {
    const [room] = await database().select().from(workspace);
    expect([room?.slug, room?.name]).toEqual(["north-bench", expect.stringContaining("invented")]);
    const people = await database().select().from(user).orderBy(user.email);
    expect(people.map(({ email }) => email)).toEqual(DEMO_PEOPLE.map(({ email }) => email).sort());
    const hashes = people.map(({ passwordHash }) => passwordHash);
    expect(new Set(hashes).size).toBe(4);
    for (const hash of hashes) expect(await passwordMatches(hash, "a password of the test")).toBe(true);
  });

  it("tells a story of revisions by three people, each with its message and a run of its own", async () => {
    const { netlists, runs } = await state();
    const told = netlists.at(-1)!;
    const saved = await database()
      .select({ number: revision.number, text: revision.text, message: revision.message, by: user.email })
      .from(revision)
      .innerJoin(user, eq(user.id, revision.authorId))
      .where(eq(revision.netlistId, told.id))
      .orderBy(revision.number);
    expect(saved.map(({ text }) => text)).toEqual(textsOf(STORY));
    expect(saved.map(({ message, by }) => ({ message, by }))).toEqual(
      STORY.map(({ message, by }) => ({ message, by })),
    );
    expect(new Set(saved.map(({ by }) => by)).size).toBe(3);
    expect(saved[0]!.message).toContain("invented");
    const ran = runs.filter(({ netlistId }) => netlistId === told.id);
    expect(ran.map(({ revisionNumber }) => revisionNumber)).toEqual(saved.map(({ number }) => number));
  });

  it("made again changes nothing, also after somebody has renamed, changed or archived things", async () => {
    await database()
      .update(netlist)
      .set({ title: "Renamed", archivedAt: new Date() })
      .where(eq(netlist.number, 1));
    const before = await state();
    await seed(url());
    expect(await state()).toEqual(before);
  });
});

describe("the story", () => {
  it("goes on where it was cut off, and ends where somebody has gone another way", async () => {
    const { netlists } = await state();
    const told = netlists.find(({ title }) => title.startsWith("Turbidity"))!;
    const client = database().$client;
    const cutTo = async (left: number) => {
      await client.query("ALTER TABLE revision DISABLE TRIGGER ALL");
      for (const table of ["event", "shard"])
        await client.query(
          `DELETE FROM ${table} WHERE run_id IN (SELECT id FROM run WHERE revision_number > $1)`,
          [left],
        );
      await client.query("DELETE FROM run WHERE revision_number > $1", [left]);
      await client.query("DELETE FROM revision WHERE number > $1", [left]);
      await client.query("UPDATE netlist SET latest_revision = $1 WHERE id = $2", [left, told.id]);
      await client.query("ALTER TABLE revision ENABLE TRIGGER ALL");
    };
    await cutTo(2);
    await seed(url());
    const whole = await state();
    expect(whole.runs.filter(({ netlistId }) => netlistId === told.id)).toHaveLength(STORY.length);
    await database().$client.query("ALTER TABLE revision DISABLE TRIGGER ALL");
    await database().update(revision).set({ message: "Another way" }).where(eq(revision.number, 3));
    await database().$client.query("ALTER TABLE revision ENABLE TRIGGER ALL");
    const before = await state();
    await seed(url());
    expect(await state()).toEqual(before);
  });
});

describe("the demo of a folder", () => {
  let folder: string;
  beforeEach(async () => {
    folder = await mkdtemp(join(tmpdir(), "examples-"));
  });
  afterEach(() => rm(folder, { recursive: true }));

  it("goes on where it was cut off: a netlist without a run gets one, a new file its netlist", async () => {
    const before = await state();
    await writeFile(join(folder, "one.swn"), DIODE_TEXT);
    await seed(url(), folder);
    const [first] = (await state()).runs.slice(before.runs.length);
    await database().$client.query("DELETE FROM event WHERE run_id = $1", [first!.id]);
    await database().$client.query("DELETE FROM shard WHERE run_id = $1", [first!.id]);
    await database().$client.query("DELETE FROM run WHERE id = $1", [first!.id]);
    await writeFile(join(folder, "two.swn"), DIODE_TEXT);
    await seed(url(), folder);
    const after = await state();
    expect(after.netlists.length - before.netlists.length).toBe(2);
    expect(after.runs.length - before.runs.length).toBe(2);
  });

  it("that holds no example is an error that names it", async () => {
    await expect(seed(url(), folder)).rejects.toThrow(`The folder ${folder} holds no example`);
  });
});
