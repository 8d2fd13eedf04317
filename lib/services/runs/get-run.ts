import { and, eq, sql } from "drizzle-orm";
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

/** A swept knob with more values than this is long. */
const LONG = 10_000;

/** The plan without the values of long axes between the first and the last (lib/analyses/plan.ts, `outlineOf`), shortened where they lie. */
export const OUTLINED = sql<Plan>`jsonb_set(${run.plan}, '{axes}', coalesce((
  SELECT jsonb_agg(
    CASE WHEN jsonb_array_length(axis->'values') <= ${LONG} THEN axis ELSE axis || jsonb_build_object(
      'values', jsonb_build_array(axis->'values'->0, axis->'values'->-1),
      'count', jsonb_array_length(axis->'values')
    ) END ORDER BY place)
  FROM jsonb_array_elements(${run.plan}->'axes') WITH ORDINALITY AS one(axis, place)
), '[]'::jsonb))`;

/**
 * Throws "not found" for a run that is not in the actor's workspace. `plan` says how much of it is wanted: all, or all but what lies
 * between the ends of axes of more than 10,000 values.
 */
export async function getRun(
  actor: Actor,
  id: string,
  plan: "whole" | "outline" = "whole",
): Promise<RunSummary> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  const [row] = await db
    .select({ ...RUN_COLUMNS, plan: plan === "whole" ? run.plan : OUTLINED, judgement: run.judgement })
    .from(run)
    .innerJoin(netlist, eq(netlist.id, run.netlistId))
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .innerJoin(user, eq(user.id, run.requestedBy))
    .where(eq(run.id, asked.id));
  return rowOf(row!);
}
