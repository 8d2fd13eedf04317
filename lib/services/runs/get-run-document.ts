import { and, asc, eq } from "drizzle-orm";
import { database } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { type RunMatter, toDocument } from "@/lib/analyses/document";
import type { Plan } from "@/lib/analyses/plan";
import type { RunDocument } from "@/lib/analyses/result";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { numbersIn } from "../chunks/branch-columns";
import { traceColumn } from "../chunks/columns";
import { foundRows, readBranches } from "../chunks/read-branches";
import { readColumns } from "../chunks/read-columns";
import { compiled } from "./compiled";
import { findRun, type RunRecord } from "./find-run";
import { LARGE, refuseTooLarge, roomFor } from "./large-documents";

/** Names the form of the document; raised with every change of it, so that readers drop what they kept. */
const FORM = "3";

/** A form in which a run's document is sent; each has a tag of its own, since one is no answer to who has the other. */
export type RunForm = "document" | "columns";

/** The version of a run's document in that form, as an entity tag: it changes with every event of the run. */
export async function getRunVersion(actor: Actor, id: string, form: RunForm = "document"): Promise<string> {
  const asked = await findRun(database(), actor, id);
  authorize(actor, "run.read", asked);
  return versionOf(asked, form);
}

export interface Found {
  readonly etag: string;
  /** The document is large: to be sent in pieces. */
  readonly large: boolean;
  /** Says that a large document is no longer needed, so that the next one may be read. */
  readonly release: () => void;
}

export interface FoundDocument extends Found {
  readonly document: RunDocument;
  /** The tag that the columns of the same version have. */
  readonly columnsEtag: string;
}

/**
 * The run document, with what is solved so far. `etag` is weak and never newer than the document: it is read first, and results
 * are stored together with the event that tells of them. Throws "too large" for a run of more than 16 million numbers, and
 * "too many" while other large ones are being read.
 */
export async function getRunDocument(actor: Actor, id: string): Promise<FoundDocument> {
  const asked = await askedFor(actor, id, "document");
  const { etag, large, release } = asked;
  try {
    const matter = await matterOf(asked, ["outcome", "bound", "iterations", "rung"]);
    return {
      document: toDocument(matter),
      etag,
      columnsEtag: versionOf(asked.run, "columns"),
      large,
      release,
    };
  } catch (error) {
    release();
    throw error;
  }
}

/** A run that the actor may read, and room in this process for its numbers. */
export interface Asked extends Found {
  readonly run: RunRecord;
  readonly plan: Plan;
  readonly text: string;
}

export async function askedFor(actor: Actor, id: string, form: RunForm): Promise<Asked> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  // A plan of a million values takes a third of a second: whoever is refused room is refused it before.
  const least = asked.points * 4;
  const early = least >= LARGE ? roomFor(actor.userId, least) : null;
  try {
    return await knownRoom(actor, asked, form, early);
  } catch (error) {
    early?.();
    throw error;
  }
}

/** `early` is the room that a run of so many points is sure to take; null where that is not known before its plan. */
async function knownRoom(
  actor: Actor,
  asked: RunRecord,
  form: RunForm,
  early: (() => void) | null,
): Promise<Asked> {
  const [record] = await database()
    .select({ plan: run.plan, text: revision.text })
    .from(run)
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .where(eq(run.id, asked.id));
  const { plan, text } = record!;
  const rows = [...(await foundRows(asked.id, plan)).values()];
  const numbers = rows.reduce(
    (sum, row) => sum + numbersIn(plan, row),
    asked.points * (plan.traces.length + 4),
  );
  if (early !== null) refuseTooLarge(numbers);
  const release = early ?? roomFor(actor.userId, numbers);
  return { run: asked, plan, text, etag: versionOf(asked, form), large: numbers >= LARGE, release };
}

/**
 * What is known of a run. `names` are the columns wanted beside the traces; others are left without a value. `onColumn` is told of
 * each column as soon as it is whole.
 */
export async function matterOf(
  { run: asked, plan, text }: Asked,
  names: readonly string[],
  onColumn?: (name: string, column: Float64Array) => void,
): Promise<RunMatter> {
  const traces = plan.traces.map((_, i) => traceColumn(i));
  const reading = Promise.all([
    readColumns(asked.id, asked.points, [...traces, ...names], onColumn),
    database()
      .select({ failures: shard.failures, unstable: shard.unstable })
      .from(shard)
      .where(and(eq(shard.runId, asked.id), eq(shard.kind, "points")))
      .orderBy(asc(shard.index)),
    readBranches(asked.id, plan),
  ]);
  // While the database looks for them.
  const { job, diagnostics } = compiled(text);
  const [columns, shards, branches] = await reading;
  const column = (name: string) => columns.get(name) ?? new Float64Array(asked.points).fill(Number.NaN);
  return {
    design: job?.design ?? null,
    plan: { ...plan, title: asked.title },
    text,
    traces: traces.map(column),
    outcome: column("outcome"),
    iterations: column("iterations"),
    rung: column("rung"),
    bound: column("bound"),
    failures: shards.flatMap(({ failures }) => failures),
    unstable: shards.flatMap(({ unstable }) => unstable),
    branches,
    diagnostics,
  };
}

function versionOf({ id, lastEvent }: RunRecord, form: RunForm): string {
  return `W/"${FORM}-${id}-${lastEvent}${form === "document" ? "" : `-${form}`}"`;
}
