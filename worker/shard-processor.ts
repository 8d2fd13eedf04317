import { ENGINE_VERSION } from "@/lib/analyses/version";
import type { Handled } from "@/lib/queue/connection";
import type { ShardJob } from "@/lib/queue/payloads";
import { beginRun } from "@/lib/services/shards/begin-run";
import { type Claim, claimShard } from "@/lib/services/shards/claim-shard";
import { completeShard } from "@/lib/services/shards/complete-shard";
import { failShard } from "@/lib/services/shards/fail-shard";
import { releaseShard } from "@/lib/services/shards/release-shard";
import type { GivenUp } from "@/lib/services/shards/sentences";
import * as sentences from "@/lib/services/shards/sentences";
import { Judge } from "./judge";
import { LeaseKeeper } from "./lease-keeper";
import type { Task } from "./messages";
import { isPassing, persist } from "./retry";
import type { Ended, Limits } from "./thread";
import type { ThreadPool } from "./thread-pool";

/** Claims of one shard before its run is given up. */
const MOST_ATTEMPTS = 5;
/** Wait before a shard is tried again, ms. */
const AGAIN_MS = 200;

export interface Settings {
  /** Names this worker in the claims it makes. */
  readonly name: string;
  readonly leaseSeconds: number;
  readonly limits: Limits;
}

/** Computes shards: claims one, solves it on a thread while the lease is renewed, and stores what came of it. */
export class ShardProcessor {
  readonly #stopping = new AbortController();
  /** The shards under way, each ended by its own signal. */
  readonly #underWay = new Set<AbortController>();
  private readonly judge: Judge;

  constructor(
    private readonly pool: Pick<ThreadPool, "solve">,
    private readonly settings: Settings,
  ) {
    this.judge = new Judge(pool, this.#stopping.signal, settings.limits);
  }

  /** Breaks off what is under way and gives the claims back. */
  stop(): void {
    this.#stopping.abort();
    for (const one of this.#underWay) one.abort();
  }

  async handle(job: ShardJob): Promise<Handled> {
    try {
      if (this.#stopping.signal.aborted) return { againIn: 0 };
      const { name, leaseSeconds } = this.settings;
      const claimed = await claimShard({ ...job, worker: name, leaseSeconds });
      // The job of a stored shard comes again where the run's judgement was lost.
      if (claimed.kind === "over") return await this.judge.run(job.runId);
      if (claimed.kind === "held") return { againIn: claimed.milliseconds + AGAIN_MS };
      return await this.#compute(claimed.claim);
    } catch (error) {
      if (!isPassing(error)) throw error;
      return { againIn: AGAIN_MS };
    }
  }

  async #compute(claim: Claim): Promise<Handled> {
    if (claim.engineVersion !== ENGINE_VERSION) return this.#fail(claim, sentences.engineChanged());
    if (claim.attempt > MOST_ATTEMPTS) return this.#giveUp(claim, "broken");
    const begun = claim.begun ? null : this.#begin(claim.runId);
    const ended = await this.#solve(claim);
    await begun;
    return this.#settle(claim, ended);
  }

  /** The run is shown as running while the thread already computes; storing a shard does not depend on it. */
  async #begin(runId: string): Promise<void> {
    await beginRun(runId).catch((error) =>
      console.warn(`Run ${runId} could not be shown as running.`, error),
    );
  }

  async #solve(claim: Claim): Promise<Ended> {
    const end = new AbortController();
    const keeper = new LeaseKeeper(claim, this.settings.leaseSeconds, () => end.abort());
    this.#underWay.add(end);
    try {
      const progress = (pointsDone: number) => keeper.progress(pointsDone);
      return await this.pool.solve(taskOf(claim), end.signal, progress);
    } finally {
      this.#underWay.delete(end);
      keeper.close();
    }
  }

  async #settle(claim: Claim, ended: Ended): Promise<Handled> {
    switch (ended.kind) {
      case "solved":
      case "sought":
        await persist(this.#stopping.signal, () => completeShard(claim, ended.result));
        return this.judge.run(claim.runId);
      case "judged":
        throw new Error("A shard was answered with a judgement.");
      case "out of time":
      case "out of memory":
        return this.#giveUp(claim, ended.kind);
      case "broken":
        console.error(`Points ${claim.from} to ${claim.to} of run ${claim.runId} broke off. ${ended.reason}`);
        return claim.attempt >= MOST_ATTEMPTS ? this.#giveUp(claim, "broken") : this.#release(claim);
      case "aborted":
        return this.#stopping.signal.aborted ? this.#release(claim) : "done";
    }
  }

  /** Without a shard of its points a run has failed; one whose branches are not found keeps its points, and says so. */
  async #giveUp(claim: Claim, why: GivenUp): Promise<Handled> {
    const sentence = sentences.givenUp(claim, why, { ...this.settings.limits, attempts: MOST_ATTEMPTS });
    if (claim.kind === "points") return this.#fail(claim, sentence);
    const found = { complete: false, branches: 0, folds: 0, fault: sentence };
    await persist(this.#stopping.signal, () => completeShard(claim, { found, columns: [] }));
    return this.judge.run(claim.runId);
  }

  async #fail(claim: Claim, sentence: string): Promise<Handled> {
    await persist(this.#stopping.signal, () => failShard(claim, sentence));
    return "done";
  }

  async #release(claim: Claim): Promise<Handled> {
    await releaseShard(claim);
    return { againIn: AGAIN_MS };
  }
}

function taskOf({ kind, text, from, to, points }: Claim): Task {
  if (kind === "points") return { kind: "solve", text, from, to, points };
  return { kind: "seek", text, row: from / (to - from), points };
}
