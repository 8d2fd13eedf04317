import { desc, eq } from "drizzle-orm";
import type { Queryable } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { run } from "@/db/schema/run";
import type { Verdict } from "@/lib/analyses/result";

/** The newest run of a netlist, as lists show it. */
export interface LastRun {
  readonly id: string;
  readonly number: number;
  readonly status: (typeof run.$inferSelect)["status"];
  readonly verdict: Verdict | null;
  readonly points: number;
  readonly pointsFailed: number;
}

/** A lateral subquery with the newest run of the netlist of the row outside. */
export function lastRunOf(db: Queryable) {
  return db
    .select({
      id: run.id,
      number: run.number,
      status: run.status,
      verdict: run.verdict,
      points: run.points,
      pointsFailed: run.pointsFailed,
    })
    .from(run)
    .where(eq(run.netlistId, netlist.id))
    .orderBy(desc(run.number))
    .limit(1)
    .as("last_run");
}
