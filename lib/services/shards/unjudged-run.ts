import { and, eq, isNull } from "drizzle-orm";
import { database } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { Plan } from "@/lib/analyses/plan";
import { traceColumn } from "../chunks/columns";
import { readBranches } from "../chunks/read-branches";
import { readColumns } from "../chunks/read-columns";

/** A finished run whose requirements nobody has judged yet, with all it takes to judge them. */
export interface UnjudgedRun {
  readonly runId: string;
  readonly text: string;
  readonly points: number;
  readonly engineVersion: string;
  /** One column a trace, in the order of the plan. */
  readonly traces: readonly Float64Array[];
  /** Its branches, one document a row; null where the text does not ask for several operating points. */
  readonly branches: readonly (BranchesDocument | null)[] | null;
}

/** The run of that id with its traces; null unless all its points are stored and it is not judged. */
export async function unjudgedRun(runId: string): Promise<UnjudgedRun | null> {
  const db = database();
  const [due] = await db.select({ id: run.id }).from(run).where(isUnjudged(runId));
  if (due === undefined) return null;
  const [row] = await db
    .select({ plan: run.plan, points: run.points, engineVersion: run.engineVersion, text: revision.text })
    .from(run)
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .where(eq(run.id, runId));
  const { plan, points, engineVersion, text } = row!;
  const traces = await tracesOf(runId, plan, points);
  const branches = await readBranches(runId, plan);
  return { runId, text, points, engineVersion, traces, branches };
}

/** What tells a run that is done and not judged. */
export function isUnjudged(runId: string) {
  return and(eq(run.id, runId), eq(run.status, "done"), isNull(run.judgedAt));
}

async function tracesOf(runId: string, plan: Plan, points: number): Promise<Float64Array[]> {
  const names = plan.traces.map((_, i) => traceColumn(i));
  const columns = await readColumns(runId, points, names);
  return names.map((name) => columns.get(name) ?? new Float64Array(points).fill(Number.NaN));
}
