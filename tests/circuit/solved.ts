import { expect } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { OUTCOMES } from "@/lib/solver/outcome";

/** Traces of a netlist by name, one value a point; every point must be solved and proved. */
export function solved(text: string): Record<string, number[]> {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const { traces, outcome, bound } = solveRange(job, 0, job.plan.points);
  expect([...outcome]).toEqual([...outcome].map(() => OUTCOMES.indexOf("converged")));
  expect([...bound].every(Number.isFinite), `${bound}`).toBe(true);
  return Object.fromEntries(job.plan.traces.map(({ name }, i) => [name, [...traces[i]!]]));
}

/** Closed forms agree to the rounding of a few hundred operations. */
export function close(actual: number, wanted: number): void {
  expect(Math.abs(actual - wanted)).toBeLessThanOrEqual(1e-12 * Math.abs(wanted) + 1e-15);
}
