import { type ResourceLimits, Worker } from "node:worker_threads";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import type { StoredRow } from "@/lib/services/chunks/branch-columns";
import type { StoredShard } from "@/lib/services/chunks/columns";
import type { Reply, Task } from "./messages";

/** How a task ended. */
export type Ended =
  | { readonly kind: "solved"; readonly result: StoredShard }
  | { readonly kind: "sought"; readonly result: StoredRow }
  | {
      readonly kind: "judged";
      readonly judgement: KeptJudgement;
      readonly overview: Uint8Array<ArrayBuffer> | null;
    }
  | { readonly kind: "aborted" }
  | { readonly kind: "out of time" }
  | { readonly kind: "out of memory" }
  | { readonly kind: "broken"; readonly reason: string };

export interface Limits {
  /** Longest time for one task, seconds. */
  readonly seconds: number;
  /** Heap of the thread, MiB. Typed arrays do not count; a shard bounds them. */
  readonly memory: number;
}

/** The thread's program lies beside this file: bundled in production, TypeScript in development and in tests. */
function spawn(resourceLimits: ResourceLimits): Worker {
  if (import.meta.url.endsWith(".mjs")) {
    return new Worker(new URL("./solve-thread.mjs", import.meta.url), { execArgv: [], resourceLimits });
  }
  const file = new URL("./solve-thread.ts", import.meta.url).href;
  // A thread does not inherit the loader of TypeScript, so it registers its own first; found from the current folder.
  const program = `import("tsx/esm/api").then(({ register }) => { register(); return import("${file}"); })`;
  return new Worker(program, { eval: true, execArgv: [], resourceLimits });
}

/** One computing thread. It takes one task at a time; after anything but "solved", "sought", "judged" or "broken" it is gone. */
export class Thread {
  readonly #worker: Worker;
  /** Settles once the thread has warmed up; rejects when it cannot start. */
  readonly ready: Promise<void>;
  #onReply: (reply: Reply) => void = () => undefined;
  #onGone: (ended: Ended) => void = () => undefined;
  #gone = false;

  constructor(private readonly limits: Limits) {
    this.#worker = spawn({ maxOldGenerationSizeMb: limits.memory });
    this.ready = new Promise((resolve, reject) => {
      this.#onReply = () => resolve();
      this.#onGone = (ended) =>
        reject(new Error(ended.kind === "broken" ? ended.reason : `The thread is ${ended.kind}.`));
    });
    this.#worker.on("message", (reply: Reply) => this.#onReply(reply));
    this.#worker.on("error", (error: Error & { code?: string }) =>
      this.#leave(
        error.code === "ERR_WORKER_OUT_OF_MEMORY"
          ? { kind: "out of memory" }
          : { kind: "broken", reason: error.stack ?? error.message },
      ),
    );
    this.#worker.on("exit", (code) =>
      this.#leave({ kind: "broken", reason: `The thread ended by itself (${code}).` }),
    );
  }

  get gone(): boolean {
    return this.#gone;
  }

  /** Solves `task`; `signal` and the time limit end the thread with it. */
  run(task: Task, signal: AbortSignal, onProgress: (pointsDone: number) => void): Promise<Ended> {
    return new Promise<Ended>((resolve) => {
      const abort = () => this.#leave({ kind: "aborted" });
      const timer = setTimeout(() => this.#leave({ kind: "out of time" }), 1_000 * this.limits.seconds);
      const end = (ended: Ended) => {
        clearTimeout(timer);
        signal.removeEventListener("abort", abort);
        this.#onReply = () => undefined;
        this.#onGone = () => undefined;
        resolve(ended);
      };
      this.#onGone = end;
      this.#onReply = (reply) => {
        if (reply.kind === "progress") onProgress(reply.pointsDone);
        else if (reply.kind !== "ready") end(reply);
      };
      signal.addEventListener("abort", abort);
      if (signal.aborted) abort();
      else this.#worker.postMessage(task);
    });
  }

  /** Ends the thread, and the task it is at as "aborted". */
  async close(): Promise<void> {
    this.#leave({ kind: "aborted" });
    await this.#worker.terminate();
  }

  #leave(ended: Ended): void {
    if (this.#gone) return;
    this.#gone = true;
    void this.#worker.terminate();
    this.#onGone(ended);
  }
}
