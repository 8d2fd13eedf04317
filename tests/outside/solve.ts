import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import type { Expected, Traces } from "./case";

/** Solves a netlist text through the whole engine. A diagnostic that is an error, or a point that fails or is not proved, throws. */
export function solveText(text: string): Traces {
  const { job, diagnostics } = compile(text);
  if (job === null) {
    const errors = diagnostics.filter(({ severity }) => severity === "error");
    throw new Error(errors.map(({ code, message }) => `${code} ${message}`).join("\n"));
  }
  const { traces, failures, bound } = solveRange(job, 0, job.plan.points);
  if (failures.length > 0) throw new Error(`These points failed: ${JSON.stringify(failures)}`);
  const unproved = [...bound].flatMap((radius, point) => (radius > 0 ? [] : [point]));
  if (unproved.length > 0) throw new Error(`These points are not proved: ${unproved.join(", ")}`);
  return new Map(job.plan.traces.map(({ name }, i) => [name, traces[i]!]));
}

/** What is wrong with the traces, one line a value that misses; empty where all hold. */
export function misses(traces: Traces, expected: readonly Expected[]): readonly string[] {
  return expected.flatMap(({ trace, point = 0, value, relative = 0, absolute = 0 }) => {
    const found = traces.get(trace)?.[point] ?? Number.NaN;
    const wanted = Number(value);
    const error = Math.abs(found - wanted);
    if (error <= relative * Math.abs(wanted) + absolute) return [];
    return [`${trace} at point ${point} is ${found}, not ${wanted}; it is off by ${error}`];
  });
}
