import { and, eq, inArray, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { chunk } from "@/db/schema/chunk";
import { run } from "@/db/schema/run";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { unknownColumn } from "../chunks/columns";
import { findRun } from "./find-run";

/** The lowest and the highest net voltage to ground over all points that are stored, V, and the nets that have them. */
export interface VoltageSpan {
  readonly low: { readonly net: string; readonly volts: number };
  readonly high: { readonly net: string; readonly volts: number };
}

/** Null while no point is stored. Reads only the extremes that stand beside each chunk. */
export async function findVoltageSpan(actor: Actor, id: string): Promise<VoltageSpan | null> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  const [planned] = await db
    .select({ unknowns: sql<{ name: string; unit: string }[]>`${run.plan}->'unknowns'` })
    .from(run)
    .where(eq(run.id, asked.id));
  const nets = new Map(
    (planned?.unknowns ?? []).flatMap(({ name, unit }, i) =>
      unit === "V" ? [[unknownColumn(i), name]] : [],
    ),
  );
  if (nets.size === 0) return null;
  const found = await db
    .select({
      column: chunk.column,
      low: sql<number | null>`min(${chunk.minimum})`,
      high: sql<number | null>`max(${chunk.maximum})`,
    })
    .from(chunk)
    .where(and(eq(chunk.runId, asked.id), inArray(chunk.column, [...nets.keys()])))
    .groupBy(chunk.column);
  let span: VoltageSpan | null = null;
  for (const { column, low, high } of found) {
    const net = nets.get(column);
    if (net === undefined || low === null || high === null) continue;
    span = {
      low: span === null || low < span.low.volts ? { net, volts: low } : span.low,
      high: span === null || high > span.high.volts ? { net, volts: high } : span.high,
    };
  }
  return span;
}
