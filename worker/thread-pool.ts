import type { Task } from "./messages";
import { type Ended, type Limits, Thread } from "./thread";

/** Wait before a thread that could not start is tried again, ms. */
const RESTART_MS = 1_000;

/** Threads kept warm. One that was ended with its task is replaced at once, in the background. */
export class ThreadPool {
  readonly #idle: Thread[] = [];
  readonly #all = new Set<Thread>();
  readonly #waiting: ((thread: Thread) => void)[] = [];
  #closed = false;
  /** Settles once all threads are warm; rejects when one cannot start. */
  readonly ready: Promise<void>;

  constructor(
    size: number,
    private readonly limits: Limits,
  ) {
    this.ready = Promise.all(Array.from({ length: size }, () => this.#start())).then(() => undefined);
  }

  /** Threads that are alive and warm, busy or not. */
  get alive(): number {
    return [...this.#all].filter(({ gone }) => !gone).length;
  }

  /** Solves a task on the next free thread. `signal` ends it, also while it waits. Never rejects. */
  async solve(task: Task, signal: AbortSignal, onProgress: (pointsDone: number) => void): Promise<Ended> {
    const thread = this.#idle.pop() ?? (await this.#next(signal));
    if (thread === null) return { kind: "aborted" };
    const ended = await thread.run(task, signal, onProgress);
    if (thread.gone) {
      this.#all.delete(thread);
      void this.#replace();
    } else this.#offer(thread);
    return ended;
  }

  async close(): Promise<void> {
    this.#closed = true;
    await Promise.all([...this.#all].map((thread) => thread.close()));
  }

  async #start(): Promise<void> {
    const thread = new Thread(this.limits);
    await thread.ready;
    if (this.#closed) return thread.close();
    this.#all.add(thread);
    this.#offer(thread);
  }

  async #replace(): Promise<void> {
    if (this.#closed) return;
    try {
      await this.#start();
    } catch (error) {
      console.warn("A computing thread could not start; it is tried again.", error);
      setTimeout(() => void this.#replace(), RESTART_MS);
    }
  }

  #offer(thread: Thread): void {
    const taker = this.#waiting.shift();
    if (taker === undefined) this.#idle.push(thread);
    else taker(thread);
  }

  #next(signal: AbortSignal): Promise<Thread | null> {
    if (signal.aborted) return Promise.resolve(null);
    return new Promise((resolve) => {
      const leave = () => {
        const place = this.#waiting.indexOf(take);
        if (place >= 0) this.#waiting.splice(place, 1);
        resolve(null);
      };
      const take = (thread: Thread) => {
        signal.removeEventListener("abort", leave);
        resolve(thread);
      };
      signal.addEventListener("abort", leave);
      this.#waiting.push(take);
    });
  }
}
