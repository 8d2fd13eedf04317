import { and, eq } from "drizzle-orm";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { tolerancePlace } from "@/lib/analyses/tolerance-place";
import { lineStarts, placeOf, type Span } from "@/lib/language/span";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { compiled } from "./compiled";
import { findRun } from "./find-run";

/** What a run is to be read with: where its text says what, and what has come since. Lines are counted from 1. */
export interface RunContext {
  /** Number of the netlist's newest revision. */
  readonly latestRevision: number;
  /** The line that gives each toleranced value its tolerance, by part and parameter with a blank between. */
  readonly toleranceLines: Readonly<Record<string, number>>;
  /** By the name of the reading. */
  readonly readingLines: Readonly<Record<string, number>>;
  /** In the order of the requirements. */
  readonly requirementLines: readonly number[];
}

/** Throws "not found" for a run that is not in the actor's workspace. */
export async function getRunContext(actor: Actor, id: string): Promise<RunContext> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  const [of] = await db
    .select({ text: revision.text, latestRevision: netlist.latestRevision, judgement: run.judgement })
    .from(run)
    .innerJoin(netlist, eq(netlist.id, run.netlistId))
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .where(eq(run.id, asked.id));
  const { text, latestRevision, judgement } = of!;
  const design = compiled(text).job?.design;
  if (design === undefined) {
    return { latestRevision, toleranceLines: {}, readingLines: {}, requirementLines: [] };
  }
  const starts = lineStarts(text);
  const lineOf = ({ from }: Span) => placeOf(starts, from).line;
  const parts = [...(judgement?.budgets ?? []), ...(judgement?.causes ?? [])].flatMap((one) => one.parts);
  const named = new Map(parts.map((one) => [`${one.part} ${one.parameter}`, one]));
  const lines = [...named].flatMap(([key, one]) => {
    const place = tolerancePlace(design, one);
    return place === null ? [] : [[key, lineOf(place)] as const];
  });
  return {
    latestRevision,
    toleranceLines: Object.fromEntries(lines),
    readingLines: Object.fromEntries(design.reads.map((one) => [one.name, lineOf(one)])),
    requirementLines: design.requirements.map(lineOf),
  };
}
