import { requeueLost } from "@/lib/services/shards/requeue-lost";
import { isPassing } from "./retry";

/** A shard that waits for longer than this may have lost its job, seconds. Putting it on again is harmless. */
const QUEUED_SECONDS = 15;

/** Looks for shards whose job was lost, at once and then every `seconds`, one look at a time. */
export class LostSweep {
  #timer: NodeJS.Timeout | undefined;
  #stopped = false;
  #lastDone = 0;

  constructor(private readonly seconds: number) {
    void this.#look();
  }

  /** Whether the tables and the queue answered lately. */
  get answered(): boolean {
    return Date.now() - this.#lastDone < 3_000 * this.seconds;
  }

  stop(): void {
    this.#stopped = true;
    clearTimeout(this.#timer);
  }

  async #look(): Promise<void> {
    try {
      await requeueLost({ queuedSeconds: QUEUED_SECONDS });
      this.#lastDone = Date.now();
    } catch (error) {
      if (isPassing(error)) console.warn("Lost shards could not be looked for, since the database is away.");
      else console.warn("Lost shards could not be looked for.", error);
    }
    if (!this.#stopped) this.#timer = setTimeout(() => void this.#look(), 1_000 * this.seconds);
  }
}
