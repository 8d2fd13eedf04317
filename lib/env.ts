import { availableParallelism } from "node:os";
import { z } from "zod";

const whole = (low: number, high: number) => z.coerce.number().int().min(low).max(high);

const common = z.object({
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }),
  REDIS_URL: z.url({ protocol: /^rediss?$/ }).optional(),
});

const web = z.object({ NEXTAUTH_SECRET: z.string().min(16) });

const worker = z.object({
  WORKER_HEALTH_PORT: whole(0, 65_535).default(0),
  /** Threads that compute: two at least unless asked otherwise, so that a long run does not hold up a short one. */
  WORKER_THREADS: whole(1, 64).default(Math.max(2, availableParallelism() - 1)),
  /** Longest time for one shard, seconds. */
  SHARD_SECONDS: whole(1, 3_600).default(120),
  /** Heap of one computing thread, MiB. */
  SHARD_MEMORY: whole(32, 16_384).default(512),
  /** How long a claim holds without being renewed, seconds. */
  LEASE_SECONDS: whole(1, 600).default(10),
});

const demo = z.object({ SWEEPWRIGHT_DEMO_PASSWORD: z.string().min(8).max(128).default("log-ratio-bench-7") });

/** A reader of one part of the environment; a missing or wrong variable is named in the error it throws. */
function reader<T>(shape: z.ZodType<T>): () => T {
  return () => {
    const given = Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== ""));
    const read = shape.safeParse(given);
    if (read.success) return read.data;
    const faults = read.error.issues.map((issue) => `${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`The environment does not fit. ${faults.join("; ")}.`);
  };
}

/** What every process reads: where PostgreSQL is, and Redis when a team runs one. */
export const env = reader(common);
/** What only the web process reads. */
export const webEnv = reader(web);
/** What only the worker process reads. */
export const workerEnv = reader(worker);
/** What only the seed reads. */
export const demoEnv = reader(demo);
