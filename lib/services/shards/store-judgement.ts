import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { overview } from "@/db/schema/overview";
import { run } from "@/db/schema/run";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import { appendEvent } from "@/lib/services/events/append-event";
import { isUnjudged } from "./unjudged-run";

/**
 * Stores what became of a finished run's requirements, and what it looks like from afar, once: a second judgement of the same run changes nothing. Where judging
 * itself failed, `fault` says why and the verdict is "no data", which is never a pass.
 */
export async function storeJudgement(
  runId: string,
  outcome:
    | { readonly judgement: KeptJudgement; readonly overview?: Uint8Array<ArrayBuffer> | null }
    | { readonly fault: string },
): Promise<"stored" | "refused"> {
  const values =
    "fault" in outcome
      ? { verdict: "no data" as const, error: outcome.fault }
      : { verdict: outcome.judgement.verdict, judgement: outcome.judgement };
  return database().transaction(async (transaction) => {
    const judged = await transaction
      .update(run)
      .set({ ...values, judgedAt: sql`now()` })
      .where(isUnjudged(runId))
      .returning({ id: run.id });
    if (judged.length === 0) return "refused";
    if ("overview" in outcome && outcome.overview) {
      await transaction
        .insert(overview)
        .values({ runId, data: Buffer.from(outcome.overview) })
        .onConflictDoNothing();
    }
    await appendEvent(transaction, runId, "status");
    return "stored";
  });
}
