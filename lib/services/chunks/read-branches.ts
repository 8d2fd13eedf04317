import { and, asc, eq, isNotNull } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { type FoundRow, shard } from "@/db/schema/shard";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import { type Plan, rowLength, soughtRows } from "@/lib/analyses/plan";
import { rowFrom } from "./branch-columns";
import { decode } from "./codec";

/** What is found of a run's branches so far, by row, without their columns. Authorises nothing. */
export async function foundRows(runId: string, plan: Plan): Promise<Map<number, FoundRow>> {
  if (soughtRows(plan) === 0) return new Map();
  const rows = await database()
    .select({ from: shard.from, found: shard.found })
    .from(shard)
    .where(and(eq(shard.runId, runId), eq(shard.kind, "branches"), isNotNull(shard.found)));
  return new Map(rows.map(({ from, found }) => [from / rowLength(plan), found!]));
}

/**
 * The branches of a run, one document a row in the order of the rows, null where a row is not in yet; null as a whole where the text
 * does not ask for several operating points. Authorises nothing: for services that have done so.
 */
export async function readBranches(
  runId: string,
  plan: Plan,
): Promise<readonly (BranchesDocument | null)[] | null> {
  const count = soughtRows(plan);
  if (count === 0) return null;
  // Chunks first: what is found of a row is stored together with them, so none is read in part.
  const columns = await columnsOf(runId, plan);
  const found = await foundRows(runId, plan);
  return Array.from({ length: count }, (_, row) => {
    const one = found.get(row);
    const of = columns.get(row) ?? new Map();
    return one === undefined || (one.branches > 0 && of.size === 0) ? null : rowFrom(plan, row, one, of);
  });
}

/** The columns of every row, by row and by name. */
async function columnsOf(runId: string, plan: Plan): Promise<Map<number, Map<string, Float64Array>>> {
  const chunks = await database()
    .select({ from: shard.from, name: chunk.column, data: chunk.data })
    .from(chunk)
    .innerJoin(shard, and(eq(shard.runId, chunk.runId), eq(shard.index, chunk.shardIndex)))
    .where(and(eq(chunk.runId, runId), eq(shard.kind, "branches")))
    .orderBy(asc(chunk.shardIndex), asc(chunk.column), asc(chunk.index));
  const pieces = new Map<number, Map<string, Float64Array[]>>();
  for (const { from, name, data } of chunks) {
    const row = from / rowLength(plan);
    const columns = pieces.get(row) ?? new Map<string, Float64Array[]>();
    pieces.set(row, columns);
    columns.set(name, [...(columns.get(name) ?? []), decode(data)]);
  }
  return new Map(
    [...pieces].map(([row, columns]) => [row, new Map([...columns].map(([name, of]) => [name, whole(of)]))]),
  );
}

function whole(pieces: readonly Float64Array[]): Float64Array {
  const values = new Float64Array(pieces.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const piece of pieces) {
    values.set(piece, at);
    at += piece.length;
  }
  return values;
}
