import type { System } from "@/lib/circuit/system";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { OUTCOMES, type Outcome, RUNGS } from "@/lib/solver/outcome";
import type { Job } from "./compile";
import type { Failure, ShardResult } from "./result";
import type { PointRange } from "./strands";
import { withPoint } from "./unstable";
import { scopeOf, stops } from "./walk";

/** Points between two calls of `watch`. */
const WATCHED = 64;

/**
 * Solves the flat points [from, to) of a job; the result of a point does not depend on the range in which it is asked for. `watch`
 * hears how many points of the range are done. A point that fails is a result: NaN in the columns and a failure with its reason.
 */
export function solveRange(
  job: Job,
  from: number,
  to: number,
  watch?: (pointsDone: number) => void,
): ShardResult {
  const steps = solvePoints(job, from, to);
  for (let done = 0; ; done++) {
    const { value } = steps.next();
    if (value !== undefined) {
      watch?.(to - from);
      return value;
    }
    if ((done + 1) % WATCHED === 0) watch?.(done + 1);
  }
}

/**
 * The same point by point: a step a point, and the result at the end. Without `isProving` the bounds are left unknown, which takes
 * a fraction of the time where there are many unknowns.
 */
export function* solvePoints(
  job: Job,
  from: number,
  to: number,
  isProving = true,
): Generator<undefined, ShardResult, void> {
  const result = emptyShard(job, from, to);
  let scope: Scope | null = null;
  for (const { point, outcome, system } of stops(job, from, to, isProving)) {
    scope ??= scopeOf(system);
    keep(result, point, outcome, job, system, scope);
    yield;
  }
  return result;
}

/** A shard as it fills. */
type Filling = ShardResult & { readonly failures: Failure[]; readonly unstable: PointRange[] };

function emptyShard({ plan }: Job, from: number, to: number): Filling {
  const column = () => new Float64Array(to - from).fill(Number.NaN);
  return {
    from,
    to,
    traces: plan.traces.map(column),
    unknowns: plan.unknowns.map(column),
    outcome: column(),
    iterations: column(),
    residual: column(),
    bound: column(),
    rung: column(),
    failures: [],
    unstable: [],
  };
}

function keep(
  into: Filling,
  point: number,
  outcome: Outcome,
  { design }: Job,
  { state }: System,
  scope: Scope,
): void {
  const k = point - into.from;
  into.outcome[k] = OUTCOMES.indexOf(outcome.kind);
  into.iterations[k] = outcome.iterations;
  into.residual[k] = outcome.residual;
  into.rung[k] = RUNGS.indexOf(outcome.rung);
  if (outcome.kind !== "converged") {
    into.failures.push({ point, outcome: outcome.kind, unsettled: outcome.unsettled });
    return;
  }
  if (outcome.isUnstable) withPoint(into.unstable, point);
  into.bound[k] = outcome.bound;
  for (let j = 0; j < into.unknowns.length; j++) into.unknowns[j]![k] = state.x[j]!;
  for (let j = 0; j < into.traces.length; j++) into.traces[j]![k] = evaluate(design.shows[j]!.value, scope);
}
