import { and, eq, inArray, lte, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { CHUNK_POINTS } from "../chunks/codec";
import { traceColumn } from "../chunks/columns";
import { valueAt } from "../chunks/value-at";

/** The first trace of a run in small, along its first axis. `x` runs from 0 to 1; unsolved points are null. */
export interface SparklineData {
  readonly x: readonly number[];
  readonly y: readonly (number | null)[];
  /** Decades that a logarithmic axis spans; 0 for another. */
  readonly decades: number;
}

/** Where a chunk of the first trace begins, as a flat point. */
const START = sql<number>`${shard.from} + ${chunk.index} * ${CHUNK_POINTS}`;
/** The last point that a run's small curve shows. */
const LAST = sql<number>`(select max(point::int) from jsonb_array_elements(${run.preview}->'points') as point)`;

/**
 * The small curves of some runs, by run id; a run without one (no axis, no trace, nothing solved yet) is absent. Authorises
 * nothing: for services that have done so.
 */
export async function sparklinesOf(runIds: readonly string[]): Promise<Map<string, SparklineData>> {
  if (runIds.length === 0) return new Map();
  const db = database();
  const [runs, stored] = await Promise.all([
    db
      .select({ id: run.id, preview: run.preview })
      .from(run)
      .where(inArray(run.id, [...runIds])),
    db
      .select({ id: chunk.runId, from: START, count: chunk.count, data: chunk.data })
      .from(chunk)
      .innerJoin(shard, and(eq(shard.runId, chunk.runId), eq(shard.index, chunk.shardIndex)))
      .innerJoin(run, eq(run.id, chunk.runId))
      .where(and(inArray(chunk.runId, [...runIds]), eq(chunk.column, traceColumn(0)), lte(START, LAST))),
  ]);
  const curves = new Map<string, SparklineData>();
  for (const { id, preview } of runs) {
    if (preview === null) continue;
    const pieces = stored.filter((one) => one.id === id);
    const y = preview.points.map((point) => {
      const piece = pieces.find(({ from, count }) => point >= from && point < from + count);
      const value = piece === undefined ? Number.NaN : valueAt(piece.data, point - piece.from);
      return Number.isFinite(value) ? value : null;
    });
    if (y.some((value) => value !== null)) curves.set(id, { x: preview.x, y, decades: preview.decades });
  }
  return curves;
}
