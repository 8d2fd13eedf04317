import {
  createPostgresBackend,
  DelayedError,
  type Processor,
  Queue,
  Worker,
  type WorkerOptions,
  withBackend,
} from "bullmq";
import { env } from "@/lib/env";
import { SHARD_QUEUE, type ShardJob, shardJob } from "./payloads";

const postgres = withBackend(createPostgresBackend);

/** What the producer needs of a queue, whichever store is behind it. */
export type ShardQueue = Pick<Queue<ShardJob>, "add" | "addBulk" | "close" | "on">;
/** What the worker process needs of BullMQ's worker, whichever store is behind it. */
export type ShardWorker = Pick<Worker<ShardJob>, "close" | "on" | "pause" | "waitUntilReady">;

/** What became of a job: it leaves the queue, or somebody is to try again in so many milliseconds. */
export type Handled = "done" | { readonly againIn: number };

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

/**
 * Takes shard jobs from the queue, `concurrency` at a time, and hands each to `handle`. A job whose worker died comes again once
 * its lock, held for `lockSeconds` and renewed meanwhile, has run out.
 */
export function openWorker(
  handle: (job: ShardJob) => Promise<Handled>,
  { concurrency, lockSeconds }: { readonly concurrency: number; readonly lockSeconds: number },
): ShardWorker {
  const { DATABASE_URL, REDIS_URL } = env();
  const processor: Processor<ShardJob> = async (job, token) => {
    const handled = await handle(shardJob.parse(job.data));
    if (handled === "done") return;
    await job.moveToDelayed(Date.now() + handled.againIn, token);
    throw new DelayedError();
  };
  const options: Omit<WorkerOptions, "connection"> = {
    concurrency,
    lockDuration: 1_000 * lockSeconds,
    stalledInterval: 500 * lockSeconds,
    // How often a shard may be tried is counted in its row, not here.
    maxStalledCount: 1_000,
    // The wait after the store was away; BullMQ's own 15 s would keep people waiting.
    runRetryDelay: 500,
  };
  if (REDIS_URL !== undefined) {
    const connection = { url: REDIS_URL, maxRetriesPerRequest: null };
    return new Worker<ShardJob>(SHARD_QUEUE, processor, { ...options, connection });
  }
  const connection = poolOf(DATABASE_URL, 4);
  const worker = new postgres.Worker<ShardJob>(SHARD_QUEUE, processor, { ...options, connection });
  return worker as unknown as ShardWorker;
}
