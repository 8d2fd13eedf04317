import { count, eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { DIODE_TEXT, makeActor, makeNetlist, makeRun, makeWorkspace } from "@/db/factories";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { listEvents } from "@/lib/services/events/list-events";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { getRun } from "@/lib/services/runs/get-run";
import { listRuns } from "@/lib/services/runs/list-runs";
import { startRun } from "@/lib/services/runs/start-run";
import { ownDatabase } from "../integration/own-database";
import { storeShard } from "./store-shard";

ownDatabase();

const changed = DIODE_TEXT.replace("2 fA", "3 fA");
const LONG = DIODE_TEXT.replace("5 per decade", "1000 points");

async function runsIn(workspaceId: string): Promise<number> {
  const [row] = await database().select({ n: count() }).from(run).where(eq(run.workspaceId, workspaceId));
  return row!.n;
}

async function jobsOf(runId: string): Promise<number> {
  const { rows } = await database().$client.query(
    "SELECT count(*)::int AS n FROM bullmq.job WHERE id LIKE $1",
    [`${runId}-%`],
  );
  return rows[0].n;
}

describe("startRun", () => {
  it("gives a run a title that lists can show, however long the text's own is", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: DIODE_TEXT.replace("A diode", "t  ".repeat(50_000)) });
    expect((await getRun(actor, id)).title).toBe("t ".repeat(60));
  });

  it("writes the run, its shards without gap or overlap, one event, and a job for each shard", async () => {
    const actor = await makeActor("engineer", undefined, "Erna Invented");
    const { id: netlistId } = await makeNetlist(actor, LONG);
    const { id, number } = await startRun(actor, { netlistId, base: 1 });
    const { hash } = await getNetlist(actor, netlistId);
    expect(await getRun(actor, id)).toMatchObject({
      number,
      title: "A diode",
      netlistId,
      netlistNumber: 1,
      revision: 1,
      hash,
      status: "queued",
      points: 1000,
      pointsDone: 0,
      pointsFailed: 0,
      startedAt: null,
      finishedAt: null,
      error: null,
      requestedBy: "Erna Invented",
      lastEvent: 1,
      plan: { points: 1000, traces: [{ name: "v", unit: "V" }] },
    });
    const shards = await database().select().from(shard).where(eq(shard.runId, id)).orderBy(shard.index);
    expect(shards.length).toBeGreaterThan(1);
    expect(shards.map(({ from }) => from)).toEqual([0, ...shards.slice(0, -1).map(({ to }) => to)]);
    expect(shards.at(-1)?.to).toBe(1000);
    expect(await listEvents(actor, { runId: id, after: 0 })).toEqual([
      {
        sequence: 1,
        kind: "status",
        data: { status: "queued", points: 1000, pointsDone: 0, pointsFailed: 0 },
      },
    ]);
    expect(await jobsOf(id)).toBe(shards.length);
  });

  it("saves a changed text as the next revision and runs that; the same text adds none", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    const first = await startRun(actor, { netlistId, base: 1, text: changed });
    const second = await startRun(actor, { netlistId, base: 2, text: changed });
    expect([(await getRun(actor, first.id)).revision, (await getRun(actor, second.id)).revision]).toEqual([
      2, 2,
    ]);
    expect([first.number, second.number]).toEqual([1, 2]);
    expect((await getNetlist(actor, netlistId)).revision).toBe(2);
  });

  it("runs an older revision when asked for it without a text", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    await saveRevision(actor, { netlistId, base: 1, text: changed });
    const { id } = await startRun(actor, { netlistId, base: 1 });
    expect((await getRun(actor, id)).revision).toBe(1);
    await expect(startRun(actor, { netlistId, base: 3 })).rejects.toMatchObject({ code: "not found" });
  });

  it("answers a stale text with 'conflict' and queues nothing", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    await saveRevision(actor, { netlistId, base: 1, text: changed });
    const stale = { netlistId, base: 1, text: DIODE_TEXT.replace("2 fA", "4 fA") };
    await expect(startRun(actor, stale)).rejects.toMatchObject({ code: "conflict", details: { latest: 2 } });
    expect(await runsIn(actor.workspaceId)).toBe(0);
  });

  it("answers mistakes with their diagnostics, and neither saves nor queues", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    const text = DIODE_TEXT.replace("junction -- ground", "junctoin -- ground");
    const refused = await startRun(actor, { netlistId, base: 1, text }).catch((error) => error);
    expect(refused).toMatchObject({ code: "invalid" });
    const [diagnostic] = refused.details.diagnostics as Diagnostic[];
    expect(text.slice(diagnostic!.from, diagnostic!.to)).toBe("junctoin");
    expect(await runsIn(actor.workspaceId)).toBe(0);
    expect((await getNetlist(actor, netlistId)).revision).toBe(1);
  });

  it.each([
    ["a sweep of 1e9 points", DIODE_TEXT.replace("5 per decade", "1000000000 points"), "CAP"],
    ["three sweeps of 1000 points", threeSweeps(), "CAP"],
    ["10 000 brackets", DIODE_TEXT.replace("1 µA", `${"(".repeat(10_000)}1 µA${")".repeat(10_000)}`), "CAP"],
    [
      "a loop of voltage elements",
      `${DIODE_TEXT}ground -- VA : voltage 1 V -- s\nground -- VB : voltage 2 V -- s\n`,
      "WIR",
    ],
    ["a floating net", `${DIODE_TEXT}a -- RA : resistor 1 kΩ -- b\n`, "WIR"],
  ])("answers %s with a plain diagnostic", async (_, text, family) => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    const refused = await startRun(actor, { netlistId, base: 1, text }).catch((error) => error);
    expect(refused).toMatchObject({ code: "invalid" });
    const codes = (refused.details.diagnostics as Diagnostic[]).map(({ code }) => code.slice(0, 3));
    expect(codes).toContain(family);
  });

  it("numbers runs of a workspace without gaps when many are queued at once", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    const started = await Promise.all(
      Array.from({ length: 6 }, () => startRun(actor, { netlistId, base: 1 })),
    );
    expect(started.map(({ number }) => number).sort()).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it("is refused to a person with fifty runs open, and to nobody else, until one has ended", async () => {
    const room = await makeWorkspace();
    const actor = await makeActor("engineer", room);
    const { id: netlistId } = await makeNetlist(actor);
    const [first] = await Promise.all(Array.from({ length: 49 }, () => makeRun(actor, { netlistId })));
    const wish = { netlistId, base: 1 };
    const both = await Promise.allSettled([startRun(actor, wish), startRun(actor, wish)]);
    expect(both.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    const text = changed;
    await expect(startRun(actor, { ...wish, text })).rejects.toMatchObject({
      code: "too many",
      message: expect.stringContaining("50 runs queued or running"),
    });
    expect([await runsIn(room.id), (await getNetlist(actor, netlistId)).revision]).toEqual([50, 1]);
    await startRun(await makeActor("engineer", room), wish);
    await cancelRun(actor, first!.id);
    await startRun(actor, wish);
  });

  it("is refused to a viewer, and unknown to another workspace", async () => {
    const room = await makeWorkspace();
    const { id: netlistId } = await makeNetlist(await makeActor("engineer", room));
    const wish = { netlistId, base: 1 };
    await expect(startRun(await makeActor("viewer", room), wish)).rejects.toMatchObject({
      code: "not allowed",
    });
    await expect(startRun(await makeActor("admin"), wish)).rejects.toMatchObject({ code: "not found" });
  });
});

