import { and, eq, gt, lte, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { run } from "@/db/schema/run";
import { shard } from "@/db/schema/shard";
import { drawOf, placeOnAxes } from "@/lib/analyses/plan";
import { reasonOf } from "@/lib/analyses/reasons";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { OUTCOMES, type OutcomeKind, RUNGS, type Rung } from "@/lib/solver/outcome";
import { traceColumn, unknownColumn } from "../chunks/columns";
import { readPoint } from "../chunks/read-columns";
import { findRun } from "./find-run";
import { OUTLINED } from "./get-run";

interface Figure {
  readonly name: string;
  readonly unit: string;
  /** Null where unsolved. */
  readonly value: number | null;
}

/** Everything kept about one point. All values in coherent SI units. */
export interface PointDetail {
  readonly point: number;
  readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
  /** Null, as are all figures, while the point's shard is not in yet. */
  readonly outcome: OutcomeKind | null;
  readonly iterations: number | null;
  /** Largest |F_i|, A. */
  readonly residual: number | null;
  /** A true solution lies within so many volts of this one; null without a proof. */
  readonly bound: number | null;
  readonly rung: Rung | null;
  /** The circuit would leave it: an odd number of its modes grows. False does not prove that it stays. */
  readonly isUnstable: boolean;
  readonly unknowns: readonly Figure[];
  readonly traces: readonly Figure[];
  /** Nets and elements that would not settle, the worst first. */
  readonly unsolved: readonly string[];
  /** One sentence why there is no value; null where there is one. */
  readonly failure: string | null;
}

/** One flat point of a run. Throws "not found" for a point that the run does not have. */
export async function getPoint(actor: Actor, id: string, point: number): Promise<PointDetail> {
  const db = database();
  const asked = await findRun(db, actor, id);
  authorize(actor, "run.read", asked);
  if (!Number.isInteger(point) || point < 0 || point >= asked.points) {
    throw new AppError(
      "not found",
      `Run ${asked.number} has no such point; they go from 0 to ${asked.points - 1}.`,
    );
  }
  // Without the values of long axes: a million of them would be read for one.
  const [planned] = await db.select({ plan: OUTLINED }).from(run).where(eq(run.id, asked.id));
  const { plan } = planned!;
  const values = await readPoint(asked.id, point);
  const [holder] = await db
    .select({ failures: shard.failures, unstable: shard.unstable })
    .from(shard)
    .where(
      and(eq(shard.runId, asked.id), eq(shard.kind, "points"), lte(shard.from, point), gt(shard.to, point)),
    );
  const figure = (column: string): number | null => {
    const value = values?.get(column);
    return value === undefined || Number.isNaN(value) ? null : value;
  };
  const settings = await Promise.all(
    placeOnAxes(plan, point).map(async (place, axis) => {
      const { knob, unit, values, count } = plan.axes[axis]!;
      const value = count === undefined ? values[place]! : await valueOn(asked.id, axis, place);
      return { knob, unit, value };
    }),
  );
  const outcome = OUTCOMES[figure("outcome") ?? -1] ?? null;
  const unsettled = holder?.failures.find((one) => one.point === point)?.unsettled ?? [];
  return {
    point,
    at: [...settings, ...(plan.draws > 0 ? [{ knob: "draw", unit: "1", value: drawOf(plan, point) }] : [])],
    outcome,
    iterations: figure("iterations"),
    residual: figure("residual"),
    bound: figure("bound"),
    rung: RUNGS[figure("rung") ?? -1] ?? null,
    isUnstable: holder?.unstable.some(({ from, to }) => point >= from && point < to) ?? false,
    unknowns: plan.unknowns.map((one, i) => ({ ...one, value: figure(unknownColumn(i)) })),
    traces: plan.traces.map((one, i) => ({ ...one, value: figure(traceColumn(i)) })),
    unsolved: unsettled,
    failure: outcome === null ? "This point is not solved yet." : reasonOf(outcome, unsettled),
  };
}

/** One value of an axis of a stored plan, both counted from 0. */
async function valueOn(runId: string, axis: number, place: number): Promise<number> {
  const [found] = await database()
    .select({ value: sql<number>`(${run.plan}->'axes'->${axis}::int->'values'->${place}::int)::float8` })
    .from(run)
    .where(eq(run.id, runId));
  return found!.value;
}
