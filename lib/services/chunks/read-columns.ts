import { and, eq, gt, inArray, lt, lte, type SQL } from "drizzle-orm";
import { database, type Queryable } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { shard } from "@/db/schema/shard";
import { CHUNK_POINTS, decode } from "./codec";
import { valueAt } from "./value-at";

/** So many values are read by one question; a column that is longer by itself. */
const AT_ONCE = 1_000_000;

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
  const read = async (db: Queryable, ...conditions: (SQL | undefined)[]) => {
    for (const { name, at, data } of await chunks(db, eq(chunk.runId, runId), ...conditions)) {
      let values = columns.get(name);
      if (values === undefined) {
        values = new Float64Array(points).fill(Number.NaN);
        columns.set(name, values);
      }
      values.set(decode(data), at);
    }
  };
  if (names === undefined) await read(database());
  else if (points * names.length <= AT_ONCE) await read(database(), inArray(chunk.column, [...names]));
  else {
    // A few after the other, so that they lie in memory once and nobody else waits long; of one moment, as a single question is.
    const few = Math.max(1, Math.floor(AT_ONCE / points));
    const moment = { isolationLevel: "repeatable read", accessMode: "read only" } as const;
    await database().transaction(async (tx) => {
      for (let i = 0; i < names.length; i += few) {
        await read(tx, inArray(chunk.column, names.slice(i, i + few)));
      }
    }, moment);
  }
  return columns;
}

/** The columns `names` of the flat points [from, to) of a run, each of to − from values, as `readColumns` gives them. Authorises nothing. */
export async function readRange(
  runId: string,
  { from, to }: { readonly from: number; readonly to: number },
  names: readonly string[],
): Promise<Map<string, Float64Array>> {
  const columns = new Map(names.map((name) => [name, new Float64Array(to - from).fill(Number.NaN)]));
  const within = and(eq(chunk.runId, runId), lt(shard.from, to), gt(shard.to, from));
  for (const { name, at, data } of await chunks(database(), within, inArray(chunk.column, [...names]))) {
    const values = decode(data).subarray(Math.max(0, from - at), Math.max(0, to - at));
    if (at + CHUNK_POINTS > from && at < to) columns.get(name)?.set(values, Math.max(0, at - from));
  }
  return columns;
}

/** Every stored column at one flat point of a run, by name; null while the point's shard is not in. Authorises nothing. */
export async function readPoint(runId: string, point: number): Promise<Map<string, number> | null> {
  const here = await chunks(database(), eq(chunk.runId, runId), lte(shard.from, point), gt(shard.to, point));
  const values = new Map<string, number>();
  for (const { name, at, data } of here) {
    if (point < at || point >= at + CHUNK_POINTS) continue;
    values.set(name, valueAt(data, point - at));
  }
  return values.size === 0 ? null : values;
}

async function chunks(db: Queryable, ...conditions: (SQL | undefined)[]) {
  const rows = await db
    .select({ name: chunk.column, from: shard.from, index: chunk.index, data: chunk.data })
    .from(chunk)
    .innerJoin(shard, and(eq(shard.runId, chunk.runId), eq(shard.index, chunk.shardIndex)))
    .where(and(...conditions));
  return rows.map(({ name, from, index, data }) => ({ name, at: from + index * CHUNK_POINTS, data }));
}
