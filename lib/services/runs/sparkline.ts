import { and, eq, inArray, lt, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import type { AxisDocument } from "@/lib/analyses/result";
import { CHUNK_POINTS } from "../chunks/codec";
import { valueAt } from "../chunks/value-at";

/** Points of a small curve, at most. */
const MOST = 64;

/** The first trace of a run in small, along its first axis. `x` runs from 0 to 1; unsolved points are null. */
export interface SparklineData {
  readonly x: readonly number[];
  readonly y: readonly (number | null)[];
  /** Decades that a logarithmic axis spans; 0 for another. */
  readonly decades: number;
}

/** The small curves of some runs by run id; a run without one (no axis, no trace, nothing solved yet) is absent. */
export async function sparklinesOf(runIds: readonly string[]): Promise<Map<string, SparklineData>> {
  if (runIds.length === 0) return new Map();
  const db = database();
  const firstAxis = sql<AxisDocument | null>`${run.plan}->'axes'->0`;
  const axes = await db
    .select({ id: run.id, axis: firstAxis })
    .from(run)
    .where(inArray(run.id, [...runIds]));
  const stored = await db
    .select({ id: chunk.runId, from: shard.from, index: chunk.index, data: chunk.data })
    .from(chunk)
    .innerJoin(shard, and(eq(shard.runId, chunk.runId), eq(shard.index, chunk.shardIndex)))
    .innerJoin(run, eq(run.id, chunk.runId))
    .where(
      and(
        inArray(chunk.runId, [...runIds]),
        eq(chunk.column, "trace/0"),
        lt(
          sql`${shard.from} + ${chunk.index} * ${CHUNK_POINTS}`,
          sql`jsonb_array_length(${run.plan}->'axes'->0->'values')`,
        ),
      ),
    );
  const curves = new Map<string, SparklineData>();
  for (const { id, axis } of axes) {
    if (axis === null) continue;
    const pieces = stored
      .filter((one) => one.id === id)
      .map(({ from, index, data }) => ({ from: from + index * CHUNK_POINTS, data }));
    const curve = sparkline(axis, (point) => {
      const piece = pieces.find(({ from, data }) => point >= from && point < from + data.length / 8);
      return piece === undefined ? Number.NaN : valueAt(piece.data, point - piece.from);
    });
    if (curve !== null) curves.set(id, curve);
  }
  return curves;
}

/** Picks at most 64 evenly spaced points of an axis; null where a curve cannot be drawn. */
export function sparkline(axis: AxisDocument, at: (point: number) => number): SparklineData | null {
  const { values } = axis;
  const logarithmic = axis.scale === "logarithmic";
  const place = (value: number) => (logarithmic ? Math.log10(value) : value);
  const low = place(values.reduce((least, value) => Math.min(least, value), Number.POSITIVE_INFINITY));
  const high = place(values.reduce((most, value) => Math.max(most, value), Number.NEGATIVE_INFINITY));
  if (values.length < 2 || !Number.isFinite(high - low) || high === low) return null;
  const size = Math.min(MOST, values.length);
  const points = Array.from({ length: size }, (_, i) => Math.round((i * (values.length - 1)) / (size - 1)))
    .map((point) => ({ x: (place(values[point]!) - low) / (high - low), y: at(point) }))
    .sort((one, other) => one.x - other.x);
  const y = points.map((point) => (Number.isFinite(point.y) ? point.y : null));
  if (y.every((value) => value === null)) return null;
  return { x: points.map(({ x }) => x), y, decades: logarithmic ? high - low : 0 };
}
