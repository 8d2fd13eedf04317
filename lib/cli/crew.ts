import type { Worker } from "node:worker_threads";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import { type Plan, soughtRows } from "@/lib/analyses/plan";
import type { ShardResult } from "@/lib/analyses/result";
import { EXIT, Refusal } from "./exit-codes";
import { piecesOf } from "./pieces";
import { spawn } from "./spawn";
import type { Netlist, Reply, Task } from "./thread-messages";

/** Threads that solve one netlist after another; started when there is work for them. */
export class Crew {
  private readonly workers: Promise<Worker>[] = [];

  /** The abort of `signal` ends what is being solved, and its reason is thrown. */
  constructor(
    readonly size: number,
    private readonly signal: AbortSignal,
  ) {}

  /**
   * Solves every point of a plan. Results come in the order of their points, so that they do not tell how many threads there
   * were. Throws a Refusal when a thread breaks down.
   */
  async solve(
    netlist: Netlist,
    plan: Plan,
    onProgress: (pointsDone: number) => void,
  ): Promise<ShardResult[]> {
    const pieces = piecesOf(plan, this.size);
    const done: number[] = pieces.map(() => 0);
    return this.share(pieces, (worker, piece, place) =>
      this.ask(worker, { ...netlist, ...piece }, (reply) => {
        if (reply.kind === "progress") {
          done[place] = reply.pointsDone;
          onProgress(done.reduce((sum, points) => sum + points, 0));
        }
        return reply.kind === "solved" ? reply.result : null;
      }),
    );
  }

  /** Looks for the operating points of every row of a plan whose text asks for several; in the order of the rows. */
  async seek(netlist: Netlist, plan: Plan): Promise<BranchesDocument[]> {
    const rows = Array.from({ length: soughtRows(plan) }, (_, row) => ({ row }));
    return this.share(rows, (worker, row) =>
      this.ask(worker, { ...netlist, ...row }, (reply) => (reply.kind === "sought" ? reply.branches : null)),
    );
  }

  async close(): Promise<void> {
    await Promise.allSettled(this.workers.splice(0).map(async (worker) => (await worker).terminate()));
  }

  private async start(): Promise<Worker> {
    const worker = spawn();
    try {
      return await this.hear(worker, (reply) => (reply.kind === "ready" ? worker : null));
    } catch (reason) {
      await worker.terminate();
      throw reason;
    }
  }

  /** Hands tasks to the threads, each to the next that is free. */
  private async share<T, R>(
    tasks: readonly T[],
    todo: (worker: Worker, task: T, place: number) => Promise<R>,
  ): Promise<R[]> {
    const results: R[] = [];
    let next = 0;
    const work = async (k: number): Promise<void> => {
      this.workers[k] ??= this.start();
      const worker = await this.workers[k];
      while (next < tasks.length) {
        const place = next++;
        results[place] = await todo(worker, tasks[place]!, place);
      }
    };
    await Promise.all(Array.from({ length: Math.min(this.size, tasks.length) }, (_, k) => work(k)));
    return results;
  }

  private ask<R>(worker: Worker, task: Task, answer: (reply: Reply) => R | null): Promise<R> {
    const result = this.hear(worker, answer);
    worker.postMessage(task);
    return result;
  }

  /** Listens to a thread until `answer` finds what is waited for. */
  private hear<T>(worker: Worker, answer: (reply: Reply) => T | null): Promise<T> {
    return new Promise((resolve, reject) => {
      const settle = (deed: () => void) => {
        for (const event of ["message", "error", "exit"]) worker.removeAllListeners(event);
        this.signal.removeEventListener("abort", stop);
        deed();
      };
      const fail = (reason: string) =>
        settle(() => reject(new Refusal(`A solving thread broke down: ${reason}`, EXIT.service)));
      const stop = () => settle(() => reject(this.signal.reason));
      worker.on("message", (reply: Reply) => {
        if (reply.kind === "broken") return fail(reply.reason);
        const found = answer(reply);
        if (found !== null) settle(() => resolve(found));
      });
      worker.on("error", (error: Error) => fail(error.stack ?? error.message));
      worker.on("exit", (code) => fail(`it ended by itself (${code}).`));
      this.signal.addEventListener("abort", stop);
      if (this.signal.aborted) stop();
    });
  }
}
