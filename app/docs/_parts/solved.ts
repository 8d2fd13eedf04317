import { compile, type Job } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import type { Verdict } from "@/lib/analyses/result";
import { solveRange } from "@/lib/analyses/sweep";
import { formatQuantity } from "@/lib/units/quantity";

/** What a netlist of a page comes to, as figures for people. */
export interface Solved {
  readonly readings: readonly { readonly name: string; readonly value: string }[];
  readonly requirements: readonly {
    readonly label: string;
    readonly verdict: Verdict;
    readonly margin: string;
  }[];
}

/** Answers known so far; the netlists of the pages are few and never change. */
const answers = new Map<string, Solved | null>();

/** Solves a short netlist of a page with the engine of the runs; null where it has an error, or seeks, which takes longer. */
export function solved(text: string): Solved | null {
  let answer = answers.get(text);
  if (answer === undefined) {
    const { job } = compile(text);
    answer = job === null || job.design.seek !== null ? null : solve(job);
    answers.set(text, answer);
  }
  return answer;
}

function solve(job: Job): Solved {
  const { readings, requirements } = judge(job, solveRange(job, 0, job.plan.points));
  return {
    readings: readings
      .filter(({ per }) => per === "sweep")
      .map(({ name, unit, values }) => ({ name, value: spread(values, unit) })),
    requirements: requirements.map(({ label, verdict, margin, unit }) => ({
      label,
      verdict,
      margin: margin === null ? "none" : formatQuantity(margin, unit),
    })),
  };
}

/** The nominal value, or the least and the most of several settings and draws. */
function spread(values: readonly (number | null)[], unit: string): string {
  const known = values.filter((value) => value !== null);
  if (known.length === 0) return "no data";
  const [low, high] = [Math.min(...known), Math.max(...known)].map((value) => formatQuantity(value, unit));
  return low === high ? low! : `${low} to ${high}`;
}
