import { and, eq, gt, inArray, lte, type SQL } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { shard } from "@/db/schema/shard";
import { CHUNK_POINTS, decode } from "./codec";
import { valueAt } from "./value-at";

/**
 * The stored columns of a run, each of `points` values, NaN where a point is unsolved or its shard is not in yet. `names` picks
 * columns ("trace/0", "outcome", …); without it all are read. A column of which nothing is stored yet is absent from the map.
 * Authorises nothing: for services that have done so.
 */
export async function readColumns(
  runId: string,
  points: number,
  names?: readonly string[],
): Promise<Map<string, Float64Array>> {
  const columns = new Map<string, Float64Array>();
  for (const { name, at, data } of await chunks(
    eq(chunk.runId, runId),
    names === undefined ? undefined : inArray(chunk.column, [...names]),
  )) {
    let values = columns.get(name);
    if (values === undefined) {
      values = new Float64Array(points).fill(Number.NaN);
      columns.set(name, values);
    }
    values.set(decode(data), at);
  }
  return columns;
}

/** Every stored column at one flat point of a run, by name; null while the point's shard is not in. Authorises nothing. */
export async function readPoint(runId: string, point: number): Promise<Map<string, number> | null> {
  const here = await chunks(eq(chunk.runId, runId), lte(shard.from, point), gt(shard.to, point));
  const values = new Map<string, number>();
  for (const { name, at, data } of here) {
    if (point < at || point >= at + CHUNK_POINTS) continue;
    values.set(name, valueAt(data, point - at));
  }
  return values.size === 0 ? null : values;
}

async function chunks(...conditions: (SQL | undefined)[]) {
  const rows = await database()
    .select({ name: chunk.column, from: shard.from, index: chunk.index, data: chunk.data })
    .from(chunk)
    .innerJoin(shard, and(eq(shard.runId, chunk.runId), eq(shard.index, chunk.shardIndex)))
    .where(and(...conditions));
  return rows.map(({ name, from, index, data }) => ({ name, at: from + index * CHUNK_POINTS, data }));
}
