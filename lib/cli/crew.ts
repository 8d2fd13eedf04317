import type { Worker } from "node:worker_threads";
import type { Plan } from "@/lib/analyses/plan";
import type { ShardResult } from "@/lib/analyses/result";
import { EXIT, Refusal } from "./exit-codes";
import { piecesOf } from "./pieces";
import { spawn } from "./spawn";
import type { Netlist, Piece, Reply, Task } from "./thread-messages";

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
    const results: ShardResult[] = [];
    const done: number[] = pieces.map(() => 0);
    let next = 0;
    const work = async (k: number): Promise<void> => {
      this.workers[k] ??= this.start();
      const worker = await this.workers[k];
      while (next < pieces.length) {
        const place = next++;
        results[place] = await this.ask(worker, netlist, pieces[place]!, (pointsDone) => {
          done[place] = pointsDone;
          onProgress(done.reduce((sum, points) => sum + points, 0));
        });
      }
    };
    await Promise.all(Array.from({ length: Math.min(this.size, pieces.length) }, (_, k) => work(k)));
    return results;
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

  private ask(
    worker: Worker,
    netlist: Netlist,
    piece: Piece,
    onProgress: (pointsDone: number) => void,
  ): Promise<ShardResult> {
    const result = this.hear(worker, (reply) => {
      if (reply.kind === "progress") onProgress(reply.pointsDone);
      return reply.kind === "solved" ? reply.result : null;
    });
    worker.postMessage({ ...netlist, ...piece } satisfies Task);
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
