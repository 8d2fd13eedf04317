import type { Plan } from "@/lib/analyses/plan";
import type { Failure, ShardResult } from "@/lib/analyses/result";
import { storedForm } from "@/lib/services/chunks/columns";
import { claimShard } from "@/lib/services/shards/claim-shard";
import { completeShard } from "@/lib/services/shards/complete-shard";
import { OUTCOMES, RUNGS } from "@/lib/solver/outcome";

/** The figures that `storeShard` makes up, so that a test knows what must come back: one number for each column and point. */
export const made = {
  trace: (i: number, point: number) => 1000 * (i + 1) + point / 7,
  unknown: (i: number, point: number) => -1000 * (i + 1) - point / 3,
  iterations: (point: number) => 1 + (point % 5),
  residual: (point: number) => 1e-15 * (point + 1),
  bound: (point: number) => 1e-12 * (point + 1),
};

/** Claims a shard and stores made-up figures for it; the points in `failed` are unsolved with "did not settle". */
export async function storeShard(runId: string, index: number, plan: Plan, failed: readonly number[] = []) {
  const claimed = await claimShard({ runId, index, worker: "a test", leaseSeconds: 60 });
  if (claimed.kind !== "claimed") throw new Error(`Shard ${index} cannot be claimed: ${claimed.kind}.`);
  const { from, to } = claimed.claim;
  const each = (value: (point: number) => number) =>
    Float64Array.from({ length: to - from }, (_, k) => value(from + k));
  const solved = (value: (point: number) => number) =>
    each((point) => (failed.includes(point) ? Number.NaN : value(point)));
  const failures: Failure[] = failed
    .filter((point) => point >= from && point < to)
    .map((point) => ({ point, outcome: "did not settle", unsettled: ["s", "D1"] }));
  const result: ShardResult = {
    from,
    to,
    traces: plan.traces.map((_, i) => solved((point) => made.trace(i, point))),
    unknowns: plan.unknowns.map((_, i) => solved((point) => made.unknown(i, point))),
    outcome: each((point) => OUTCOMES.indexOf(failed.includes(point) ? "did not settle" : "converged")),
    iterations: each(made.iterations),
    residual: each(made.residual),
    bound: solved(made.bound),
    rung: each(() => RUNGS.indexOf("newton")),
    failures,
    unstable: [],
  };
  const answer = await completeShard(claimed.claim, storedForm(result));
  if (answer !== "stored") throw new Error(`Shard ${index} was ${answer}.`);
}
