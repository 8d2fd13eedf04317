import { afterAll, beforeAll, expect, test } from "vitest";
import { openWorker } from "@/lib/queue/connection";
import type { ShardJob } from "@/lib/queue/payloads";
import { enqueueShards } from "@/lib/queue/producer";
import { type OwnDatabase, ownDatabase } from "./own-database";

let own: OwnDatabase;
beforeAll(async () => {
  own = await ownDatabase();
});
afterAll(() => own.drop());

/** Ids of runs that are on the queue alone. */
const [LONG, SECOND, THIRD, OTHER] = [1, 2, 3, 4].map((n) => `00000000-0000-4000-8000-00000000000${n}`) as [
  string,
  string,
  string,
  string,
];
const shards = (runId: string, count: number): ShardJob[] =>
  Array.from({ length: count }, (_, index) => ({ runId, index }));

test("a person's many long runs do not keep another person's run waiting to the end", async () => {
  await enqueueShards(shards(LONG, 20), 0);
  await enqueueShards(shards(SECOND, 20), 1);
  await enqueueShards(shards(THIRD, 20), 2);
  await enqueueShards(shards(OTHER, 5), 0);
  const order: ShardJob[] = [];
  const worker = openWorker(
    async (job) => {
      order.push(job);
      return "done";
    },
    { concurrency: 1, lockSeconds: 10 },
  );
  await expect.poll(() => order.length, { timeout: 60_000 }).toBe(65);
  await worker.close();
  const firsts = order.slice(0, 4).map(({ runId, index }) => [runId, index]);
  expect(firsts).toEqual([
    [LONG, 0],
    [OTHER, 0],
    [SECOND, 0],
    [THIRD, 0],
  ]);
  const place = (runId: string, index: number) =>
    order.findIndex((job) => job.runId === runId && job.index === index);
  for (let index = 1; index < 5; index++) {
    expect(place(OTHER, index)).toBeLessThan(place(LONG, index + 1));
    expect(place(OTHER, index)).toBeLessThan(place(SECOND, index));
    expect(place(SECOND, index)).toBeLessThan(place(THIRD, index));
  }
});
