import { sql } from "drizzle-orm";
import { afterAll, afterEach, beforeAll, expect, test, vi } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { claimShard } from "@/lib/services/shards/claim-shard";
import { requeueLost } from "@/lib/services/shards/requeue-lost";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { ended, enqueue, runRow, runUntil, shardRows, storedPoints } from "./runs";
import { longText } from "./texts";
import { endWorkers, startWorker } from "./worker-process";

// A machine that is busy with other tests may take long.
vi.setConfig({ testTimeout: 180_000, hookTimeout: 180_000 });

let own: OwnDatabase;
let actor: Actor;

beforeAll(async () => {
  own = await ownDatabase();
  actor = await makeActor();
});
afterEach(async () => {
  await endWorkers();
  await database().execute(sql`UPDATE run SET status = 'cancelled' WHERE status IN ('queued', 'running')`);
  await database().execute(sql`DELETE FROM bullmq.job`);
});
afterAll(() => own.drop());

async function jobs(): Promise<string[]> {
  const { rows } = await database().execute<{ id: string }>(sql`SELECT id FROM bullmq.job ORDER BY id`);
  return rows.map(({ id }) => id);
}

/** As if the shards of a run had been queued, or claimed, a minute earlier. */
async function aMinuteLater(runId: string): Promise<void> {
  await database().execute(sql`
    UPDATE shard SET queued_at = queued_at - interval '1 minute', lease_until = lease_until - interval '1 minute'
    WHERE run_id = ${runId}`);
}

test("a shard that waited too long without a job gets one; a second look does not double it", async () => {
  const { id } = await makeRun(actor);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(0);
  expect(await jobs()).toEqual([]);
  await aMinuteLater(id);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(1);
  expect(await jobs()).toEqual([`${id}-0`]);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(0);
  await aMinuteLater(id);
  await requeueLost({ queuedSeconds: 15 });
  expect(await jobs()).toEqual([`${id}-0`]);
});

test("a shard whose lease has run out gets a job; one that is held gets none", async () => {
  const { id } = await makeRun(actor, { text: longText(300) });
  await claimShard({ runId: id, index: 0, worker: "a dead worker", leaseSeconds: 10 });
  await claimShard({ runId: id, index: 1, worker: "a live worker", leaseSeconds: 1_000 });
  await aMinuteLater(id);
  const { shardsLeft } = await runRow(id);
  expect(await requeueLost({ queuedSeconds: 1_000 })).toBe(1);
  expect(await jobs()).toEqual([`${id}-0`]);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(shardsLeft - 1);
  expect(await jobs()).not.toContain(`${id}-1`);
});

test("sweeps at the same time share the lost shards between them", async () => {
  const { id } = await makeRun(actor, { text: longText(1_000) });
  await aMinuteLater(id);
  const { shardsLeft } = await runRow(id);
  const tried = await Promise.all(Array.from({ length: 4 }, () => requeueLost({ queuedSeconds: 15 })));
  expect(tried.reduce((sum, one) => sum + one, 0)).toBe(shardsLeft);
  expect(await jobs()).toHaveLength(shardsLeft);
});

test("nothing of a run that has ended is put on the queue", async () => {
  const { id } = await makeRun(actor);
  await database().execute(sql`UPDATE run SET status = 'failed' WHERE id = ${id}`);
  await aMinuteLater(id);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(0);
});

test("a worker that starts finds a run whose jobs are lost and ends it", async () => {
  const { id } = await makeRun(actor, { text: longText(300) });
  await claimShard({ runId: id, index: 1, worker: "a dead worker", leaseSeconds: 10 });
  await aMinuteLater(id);
  const worker = await startWorker();
  expect(await runUntil(id, ended)).toMatchObject({ status: "done", shardsLeft: 0 });
  const attempts = (await shardRows(id)).map(({ attempt }) => attempt);
  expect(attempts).toEqual(attempts.map((_, index) => (index === 1 ? 2 : 1)));
  const { points } = await runRow(id);
  expect(new Set(Object.values((await storedPoints(id)).values))).toEqual(new Set([points]));
  expect(await worker.stop()).toBe(0);
});

test("jobs that come twice leave a finished run as it is", async () => {
  await startWorker();
  const { id } = await makeRun(actor, { text: longText(300) });
  await enqueue(id);
  await runUntil(id, ended);
  const before = { run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) };
  await enqueue(id);
  await expect.poll(jobs, { timeout: 20_000 }).toEqual([]);
  expect({ run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) }).toEqual(
    before,
  );
});

test("a shard that took five workers down with it fails its run instead of taking a sixth", async () => {
  const { id } = await makeRun(actor);
  for (let attempt = 1; attempt <= 5; attempt++) {
    expect(
      await claimShard({ runId: id, index: 0, worker: "a dead worker", leaseSeconds: 10 }),
    ).toMatchObject({
      kind: "claimed",
      claim: { attempt },
    });
    await aMinuteLater(id);
  }
  await startWorker();
  const row = await runUntil(id, ended);
  expect(row).toMatchObject({ status: "failed", pointsDone: 0 });
  expect(row.error).toMatch(/^The solver broke off 5 times at points 1 to 31\./);
});

test("a run planned with another engine is not mixed: it fails and asks to be queued again", async () => {
  const { id } = await makeRun(actor);
  await database().execute(sql`UPDATE run SET engine_version = 'another' WHERE id = ${id}`);
  await aMinuteLater(id);
  await startWorker();
  const row = await runUntil(id, ended);
  expect(row.status).toBe("failed");
  expect(row.error).toMatch(/another engine.*Queue it again\.$/);
});
