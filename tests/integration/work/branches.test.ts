import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { sql } from "drizzle-orm";
import { afterAll, afterEach, beforeAll, describe, expect, test, vi } from "vitest";
import { GET as getDocument } from "@/app/api/v1/runs/[id]/route";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import type { RunDocument } from "@/lib/analyses/result";
import type { Actor } from "@/lib/permissions/actor";
import { listEvents } from "@/lib/services/events/list-events";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { getRun } from "@/lib/services/runs/get-run";
import { requeueLost } from "@/lib/services/shards/requeue-lost";
import { ShardProcessor } from "@/worker/shard-processor";
import type { Ended } from "@/worker/thread";
import { ThreadPool } from "@/worker/thread-pool";
import { shell } from "../../cli/shell";
import { call, SECRET } from "../caller";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { ended, enqueue, runRow, runUntil, shardRows, storedPoints } from "./runs";
import { EXCHANGED, sought } from "./texts";
import { endWorkers, startWorker } from "./worker-process";

vi.setConfig({ testTimeout: 180_000, hookTimeout: 180_000 });

const LIMITS = { seconds: 120, memory: 512 };

let own: OwnDatabase;
let actor: Actor;
let pool: ThreadPool;

beforeAll(async () => {
  process.env.NEXTAUTH_SECRET = SECRET;
  own = await ownDatabase();
  actor = await makeActor();
  pool = new ThreadPool(1, LIMITS);
  await pool.ready;
});
afterEach(endWorkers);
afterAll(async () => {
  await pool.close();
  await own.drop();
});

const processorOf = (solving: Pick<ThreadPool, "solve"> = pool) =>
  new ShardProcessor(solving, { name: "a worker", leaseSeconds: 10, limits: LIMITS });

/** The text of the run's document, as the service sends it. */
async function bytesOf(id: string): Promise<string> {
  const answer = await call(getDocument, actor, { params: { id } });
  expect(answer.status).toBe(200);
  return answer.text();
}

/** Computes the shards of a run in the order given. */
async function compute(id: string, order: readonly number[], processor = processorOf()): Promise<void> {
  for (const index of order) expect(await processor.handle({ runId: id, index })).toBe("done");
}

describe("a run whose text seeks", () => {
  test.each(["schmitt-trigger", "bandgap-start-up"])(
    "%s has the document of the command line, byte for byte",
    async (name) => {
      const file = `examples/${name}.swn`;
      const { id, shards } = await makeRun(actor, { text: readFileSync(file, "utf8") });
      await compute(id, [...Array(shards).keys()].reverse());
      const { out } = await shell(["run", file, "--json"]);
      expect(`${await bytesOf(id)}\n`).toBe(out);
      const { branches } = JSON.parse(out) as RunDocument;
      expect(branches!.map((row) => [row.branches.length, row.complete])).toContainEqual([3, true]);
    },
  );

  test("has one shard a sweep beside those of its points, and is done only when all are stored", async () => {
    const { id, shards } = await makeRun(actor, { text: sought(3) });
    expect((await shardRows(id)).map(({ kind, from, to }) => [kind, from, to])).toEqual([
      ["points", 0, 41],
      ["points", 41, 123],
      ["branches", 0, 41],
      ["branches", 41, 82],
      ["branches", 82, 123],
    ]);
    expect(await getRun(actor, id)).toMatchObject({ status: "queued", search: { rows: 3, rowsDone: 0 } });
    expect((JSON.parse(await bytesOf(id)) as RunDocument).branches).toEqual([]);

    await compute(id, [0, 1, 3]);
    // All points are in, and the branches are still being sought.
    expect(await getRun(actor, id)).toMatchObject({
      status: "running",
      points: 123,
      pointsDone: 123,
      verdict: null,
      search: { rows: 3, rowsDone: 1 },
    });
    const partial = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(partial.branches!.map(({ at }) => at[0]!.value)).toEqual([300]);

    await compute(id, [4, 2]);
    expect(shards).toBe(5);
    expect(await getRun(actor, id)).toMatchObject({ status: "done", search: { rows: 3, rowsDone: 3 } });
    const whole = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(whole.branches!.map(({ at }) => at[0]!.value)).toEqual([290, 300, 310]);
    expect(whole.branches![1]).toEqual(partial.branches![0]);
    const told = (await listEvents(actor, { runId: id, after: 0 })).map(({ data }) => data.search!.rowsDone);
    expect(told).toEqual(told.toSorted());
    expect(new Set(told)).toEqual(new Set([0, 1, 2, 3]));
  });

  test("stores the same bytes in any order, and a job that comes again changes nothing", async () => {
    const digests = new Set<string>();
    for (const order of [
      [0, 1, 2, 3, 4],
      [4, 2, 0, 3, 1],
    ]) {
      const { id } = await makeRun(actor, { text: sought(3) });
      await compute(id, order);
      const before = { run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) };
      await compute(id, order);
      const after = { run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) };
      expect(after).toEqual(before);
      expect(before.shards.map(({ attempt }) => attempt)).toEqual([1, 1, 1, 1, 1]);
      digests.add(before.points.digest);
    }
    expect(digests.size).toBe(1);
  });

  test("keeps branches of more values than a chunk holds", async () => {
    const { id, shards } = await makeRun(actor, { text: sought(1, 6_001) });
    await compute(id, [...Array(shards).keys()]);
    const { branches } = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(branches![0]!.branches).toHaveLength(3);
    const reach = branches![0]!.branches.map(({ stable }) => stable.filter((one) => one !== null).length);
    expect(Math.min(...reach)).toBeGreaterThan(1_500);
    for (const { stable, bound, traces } of branches![0]!.branches) {
      expect([stable.length, bound.length, traces[0]!.values.length]).toEqual([6_001, 6_001, 6_001]);
    }
    expect((await storedPoints(id)).values["branch/bound"]).toBe(18_003);
  });
});

