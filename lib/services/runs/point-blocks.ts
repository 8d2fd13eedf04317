import { database } from "@/db/client";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { OUTCOMES, type OutcomeKind } from "@/lib/solver/outcome";
import { traceColumn } from "../chunks/columns";
import { readRange } from "../chunks/read-columns";
import { Gate } from "../gate";
import { findRun } from "./find-run";
import { getRun, type RunSummary } from "./get-run";

/** Points of one block. */
const BLOCK = 4_096;

/** Runs that one person reads so at a time: whoever takes them slowly holds a plan of up to a million values all the while. */
const readings = new Gate(
  4,
  "You are fetching the points of four runs already. Wait until one of them has come.",
);

/** Neighbouring points of a run, from the flat point `from` on. */
export interface PointBlock {
  readonly from: number;
  /** One column a trace; NaN where unsolved. */
  readonly traces: readonly Float64Array[];
  /** Null where a point is not solved yet. */
  readonly outcome: readonly (OutcomeKind | null)[];
  /** V; NaN where a point is not solved or not proved. */
  readonly bound: Float64Array;
}

/**
 * A run, and all its points block by block, each read when it is asked for: a run of any size takes little memory. `release` says
 * that no more are wanted. Throws "not found" for a run that is not in the actor's workspace, and "too many" to a person who reads four.
 */
export async function getPointBlocks(
  actor: Actor,
  id: string,
): Promise<{ run: RunSummary; blocks: AsyncGenerator<PointBlock, void>; release: () => void }> {
  const asked = await findRun(database(), actor, id);
  authorize(actor, "run.read", asked);
  const release = readings.enter(actor.userId);
  try {
    const run = await getRun(actor, id);
    return { run, blocks: blocksOf(run), release };
  } catch (error) {
    release();
    throw error;
  }
}

async function* blocksOf({ id, points, plan }: RunSummary): AsyncGenerator<PointBlock, void> {
  const traces = plan.traces.map((_, i) => traceColumn(i));
  for (let from = 0; from < points; from += BLOCK) {
    const columns = await readRange(id, { from, to: Math.min(points, from + BLOCK) }, [
      ...traces,
      "outcome",
      "bound",
    ]);
    yield {
      from,
      traces: traces.map((name) => columns.get(name)!),
      outcome: Array.from(columns.get("outcome")!, (index) => OUTCOMES[index] ?? null),
      bound: columns.get("bound")!,
    };
  }
}
