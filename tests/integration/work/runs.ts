import { createHash } from "node:crypto";
import { asc, eq, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { enqueueShards } from "@/lib/queue/producer";

export type RunRecord = typeof run.$inferSelect;

export async function runRow(runId: string): Promise<RunRecord> {
  const [row] = await database().select().from(run).where(eq(run.id, runId));
  if (row === undefined) throw new Error(`There is no run ${runId}.`);
  return row;
}

export async function shardRows(runId: string): Promise<(typeof shard.$inferSelect)[]> {
  return database().select().from(shard).where(eq(shard.runId, runId)).orderBy(asc(shard.index));
}

/** Puts all shards of a run on the queue. */
export async function enqueue(runId: string): Promise<void> {
  await enqueueShards((await shardRows(runId)).map(({ index }) => ({ runId, index })));
}

/** Reads the run until `enough` holds; throws when it does not within `seconds`. The database may be away meanwhile. */
export async function runUntil(
  runId: string,
  enough: (row: RunRecord) => boolean,
  seconds = 150,
): Promise<RunRecord> {
  const until = Date.now() + 1_000 * seconds;
  for (;;) {
    const row = await runRow(runId).catch(() => undefined);
    if (row !== undefined && enough(row)) return row;
    if (Date.now() > until) throw new Error(`Waited ${seconds} s in vain: ${JSON.stringify(row)}`);
    await new Promise((resolve) => setTimeout(resolve, 15));
  }
}

/** Nothing more will change: it failed, was cancelled, or is done and judged. */
export const ended = ({ status, judgedAt }: RunRecord) =>
  status === "done" ? judgedAt !== null : status !== "queued" && status !== "running";

export interface StoredPoints {
  /** SHA-256 over every chunk's place, count, extremes and bytes, in order. */
  readonly digest: string;
  /** Values stored of each column, by name. */
  readonly values: Readonly<Record<string, number>>;
}

/** Everything stored of a run's points. */
export async function storedPoints(runId: string): Promise<StoredPoints> {
  const rows = await database()
    .select()
    .from(chunk)
    .where(eq(chunk.runId, runId))
    .orderBy(sql`${chunk.column} COLLATE "C"`, asc(chunk.shardIndex), asc(chunk.index));
  const hash = createHash("sha256");
  const values: Record<string, number> = {};
  for (const { column, shardIndex, index, count, minimum, maximum, data } of rows) {
    hash.update(`${column} ${shardIndex} ${index} ${count} ${minimum} ${maximum} ${data.length}\n`);
    hash.update(data);
    values[column] = (values[column] ?? 0) + count;
  }
  return { digest: hash.digest("hex"), values };
}
