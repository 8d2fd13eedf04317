import { and, eq, gt, inArray, lt, lte, type SQL } from "drizzle-orm";
import { database, type Queryable } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { shard } from "@/db/schema/shard";
import { CHUNK_POINTS, decode, decodeInto } from "./codec";
import { copyChunks, type FoundChunk } from "./copy-chunks";
import { valueAt } from "./value-at";

/** More values than this are copied rather than asked for. */
const MANY = 100_000;

/**
 * The stored columns of a run, each of `points` values, NaN where a point is unsolved or its shard is not in yet. `names` picks
 * columns ("trace/0", "outcome", …); without it all are read. A column of which nothing is stored yet is absent from the map.
 * `onColumn` is told of each that has something stored, as soon as it is whole. Authorises nothing: for services that have done so.
 */
export async function readColumns(
  runId: string,
  points: number,
  names?: readonly string[],
  onColumn: (name: string, column: Float64Array) => void = () => undefined,
): Promise<Map<string, Float64Array>> {
  const columns = new Map<string, Float64Array>();
  const take = ({ name, at, data }: FoundChunk) => {
    let values = columns.get(name);
    if (values === undefined) {
      values = new Float64Array(points).fill(Number.NaN);
      columns.set(name, values);
    }
    decodeInto(values, at, data);
  };
  if (names !== undefined && points * names.length > MANY) {
    let last: string | null = null;
    await copyChunks(runId, names, (found) => {
      if (last !== null && last !== found.name) onColumn(last, columns.get(last)!);
      last = found.name;
      take(found);
    });
    if (last !== null) onColumn(last, columns.get(last)!);
    return columns;
  }
  const which = names === undefined ? undefined : inArray(chunk.column, [...names]);
  for (const found of await chunks(database(), eq(chunk.runId, runId), which)) take(found);
  for (const [name, column] of columns) onColumn(name, column);
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
    .where(and(eq(shard.kind, "points"), ...conditions));
  return rows.map(({ name, from, index, data }) => ({ name, at: from + index * CHUNK_POINTS, data }));
}
