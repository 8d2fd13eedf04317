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

/** The last place there is in BullMQ. */
const MOST_PRIORITY = 2_097_152;
/** Before it all first shards go, after it the rest, lower numbers first. */
const REST = 100;

/**
 * Puts shards on the queue. The first shard of a run goes before all others, so that a first curve comes early even behind a
 * long run; the rest of several runs take turns by their index. `ahead` is how many runs whoever asked has open already: the
 * more, the longer this one waits behind those of other people. Throws when the queue's store does not answer; the connection is
 * then opened anew at the next use.
 */
export async function enqueueShards(jobs: readonly ShardJob[], ahead = 0): Promise<void> {
  const opened = queue();
  // A first shard is put on alone and ahead, which reaches a worker several milliseconds sooner than a batch does.
  const first = jobs.filter(({ index }) => index === 0);
  const rest = jobs.filter(({ index }) => index > 0);
  try {
    for (const job of first) {
      // In BullMQ no priority comes before any priority.
      const { name, data, opts } = entry(job, Math.min(ahead, REST - 1));
      await opened.add(name, data, opts);
    }
    if (rest.length > 0) await opened.addBulk(rest.map((job) => entry(job, REST + job.index * (1 + ahead))));
  } catch (error) {
    delete held[KEY];
    void opened.close().catch(() => undefined);
    throw error;
  }
}

function entry(job: ShardJob, priority: number) {
  const order = priority === 0 ? {} : { priority: Math.min(priority, MOST_PRIORITY) };
  const opts = { jobId: jobId(job), removeOnComplete: true, removeOnFail: true, ...order };
  return { name: SHARD_QUEUE, data: shardJob.parse(job), opts };
}

/** Closes the connection, when the process ends. */
export async function closeQueue(): Promise<void> {
  const opened = held[KEY];
  delete held[KEY];
  await opened?.close();
}
