import { asc, eq } from "drizzle-orm";
import { afterAll, beforeAll, expect, test } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import { event } from "@/db/schema/event";
import { count } from "@/lib/language/limits";
import type { Actor } from "@/lib/permissions/actor";
import { listEvents } from "@/lib/services/events/list-events";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { ShardProcessor } from "@/worker/shard-processor";
import type { Limits } from "@/worker/thread";
import { ThreadPool } from "@/worker/thread-pool";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { runRow, runUntil, shardRows, storedPoints } from "./runs";
import { largeText, longText, SLOW_TEXT } from "./texts";

let own: OwnDatabase;
let actor: Actor;
const pools: ThreadPool[] = [];

beforeAll(async () => {
  own = await ownDatabase();
  actor = await makeActor();
});
afterAll(async () => {
  await Promise.all(pools.map((pool) => pool.close()));
  await own.drop();
});

async function processorWith(limits: Limits): Promise<ShardProcessor> {
  const pool = new ThreadPool(1, limits);
  pools.push(pool);
  await pool.ready;
  return new ShardProcessor(pool, { name: "a worker", leaseSeconds: 10, limits });
}

/** The same processor still solves a small run whole. */
async function proveFit(processor: ShardProcessor): Promise<void> {
  const { id } = await makeRun(actor);
  expect(await processor.handle({ runId: id, index: 0 })).toBe("done");
  expect(await runRow(id)).toMatchObject({ status: "done", pointsFailed: 0 });
}

test("a run cancelled while it computes is left at once, and nothing of the shard is stored", async () => {
  const processor = await processorWith({ seconds: 120, memory: 512 });
  const { id } = await makeRun(actor, { text: SLOW_TEXT });
  const handled = processor.handle({ runId: id, index: 1 });
  await expect
    .poll(async () => (await shardRows(id))[1]!.pointsUnderWay, { timeout: 30_000 })
    .toBeGreaterThan(0);
  const { from, to } = (await shardRows(id))[1]!;
  await cancelRun(actor, id);
  expect(await handled).toBe("done");
  const underWay = (await shardRows(id))[1]!.pointsUnderWay;
  expect(underWay).toBeLessThan(to - from);
  expect(await runRow(id)).toMatchObject({ status: "cancelled", pointsDone: 0 });
  expect((await storedPoints(id)).values).toEqual({});
  const events = await listEvents(actor, { runId: id, after: 0 });
  expect(events.at(-1)!.data.status).toBe("cancelled");
  await proveFit(processor);
});

test("progress is told along the way, not oftener than five times a second", async () => {
  const processor = await processorWith({ seconds: 120, memory: 512 });
  const { id } = await makeRun(actor, { text: SLOW_TEXT });
  expect(await processor.handle({ runId: id, index: 1 })).toBe("done");
  const told = await database().select().from(event).where(eq(event.runId, id)).orderBy(asc(event.sequence));
  // The last one tells of the stored shard, and is not held back.
  const along = told.filter(({ kind }) => kind === "progress").slice(0, -1);
  expect(along.length).toBeGreaterThan(1);
  for (const { sequence, at } of along) {
    expect(at.getTime() - told[sequence - 2]!.at.getTime()).toBeGreaterThanOrEqual(199);
  }
  const done = along.map(({ data }) => data.pointsDone);
  expect(done).toEqual(done.toSorted((a, b) => a - b));
});

test("a shard that takes longer than the limit fails its run with a plain sentence", async () => {
  const processor = await processorWith({ seconds: 0.2, memory: 512 });
  const { id } = await makeRun(actor, { text: SLOW_TEXT });
  expect(await processor.handle({ runId: id, index: 1 })).toBe("done");
  expect(await runRow(id)).toMatchObject({
    status: "failed",
    error:
      "Solving points 251 to 4\u202f001 took longer than the limit of 0.2 s. Make the circuit smaller and queue it again.",
  });
  expect((await storedPoints(id)).values).toEqual({});
  const events = await listEvents(actor, { runId: id, after: 0 });
  expect(events.at(-1)).toMatchObject({ kind: "status", data: { status: "failed" } });
  await proveFit(processor);
});

test("a shard that takes more memory than the limit fails its run with a plain sentence", async () => {
  const processor = await processorWith({ seconds: 120, memory: 32 });
  const { id } = await makeRun(actor, { text: largeText() });
  expect(await processor.handle({ runId: id, index: 0 })).toBe("done");
  expect(await runRow(id)).toMatchObject({
    status: "failed",
    error:
      "Solving points 1 to 250 took more memory than the limit of 32 MiB. Make the circuit smaller and queue it again.",
  });
  await proveFit(processor);
});

test("a solver that breaks off is tried again, and after five times the run fails with a plain sentence", async () => {
  const limits = { seconds: 120, memory: 512 };
  const broken = { solve: async () => ({ kind: "broken" as const, reason: "made to break by a test" }) };
  const processor = new ShardProcessor(broken, { name: "a worker", leaseSeconds: 10, limits });
  const { id } = await makeRun(actor, { text: longText(300) });
  for (let attempt = 1; attempt < 5; attempt++) {
    expect(await processor.handle({ runId: id, index: 2 })).toEqual({ againIn: expect.any(Number) });
    expect((await runRow(id)).status).toBe("running");
  }
  expect(await processor.handle({ runId: id, index: 2 })).toBe("done");
  const { from, to } = (await shardRows(id))[2]!;
  const points = `points ${count(from + 1)} to ${count(to)}`;
  const row = await runUntil(id, ({ status }) => status === "failed");
  expect(row.error).toBe(
    `The solver broke off 5 times at ${points}. This is a fault of the service, not of the netlist: report it to whoever runs it.`,
  );
});
