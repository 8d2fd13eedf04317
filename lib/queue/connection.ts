import {
  createPostgresBackend,
  type Processor,
  Queue,
  Worker,
  type WorkerOptions,
  withBackend,
} from "bullmq";
import { env } from "@/lib/env";
import { SHARD_QUEUE, type ShardJob } from "./payloads";

const postgres = withBackend(createPostgresBackend);

/** What the producer needs of a queue, whichever store is behind it. */
export type ShardQueue = Pick<Queue<ShardJob>, "addBulk" | "close" | "on">;
/** What the worker process needs of BullMQ's worker, whichever store is behind it. */
export type ShardWorker = Pick<Worker<ShardJob>, "close" | "on" | "pause" | "waitUntilReady">;

function poolOf(connectionString: string, max: number) {
  return { connectionString, max, connectionTimeoutMillis: 5_000, keepAlive: true };
}

/** The queue on Redis when REDIS_URL is set, otherwise on the same PostgreSQL (schema `bullmq`, made by `migrate`). */
export function openQueue(): ShardQueue {
  const { DATABASE_URL, REDIS_URL } = env();
  // A producer would rather hear at once that the store is away: the sweep of lost shards puts the job on later.
  if (REDIS_URL !== undefined) {
    return new Queue<ShardJob>(SHARD_QUEUE, { connection: { url: REDIS_URL, maxRetriesPerRequest: 1 } });
  }
  const queue = new postgres.Queue<ShardJob>(SHARD_QUEUE, { connection: poolOf(DATABASE_URL, 2) });
  return queue as unknown as ShardQueue;
}

/** Takes shard jobs from the queue, `concurrency` at a time, and hands each to `processor`. */
export function openWorker(
  processor: Processor<ShardJob>,
  options: Omit<WorkerOptions, "connection">,
): ShardWorker {
  const { DATABASE_URL, REDIS_URL } = env();
  if (REDIS_URL !== undefined) {
    const connection = { url: REDIS_URL, maxRetriesPerRequest: null };
    return new Worker<ShardJob>(SHARD_QUEUE, processor, { ...options, connection });
  }
  const worker = new postgres.Worker<ShardJob>(SHARD_QUEUE, processor, {
    ...options,
    connection: poolOf(DATABASE_URL, 4),
  });
  return worker as unknown as ShardWorker;
}
