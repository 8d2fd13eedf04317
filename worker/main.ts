import { randomUUID } from "node:crypto";
import type { AddressInfo } from "node:net";
import { hostname } from "node:os";
import { workerEnv } from "@/lib/env";
import { openWorker } from "@/lib/queue/connection";
import { closeQueue } from "@/lib/queue/producer";
import { closeListener } from "@/lib/services/events/listen";
import { serveHealth } from "./health";
import { LostSweep } from "./lost-sweep";
import { ShardProcessor } from "./shard-processor";
import { ThreadPool } from "./thread-pool";

/** On a stop, how long shards under way may still end by themselves, ms; then they are given back. */
const GRACE_MS = 1_500;
/** After this long, ms, the process ends whatever still hangs: leases run out by themselves. */
const DEADLINE_MS = 8_000;

const settings = workerEnv();
const limits = { seconds: settings.SHARD_SECONDS, memory: settings.SHARD_MEMORY };
const leaseSeconds = settings.LEASE_SECONDS;

let stopping = false;
const pool = new ThreadPool(settings.WORKER_THREADS, limits);
await pool.ready;
const name = `${hostname()}/${process.pid}/${randomUUID().slice(0, 8)}`;
const processor = new ShardProcessor(pool, { name, leaseSeconds, limits });
const queue = openWorker((job) => processor.handle(job), {
  concurrency: settings.WORKER_THREADS,
  lockSeconds: leaseSeconds,
});
const sweep = new LostSweep(Math.min(5, leaseSeconds / 2));
const health = await serveHealth(settings.WORKER_HEALTH_PORT, () => ({
  ready: !stopping && pool.alive > 0 && sweep.answered,
}));

let warned = 0;
queue.on("error", (error) => {
  // The queue tries again by itself, quickly: one line in two seconds is enough to know.
  if (Date.now() - warned < 2_000) return;
  warned = Date.now();
  console.warn(`The queue: ${error.message}`);
});

async function stop(): Promise<void> {
  if (stopping) process.exit(1);
  stopping = true;
  console.log("Stopping: shards under way end or are given back.");
  setTimeout(() => process.exit(1), DEADLINE_MS).unref();
  sweep.stop();
  const grace = setTimeout(() => processor.stop(), GRACE_MS);
  await queue.close();
  clearTimeout(grace);
  await Promise.all([pool.close(), closeQueue(), closeListener()]);
  health.close();
  process.exit(0);
}
process.on("SIGTERM", () => void stop());
process.on("SIGINT", () => void stop());

const { port } = health.address() as AddressInfo;
console.log(`Worker ${name} takes shards on ${settings.WORKER_THREADS} threads; health on port ${port}.`);
