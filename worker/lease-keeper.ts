import { listen } from "@/lib/services/events/listen";
import type { Claim } from "@/lib/services/shards/claim-shard";
import { renewLease } from "@/lib/services/shards/renew-lease";
import { isPassing } from "./retry";

/** How often progress is looked at, ms. */
const TICK_MS = 200;

/**
 * Renews the lease of a claim: when a third of it has gone, when points were solved since, and at once when the run is announced
 * as ended or the announcements broke off. Calls `onLost` when the claim is worth nothing any more.
 */
export class LeaseKeeper {
  readonly #timer: NodeJS.Timeout;
  readonly #unlisten: () => void;
  #points = 0;
  #told = 0;
  #renewedAt = Date.now();
  #busy = false;
  #again = false;
  #closed = false;

  constructor(
    private readonly claim: Claim,
    private readonly leaseSeconds: number,
    private readonly onLost: () => void,
  ) {
    this.#timer = setInterval(() => this.#tick(), TICK_MS);
    this.#unlisten = listen((announcement) => {
      if (announcement === null) return void this.#renew();
      const { runId, status } = announcement;
      if (runId === claim.runId && (status === "cancelled" || status === "failed")) void this.#renew();
    });
  }

  /** Notes how many points are solved; the tables hear of it at the next tick. */
  progress(pointsDone: number): void {
    this.#points = pointsDone;
  }

  close(): void {
    this.#closed = true;
    clearInterval(this.#timer);
    this.#unlisten();
  }

  #tick(): void {
    const due = Date.now() - this.#renewedAt > (1_000 * this.leaseSeconds) / 3;
    if (due || this.#points !== this.#told) void this.#renew();
  }

  async #renew(): Promise<void> {
    if (this.#closed) return;
    this.#again = this.#busy;
    if (this.#busy) return;
    this.#busy = true;
    const points = this.#points;
    try {
      const { leaseSeconds } = this;
      const answer = await renewLease(this.claim, { leaseSeconds, pointsUnderWay: points });
      this.#renewedAt = Date.now();
      this.#told = points;
      if (answer === "lost" && !this.#closed) this.onLost();
    } catch (error) {
      if (!isPassing(error)) console.warn("A lease could not be renewed.", error);
    } finally {
      this.#busy = false;
    }
    if (this.#again) await this.#renew();
  }
}
