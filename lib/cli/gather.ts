import type { Plan } from "@/lib/analyses/plan";
import type { ShardResult } from "@/lib/analyses/result";

/** The columns of a run document, put together from results that cover the plan, in their order. */
export function gather(plan: Plan, results: readonly ShardResult[]) {
  const column = (of: (result: ShardResult) => Float64Array): Float64Array => {
    const whole = new Float64Array(plan.points).fill(Number.NaN);
    for (const result of results) whole.set(of(result), result.from);
    return whole;
  };
  return {
    traces: plan.traces.map((_, k) => column(({ traces }) => traces[k]!)),
    outcome: column(({ outcome }) => outcome),
    iterations: column(({ iterations }) => iterations),
    rung: column(({ rung }) => rung),
    bound: column(({ bound }) => bound),
    failures: results.flatMap(({ failures }) => failures),
    unstable: results.flatMap(({ unstable }) => unstable),
  };
}
