import { afterAll, afterEach, beforeAll, expect, test, vi } from "vitest";
import { makeActor, makeRun } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { listEvents } from "@/lib/services/events/list-events";
import { type Throwaway, throwaway } from "@/lib/stack/throwaway";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { ended, enqueue, runRow, runUntil, type StoredPoints, shardRows, storedPoints } from "./runs";
import { LONG_TEXT } from "./texts";
import { endWorkers, startWorker, type WorkerProcess } from "./worker-process";

// A machine that is busy with other tests may take long.
vi.setConfig({ testTimeout: 180_000, hookTimeout: 180_000 });

let cluster: Throwaway;
let own: OwnDatabase;
let actor: Actor;
let undisturbed: StoredPoints;

beforeAll(async () => {
  cluster = await throwaway();
  own = await ownDatabase(await cluster.database("postgres"));
  actor = await makeActor();
  const worker = await startWorker();
  const run = await begin();
  await runUntil(run, ended);
  undisturbed = await storedPoints(run);
  await worker.stop();
});
afterEach(endWorkers);
afterAll(async () => {
  await own?.drop();
  await cluster?.remove();
});

/** Queues a run of the long text. */
async function begin(): Promise<string> {
  const { id } = await makeRun(actor, { text: LONG_TEXT });
  await enqueue(id);
  return id;
}

/** Waits until some of the run is stored, and proves that not all is. */
async function middleOf(runId: string): Promise<void> {
  const row = await runUntil(runId, ({ shardsLeft, pointsDone }) => pointsDone > 256 && shardsLeft > 0);
  expect(row.status).toBe("running");
  expect(row.pointsDone).toBeLessThan(row.points);
}

/** Stops the worker's clock at a moment when it holds a shard, in the middle of the run. */
async function freeze(worker: WorkerProcess, runId: string): Promise<void> {
  for (;;) {
    await middleOf(runId);
    worker.process.kill("SIGSTOP");
    // What it had already sent to the database may still take effect.
    await new Promise((resolve) => setTimeout(resolve, 100));
    if ((await shardRows(runId)).some(({ status }) => status === "running")) return;
    worker.process.kill("SIGCONT");
  }
}

/** Waits for the end and compares everything stored with the undisturbed run. */
async function proveWhole(runId: string): Promise<void> {
  const row = await runUntil(runId, ended);
  expect(row).toMatchObject({ status: "done", error: null, pointsDone: row.points, shardsLeft: 0 });
  expect(await storedPoints(runId)).toEqual(undisturbed);
  expect(new Set(Object.values(undisturbed.values))).toEqual(new Set([row.points]));
  const events = await listEvents(actor, { runId, after: 0 });
  expect(events.map(({ sequence }) => sequence)).toEqual(events.map((_, i) => i + 1));
  expect(events.at(-1)!.data).toMatchObject({ status: "done", pointsDone: row.points });
}

test("a worker killed in the middle of a run costs nothing: another one ends it with the same bytes", async () => {
  const first = await startWorker();
  const run = await begin();
  await freeze(first, run);
  await first.kill();
  expect((await runRow(run)).status).toBe("running");
  await startWorker();
  await proveWhole(run);
  const attempts = (await shardRows(run)).map(({ attempt }) => attempt);
  expect(Math.max(...attempts)).toBeGreaterThan(1);
});

test("a restart of PostgreSQL in the middle of a run costs nothing", async () => {
  const worker = await startWorker();
  const run = await begin();
  await middleOf(run);
  const server = cluster.pid();
  await cluster.restart();
  expect(cluster.pid()).not.toBe(server);
  await proveWhole(run);
  expect(worker.process.exitCode).toBeNull();
  expect((await fetch(`${worker.health}/health`)).status).toBe(200);
});

test("a crash of PostgreSQL and of a worker at once costs nothing", async () => {
  const first = await startWorker();
  await startWorker();
  const run = await begin();
  await middleOf(run);
  await Promise.all([first.kill(), cluster.crash()]);
  await proveWhole(run);
});

test("a worker asked to stop gives back what it is at, and the next one goes on at once", async () => {
  const first = await startWorker();
  const run = await begin();
  await middleOf(run);
  expect(await first.stop()).toBe(0);
  const left = await runRow(run);
  expect(left.status).toBe("running");
  for (const { status } of await shardRows(run)) expect(status).not.toBe("running");
  await startWorker();
  await proveWhole(run);
});

test("two workers share a run and store no point twice", async () => {
  await Promise.all([startWorker(), startWorker()]);
  const run = await begin();
  await proveWhole(run);
  const workers = new Set((await shardRows(run)).map(({ claimedBy }) => claimedBy));
  expect(workers.size).toBe(2);
});
