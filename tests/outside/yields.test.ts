import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import { solveRange } from "@/lib/analyses/sweep";
import { YIELDS } from "./yields";

/** A trial of a share Y may be off by 4.5 standard errors, which a right program misses once in 150,000 times. */
const ERRORS = 4.5;

/** Solves every draw; the random draws of the trace, and the requirement. */
function run(text: string) {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  const columns = solveRange(job, 0, job.plan.points);
  expect(columns.failures).toEqual([]);
  const random = columns.traces[0]!.slice(1);
  const mean = random.reduce((sum, value) => sum + value, 0) / random.length;
  const variance = random.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (random.length - 1);
  return {
    n: random.length,
    mean,
    sd: Math.sqrt(variance),
    requirement: judge(job, columns).requirements[0],
  };
}

describe("yields", () => {
  test.each(YIELDS)("$record.id ($record.source)", ({ record, text }) => {
    const { n, mean, sd, requirement } = run(text);
    if (record.yield_value !== undefined) {
      const exact = Number(record.yield_value);
      const { holds, of, low, high } = requirement!.yield!;
      expect(of).toBe(n);
      expect(Math.abs(holds / of - exact)).toBeLessThanOrEqual(ERRORS * Math.sqrt((exact * (1 - exact)) / n));
      expect(low <= holds / of && holds / of <= high).toBe(true);
    }
    if (record.sd !== undefined) {
      const exact = Number(record.sd);
      expect(Math.abs(sd / exact - 1)).toBeLessThanOrEqual(ERRORS / Math.sqrt(2 * n));
    }
    if (record.mean !== undefined) {
      const off = Math.abs(mean - Number(record.mean));
      expect(off).toBeLessThanOrEqual((ERRORS * Number(record.sd)) / Math.sqrt(n));
    }
  });
});
