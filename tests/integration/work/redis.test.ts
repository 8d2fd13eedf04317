import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { sql } from "drizzle-orm";
import { Redis } from "ioredis";
import { afterAll, afterEach, beforeAll, expect, test, vi } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeNetlist, makeRun } from "@/db/factories";
import { openThrottle } from "@/lib/auth/throttle";
import { startRun } from "@/lib/services/runs/start-run";
import { ensureTools, REDIS } from "@/lib/stack/debian";
import { freePort } from "@/lib/stack/ports";
import { disconnect, type OwnDatabase, ownDatabase } from "./own-database";
import { ended, enqueue, runUntil, storedPoints } from "./runs";
import { LONG_TEXT, longText } from "./texts";
import { endWorkers, startWorker } from "./worker-process";

// A machine that is busy with other tests may take long.
vi.setConfig({ testTimeout: 180_000, hookTimeout: 180_000 });

let own: OwnDatabase;
let folder: string;
let server: ChildProcess;
let redis: Redis;

beforeAll(async () => {
  await ensureTools([REDIS]);
  own = await ownDatabase();
  folder = await mkdtemp(join(tmpdir(), "sweepwright-redis-"));
  const port = await freePort();
  const options = ["--port", String(port), "--bind", "127.0.0.1", "--save", "", "--dir", folder];
  server = spawn("redis-server", options, { stdio: "ignore" });
  process.env.REDIS_URL = `redis://127.0.0.1:${port}`;
  redis = new Redis(process.env.REDIS_URL, { maxRetriesPerRequest: 50 });
  // Refused until the server listens; the ping waits for it.
  redis.on("error", () => undefined);
  expect(await redis.ping()).toBe("PONG");
});
afterEach(endWorkers);
afterAll(async () => {
  delete process.env.REDIS_URL;
  await own?.drop();
  redis?.disconnect();
  const gone = server === undefined ? undefined : once(server, "exit");
  server?.kill();
  await gone;
  await rm(folder, { recursive: true, force: true });
});

async function jobsInPostgres(): Promise<number> {
  const { rows } = await database().execute<{ jobs: number }>(
    sql`SELECT count(*)::int AS jobs FROM bullmq.event`,
  );
  return rows[0]!.jobs;
}

test("with REDIS_URL the jobs go through Redis, and a run is solved to the same bytes", async () => {
  const actor = await makeActor();
  const text = longText(300);
  const worker = await startWorker();
  const first = await startRun(actor, { netlistId: (await makeNetlist(actor, text)).id, base: 1 });
  expect(await runUntil(first.id, ended)).toMatchObject({ status: "done", pointsFailed: 0 });
  expect(await redis.keys("bull:shards:*")).not.toEqual([]);
  expect(await jobsInPostgres()).toBe(0);
  expect(await worker.stop()).toBe(0);

  const url = process.env.REDIS_URL!;
  await disconnect();
  delete process.env.REDIS_URL;
  try {
    await startWorker();
    const second = await startRun(actor, { netlistId: (await makeNetlist(actor, text)).id, base: 1 });
    await runUntil(second.id, ended);
    expect(await jobsInPostgres()).toBeGreaterThan(0);
    expect(await storedPoints(second.id)).toEqual(await storedPoints(first.id));
  } finally {
    await disconnect();
    process.env.REDIS_URL = url;
  }
});

test("a worker killed in the middle costs nothing with Redis either", async () => {
  const { id } = await makeRun(await makeActor(), { text: LONG_TEXT });
  const first = await startWorker();
  await enqueue(id);
  await runUntil(id, ({ pointsDone }) => pointsDone > 256);
  await first.kill();
  const left = await runUntil(id, ({ shardsLeft }) => shardsLeft > 0);
  expect(left.status).toBe("running");
  await startWorker();
  const row = await runUntil(id, ended);
  expect(row).toMatchObject({ status: "done", pointsDone: row.points, pointsFailed: 0, shardsLeft: 0 });
  expect(new Set(Object.values((await storedPoints(id)).values))).toEqual(new Set([row.points]));
});

test("a Redis that lost everything costs nothing: the table knows what is to be done", async () => {
  const { id } = await makeRun(await makeActor(), { text: longText(300) });
  await enqueue(id);
  await redis.flushall();
  await database().execute(
    sql`UPDATE shard SET queued_at = queued_at - interval '1 minute' WHERE run_id = ${id}`,
  );
  await startWorker();
  expect(await runUntil(id, ended)).toMatchObject({ status: "done", shardsLeft: 0 });
});

test("attempts to sign in are counted in Redis by all processes together, without anybody's address in clear", async () => {
  const [here, there] = [openThrottle(process.env.REDIS_URL), openThrottle(process.env.REDIS_URL)];
  try {
    for (let i = 0; i < 10; i++) {
      await (i % 2 === 0 ? here : there).attempt("erik@bench.example", `192.0.2.${i}`);
    }
    await expect(there.attempt("erik@bench.example", "192.0.2.99")).rejects.toMatchObject({
      code: "too many",
    });
    await here.succeeded("erik@bench.example", "192.0.2.1");
    await there.attempt("erik@bench.example", "192.0.2.1");
    const keys = await redis.keys("sign-in-account:*");
    expect(keys).toHaveLength(1);
    expect(keys[0]).not.toContain("erik");
  } finally {
    await Promise.all([here.close(), there.close()]);
  }
});
