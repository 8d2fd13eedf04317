import { openQueue, type ShardQueue } from "./connection";
import { jobId, SHARD_QUEUE, type ShardJob, shardJob } from "./payloads";

const KEY = Symbol.for("sweepwright.queue");
const held = globalThis as { [KEY]?: ShardQueue };

function queue(): ShardQueue {
  if (held[KEY] === undefined) {
    const opened = openQueue();
    opened.on("error", (error) => console.warn(`The queue's connection was lost: ${error.message}`));
    held[KEY] = opened;
  }
  return held[KEY];
}

/**
 * Puts shards on the queue. The first shard of a run goes before all others, so that a first curve comes early even behind a
 * long run. Throws when the queue's store does not answer; the connection is then opened anew at the next use.
 */
export async function enqueueShards(jobs: readonly ShardJob[]): Promise<void> {
  const opened = queue();
  try {
    await opened.addBulk(
      jobs.map((job) => ({
        name: SHARD_QUEUE,
        data: shardJob.parse(job),
        opts: {
          jobId: jobId(job),
          // In BullMQ no priority comes before any priority.
          ...(job.index === 0 ? {} : { priority: 10 }),
          removeOnComplete: true,
          removeOnFail: true,
        },
      })),
    );
  } catch (error) {
    delete held[KEY];
    void opened.close().catch(() => undefined);
    throw error;
  }
}

/** Closes the connection, when the process ends. */
export async function closeQueue(): Promise<void> {
  const opened = held[KEY];
  delete held[KEY];
  await opened?.close();
}
