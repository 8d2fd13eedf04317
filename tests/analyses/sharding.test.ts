import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { branchesDocument } from "@/lib/analyses/branches-document";
import { compile, type Job } from "@/lib/analyses/compile";
import { toDocument } from "@/lib/analyses/document";
import type { ShardResult } from "@/lib/analyses/result";
import type { PointRange } from "@/lib/analyses/strands";
import { solveRange } from "@/lib/analyses/sweep";
import { gather } from "@/lib/cli/gather";
import { RUNGS } from "@/lib/solver/outcome";

/** A circuit that Newton's method alone does not solve from a cold start. */
const RUNGS_IN_TURN = `knob V = 20 V
knob R = 1 kΩ
ground -- V1 : voltage V -- in -- R1 : resistor R -- a
L1 : law { plus = a, minus = ground, amps = 100 mA * atan((L1.v - 5 V) / 1 mV) }
sweep V from 15 V to 25 V, 21 points
sweep R over 1 kΩ, 2 kΩ, 3 kΩ
show a.v, L1.i
read top = highest(a.v)
require a.v <= 6 V as "low enough"
`;

const TEXTS: Readonly<Record<string, string>> = {
  "draws, readings and requirements": readFileSync("examples/current-mirrors.swn", "utf8"),
  "points that have no solution": readFileSync("examples/reversed-input.swn", "utf8").replace(
    "51 points",
    "700 points",
  ),
  "several operating points": readFileSync("examples/schmitt-trigger.swn", "utf8"),
  "points that need further rungs": RUNGS_IN_TURN,
};

/** `n` ranges as even as they come. */
function cut({ plan: { points } }: Job, n: number): PointRange[] {
  return Array.from({ length: n }, (_, i) => ({
    from: Math.floor((i * points) / n),
    to: Math.floor(((i + 1) * points) / n),
  })).filter(({ from, to }) => to > from);
}

/** The ranges in an order that has nothing to do with theirs. */
function mixed<T>(ranges: readonly T[], by: number): T[] {
  return ranges
    .map((range, k) => ({ range, key: ((k + 1) * by * 0.6180339887498949) % 1 }))
    .sort((a, b) => a.key - b.key)
    .map(({ range }) => range);
}

describe.each(Object.entries(TEXTS))("the run document with %s", (_, text) => {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const branches = branchesDocument(job);

  function bytesOf(results: readonly ShardResult[]): string {
    const { plan, design } = job!;
    return JSON.stringify(
      toDocument({ plan, design, text, ...gather(plan, results), branches, diagnostics }),
    );
  }

  const whole = bytesOf([solveRange(job, 0, job.plan.points)]);

  test.each([1, 2, 7, 64])(
    "is the same to the last byte from %i shards in any order",
    { timeout: 60_000 },
    (n) => {
      const ranges = cut(job, n);
      const results = new Map(
        mixed(ranges, n).map((range) => [range.from, solveRange(job, range.from, range.to)]),
      );
      for (const by of [1, 2, 3]) {
        const order = mixed(ranges, by);
        expect(bytesOf(order.map(({ from }) => results.get(from)!)) === whole).toBe(true);
      }
      expect(ranges.length).toBe(Math.min(n, job.plan.points));
    },
  );
});

test("the circuit that needs further rungs does need them", () => {
  const { job } = compile(RUNGS_IN_TURN);
  const { rung } = solveRange(job!, 0, job!.plan.points);
  expect([...new Set(rung)].map((index) => RUNGS[index])).toEqual(["line search", "warm start"]);
});
