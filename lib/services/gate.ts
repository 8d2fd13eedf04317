import { AppError } from "@/lib/errors";

/**
 * Counts what each person has under way of a kind that costs the whole service, and refuses more than `most` of it. It counts
 * within this process, whose connections and memory it guards.
 */
export class Gate {
  readonly #inside = new Map<string, number>();

  /** `sentence` tells a person who is refused what to wait for. */
  constructor(
    private readonly most: number,
    private readonly sentence: string,
  ) {}

  /** Lets a person in; the function it returns lets them out again, once. Throws "too many". */
  enter(userId: string): () => void {
    const before = this.#inside.get(userId) ?? 0;
    if (before >= this.most) throw new AppError("too many", this.sentence, { retryAfter: 5 });
    this.#inside.set(userId, before + 1);
    let inside = true;
    return () => {
      if (!inside) return;
      inside = false;
      const now = this.#inside.get(userId)! - 1;
      if (now === 0) this.#inside.delete(userId);
      else this.#inside.set(userId, now);
    };
  }
}
