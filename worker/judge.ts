import { ENGINE_VERSION } from "@/lib/analyses/version";
import type { Handled } from "@/lib/queue/connection";
import * as sentences from "@/lib/services/shards/sentences";
import { storeJudgement } from "@/lib/services/shards/store-judgement";
import { unjudgedRun } from "@/lib/services/shards/unjudged-run";
import { persist } from "./retry";
import type { Limits } from "./thread";
import type { ThreadPool } from "./thread-pool";

/** Wait before a judgement that was broken off is tried again, ms. */
const AGAIN_MS = 200;

/** Judges runs whose points are all stored. Several workers may judge one run: the first result is kept, and all are the same. */
export class Judge {
  constructor(
    private readonly pool: Pick<ThreadPool, "solve">,
    private readonly stopping: AbortSignal,
    private readonly limits: Limits,
  ) {}

  /** Judges the run if it is done and not judged yet. */
  async run(runId: string): Promise<Handled> {
    const due = await unjudgedRun(runId);
    if (due === null) return "done";
    const store = (outcome: Parameters<typeof storeJudgement>[1]): Promise<Handled> =>
      persist(this.stopping, () => storeJudgement(runId, outcome)).then(() => "done");
    if (due.engineVersion !== ENGINE_VERSION) return store({ fault: sentences.engineChanged() });
    const { text, traces, branches, points } = due;
    const ended = await this.pool.solve(
      { kind: "judge", text, traces, branches, points },
      this.stopping,
      () => undefined,
    );
    switch (ended.kind) {
      case "judged":
        return store({ judgement: ended.judgement, overview: ended.overview });
      case "aborted":
        return { againIn: AGAIN_MS };
      case "out of time":
        return store({ fault: sentences.judgementTooLong(this.limits.seconds) });
      case "out of memory":
        return store({ fault: sentences.judgementTooLarge(this.limits.memory) });
      default:
        console.error(`Run ${runId} could not be judged. ${ended.kind === "broken" ? ended.reason : ""}`);
        return store({ fault: sentences.judgementBroken() });
    }
  }
}