test("a run whose text does not seek has no search and no branches", async () => {
  const { id, shards } = await makeRun(actor);
  await compute(id, [...Array(shards).keys()]);
  expect((await getRun(actor, id)).search).toBeNull();
  expect(JSON.parse(await bytesOf(id))).not.toHaveProperty("branches");
  for (const { data } of await listEvents(actor, { runId: id, after: 0 }))
    expect(data).not.toHaveProperty("search");
});

describe("the verdict of a run whose text seeks", () => {
  const bandgap = readFileSync("examples/bandgap-start-up.swn", "utf8");
  const anywhere = bandgap.replace(" at R_start = 10 MΩ as", " as");

  test("is broken where another stable operating point breaks it, and keeps what the sweep alone would say", async () => {
    const { id, shards } = await makeRun(actor, { text: anywhere });
    await compute(id, [...Array(shards).keys()]);
    const { verdict, judgement } = await getRun(actor, id);
    expect(verdict).toBe("broken");
    expect(judgement!.requirements[0]).toMatchObject({
      verdict: "broken",
      followed: { verdict: "holds" },
      worst: { branch: 0 },
    });
    const document = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(document.verdict).toBe("broken");
    expect(document.requirements).toEqual(judgement!.requirements);
  });

  test("is no data where a row that it needs could not be sought", async () => {
    const hurried: Pick<ThreadPool, "solve"> = {
      solve: (task, signal, progress) =>
        task.kind === "seek" && task.row === 0
          ? Promise.resolve({ kind: "out of time" } satisfies Ended)
          : pool.solve(task, signal, progress),
    };
    const { id, shards } = await makeRun(actor, { text: bandgap });
    await compute(id, [...Array(shards).keys()], processorOf(hurried));
    const { verdict, status, judgement } = await getRun(actor, id);
    expect({ verdict, status }).toEqual({ verdict: "no data", status: "done" });
    expect(judgement!.requirements[0]!.remark).toMatch(/^Looking for the operating points took longer/);
  });
});

test("points that the circuit would leave are kept and told as the command line tells them", async () => {
  const { id, shards } = await makeRun(actor, { text: EXCHANGED });
  await compute(id, [...Array(shards).keys()].reverse());
  const folder = mkdtempSync(join(tmpdir(), "branches-"));
  try {
    writeFileSync(join(folder, "exchanged.swn"), EXCHANGED);
    const { out } = await shell(["run", "exchanged.swn", "--json"], { folder });
    expect(`${await bytesOf(id)}\n`).toBe(out);
    expect((JSON.parse(out) as RunDocument).unstable).toEqual([{ from: 0, to: 901 }]);
  } finally {
    rmSync(folder, { recursive: true });
  }
});