function threeSweeps(): string {
  const sweeps = ["I_in", "x", "y"].map((knob) => `sweep ${knob} from 1 nA to 1 mA, 1000 points\n`).join("");
  return DIODE_TEXT.replace(/sweep .*\n/, `knob x = 1 µA\nknob y = 1 µA\n${sweeps}`);
}

describe("cancelRun", () => {
  it("stops a queued run with an event; its shards can no longer be claimed; doing it again changes nothing", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const after = await cancelRun(actor, id);
    expect(after).toMatchObject({ status: "cancelled", lastEvent: 2 });
    expect(after.finishedAt).not.toBeNull();
    await expect(storeShard(id, 0, after.plan)).rejects.toThrow("cannot be claimed: over");
    expect(await cancelRun(actor, id)).toEqual(after);
    const events = await listEvents(actor, { runId: id, after: 0 });
    expect(events.map(({ data }) => data.status)).toEqual(["queued", "cancelled"]);
  });

  it("keeps what is stored of a running one", async () => {
    const actor = await makeActor();
    const { id, shards } = await makeRun(actor, { text: LONG });
    expect(shards).toBeGreaterThan(1);
    const { plan } = await getRun(actor, id);
    await storeShard(id, 0, plan);
    const { pointsDone } = await getRun(actor, id);
    expect(await cancelRun(actor, id)).toMatchObject({ status: "cancelled", pointsDone });
    expect(pointsDone).toBeGreaterThan(0);
  });

  it("answers a finished run with 'conflict'", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    await storeShard(id, 0, (await getRun(actor, id)).plan);
    await expect(cancelRun(actor, id)).rejects.toMatchObject({
      code: "conflict",
      details: { status: "done" },
    });
    expect((await getRun(actor, id)).status).toBe("done");
  });

  it("is refused to a viewer, and unknown to another workspace", async () => {
    const room = await makeWorkspace();
    const { id } = await makeRun(await makeActor("engineer", room));
    await expect(cancelRun(await makeActor("viewer", room), id)).rejects.toMatchObject({
      code: "not allowed",
    });
    await expect(cancelRun(await makeActor("admin"), id)).rejects.toMatchObject({ code: "not found" });
  });
});

describe("listRuns", () => {
  it("is the newest first, by pages, and searched by title, number and person", async () => {
    const room = await makeWorkspace();
    const actor = await makeActor("engineer", room, "Erna Invented");
    for (const title of ["Head", "Root", "Ratio"]) {
      await makeRun(actor, { text: DIODE_TEXT.replace("A diode", title) });
    }
    await makeRun(await makeActor("engineer", room, "Otto Invented"));
    await makeRun(await makeActor());
    const titles = async (input: Parameters<typeof listRuns>[1]) =>
      (await listRuns(actor, input)).rows.map(({ title }) => title);
    expect(await titles({})).toEqual(["A diode", "Ratio", "Root", "Head"]);
    expect(await titles({ page: 2, size: 3 })).toEqual(["Head"]);
    expect(await titles({ query: "rat" })).toEqual(["Ratio"]);
    expect(await titles({ query: "erna 2" })).toEqual(["Root"]);
    expect(await titles({ query: "otto" })).toEqual(["A diode"]);
    expect((await listRuns(actor, { size: 1 })).total).toBe(4);
  });

  it("is narrowed by state and by netlist", async () => {
    const actor = await makeActor();
    const { id, netlistId } = await makeRun(actor);
    const other = await makeRun(actor);
    await cancelRun(actor, other.id);
    const ids = async (input: Parameters<typeof listRuns>[1]) =>
      (await listRuns(actor, input)).rows.map((row) => row.id);
    expect(await ids({ status: "cancelled" })).toEqual([other.id]);
    expect(await ids({ status: "running" })).toEqual([]);
    expect(await ids({ netlistId })).toEqual([id]);
    await expect(listRuns(actor, { netlistId: "x" })).rejects.toMatchObject({ code: "invalid" });
  });
});
