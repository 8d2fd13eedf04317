import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { rmSync } from "node:fs";
import { join } from "node:path";
import { afterAll } from "vitest";
import { buildWorker } from "@/lib/stack/build";

const STARTED = /takes shards on \d+ threads; health on port (\d+)/;

/** A worker process, built as for production. */
export interface WorkerProcess {
  readonly process: ChildProcess;
  readonly health: string;
  /** What it has written so far. */
  output(): string;
  /** Ends it without a chance to tidy up. */
  kill(): Promise<void>;
  /** Asks it to stop and gives its exit code. */
  stop(): Promise<number | null>;
}

const alive = new Set<ChildProcess>();
let built: Promise<string> | undefined;

const FOLDER = join(".test", `worker-${process.pid}`);

/** Builds the worker, once for a test file. */
async function build(): Promise<string> {
  await buildWorker(FOLDER);
  return join(FOLDER, "main.mjs");
}

afterAll(async () => {
  await endWorkers();
  rmSync(FOLDER, { recursive: true, force: true });
});

/** Starts a worker and waits until it takes shards. Leases of 2 s, so that a test need not wait long for a dead worker's. */
export async function startWorker(environment: Record<string, string> = {}): Promise<WorkerProcess> {
  built ??= build();
  const child = spawn(process.execPath, [await built], {
    env: { ...process.env, LEASE_SECONDS: "2", WORKER_THREADS: "1", WORKER_HEALTH_PORT: "0", ...environment },
    stdio: ["ignore", "pipe", "pipe"],
  });
  alive.add(child);
  let output = "";
  const port = await new Promise<string>((resolve, reject) => {
    const read = (piece: Buffer) => {
      output += piece.toString();
      const started = STARTED.exec(output);
      if (started?.[1] !== undefined) resolve(started[1]);
    };
    child.stdout.on("data", read);
    child.stderr.on("data", read);
    child.once("exit", (code) => reject(new Error(`The worker ended (${code}):\n${output}`)));
  });
  const gone = once(child, "exit").then(() => alive.delete(child));
  return {
    process: child,
    health: `http://127.0.0.1:${port}`,
    output: () => output,
    async kill() {
      child.kill("SIGKILL");
      await gone;
    },
    async stop() {
      child.kill("SIGTERM");
      await gone;
      return child.exitCode;
    },
  };
}

/** Ends the workers that a failed test left behind. */
export async function endWorkers(): Promise<void> {
  await Promise.all(
    [...alive].map(async (child) => {
      const gone = child.exitCode === null && child.signalCode === null ? once(child, "exit") : undefined;
      child.kill("SIGKILL");
      await gone;
      alive.delete(child);
    }),
  );
}