describe("a search that is disturbed", () => {
  test("is put on the queue again when its job is lost", async () => {
    const { id } = await makeRun(actor, { text: sought(3) });
    await compute(id, [0, 1, 2]);
    await database().execute(
      sql`UPDATE shard SET queued_at = now() - interval '1 minute' WHERE run_id = ${id}`,
    );
    expect(await requeueLost({ queuedSeconds: 15 })).toBe(2);
    const { rows } = await database().execute<{ id: string }>(sql`SELECT id FROM bullmq.job ORDER BY id`);
    expect(rows.map((one) => one.id)).toEqual([`${id}-3`, `${id}-4`]);
    await database().execute(sql`DELETE FROM bullmq.job`);
    await compute(id, [3, 4]);
    expect((await getRun(actor, id)).status).toBe("done");
  });

  test("is left at once when its run is cancelled, and nothing of it is stored", async () => {
    const { id } = await makeRun(actor, { text: sought(1, 100_000) });
    const handled = processorOf().handle({ runId: id, index: (await shardRows(id)).length - 1 });
    await expect.poll(async () => (await shardRows(id)).at(-1)!.status).toBe("running");
    await cancelRun(actor, id);
    expect(await handled).toBe("done");
    expect(await getRun(actor, id)).toMatchObject({ status: "cancelled", search: { rows: 1, rowsDone: 0 } });
    expect((await storedPoints(id)).values).toEqual({});
  });

  test.each([
    [
      "out of time",
      /^Looking for the operating points took longer than the limit of 120 s\. None is known here; /,
    ],
    ["out of memory", /took more memory than the limit of 512 MiB\. None is known here; sweep fewer points /],
  ] as const)("%s: the points stand, and the row says so", async (kind, sentence) => {
    const hurried: Pick<ThreadPool, "solve"> = {
      solve: (task, signal, progress) =>
        task.kind === "seek" && task.row === 1
          ? Promise.resolve({ kind } satisfies Ended)
          : pool.solve(task, signal, progress),
    };
    const { id } = await makeRun(actor, { text: sought(3) });
    await compute(id, [0, 1, 2, 3, 4], processorOf(hurried));
    expect(await getRun(actor, id)).toMatchObject({ status: "done", pointsFailed: 0, error: null });
    const { branches, points } = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(branches!.map(({ fault }) => fault !== undefined)).toEqual([false, true, false]);
    expect(branches![1]).toMatchObject({
      at: [{ knob: "temperature", value: 300 }],
      complete: false,
      branches: [],
    });
    expect(branches![1]!.fault).toMatch(sentence);
    expect(new Set(points.outcome)).toEqual(new Set(["converged"]));
  });

  test("a search that breaks off is tried again, and given up after five times", async () => {
    const broken: Pick<ThreadPool, "solve"> = {
      solve: (task, signal, progress) =>
        task.kind === "seek"
          ? Promise.resolve({ kind: "broken", reason: "made to break by a test" } satisfies Ended)
          : pool.solve(task, signal, progress),
    };
    const processor = processorOf(broken);
    const { id } = await makeRun(actor, { text: sought(1) });
    await compute(id, [0], processor);
    for (let attempt = 1; attempt < 5; attempt++) {
      expect(await processor.handle({ runId: id, index: 1 })).toEqual({ againIn: expect.any(Number) });
    }
    expect(await processor.handle({ runId: id, index: 1 })).toBe("done");
    expect((await getRun(actor, id)).status).toBe("done");
    const { branches } = JSON.parse(await bytesOf(id)) as RunDocument;
    expect(branches![0]!.fault).toMatch(/^The solver broke off 5 times looking for the operating points/);
  });

  test("a worker killed while it seeks loses nothing: the next one ends the run, with the same bytes", async () => {
    const text = sought(3, 4_001);
    const undisturbed = await makeRun(actor, { text });
    await compute(
      undisturbed.id,
      (await shardRows(undisturbed.id)).map(({ index }) => index),
    );

    const { id } = await makeRun(actor, { text });
    const first = await startWorker();
    await enqueue(id);
    await expect
      .poll(
        async () =>
          (await shardRows(id)).some(({ kind, status }) => kind === "branches" && status === "running"),
        {
          interval: 5,
          timeout: 60_000,
        },
      )
      .toBe(true);
    await first.kill();
    expect(await runRow(id)).toMatchObject({ status: "running" });
    await startWorker();
    expect(await runUntil(id, ended)).toMatchObject({ status: "done", rowsDone: 3, shardsLeft: 0 });
    expect(await storedPoints(id)).toEqual(await storedPoints(undisturbed.id));
    expect(await bytesOf(id)).toBe(await bytesOf(undisturbed.id));
    expect((await shardRows(id)).some(({ kind, attempt }) => kind === "branches" && attempt > 1)).toBe(true);
  });
});
