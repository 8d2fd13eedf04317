import { and, eq } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Plan } from "@/lib/analyses/plan";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findRun } from "./find-run";
import { RUN_COLUMNS, type RunRow, rowOf } from "./run-columns";

/** The state of a run and what it set out to do, without its results. */
export interface RunSummary extends RunRow {
  readonly plan: Plan;
  /** Null before the run is judged. */
  readonly judgement: KeptJudgement | null;
}

/** Throws "not found" for a run that is not in the actor's workspace. */
export async function getRun(actor: Actor, id: string): Promise<RunSummary> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  const [row] = await db
    .select({ ...RUN_COLUMNS, plan: run.plan, judgement: run.judgement })
    .from(run)
    .innerJoin(netlist, eq(netlist.id, run.netlistId))
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .innerJoin(user, eq(user.id, run.requestedBy))
    .where(eq(run.id, asked.id));
  return rowOf(row!);
}
