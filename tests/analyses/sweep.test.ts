import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile, type Job } from "@/lib/analyses/compile";
import type { ShardResult } from "@/lib/analyses/result";
import { type PointRange, shardsOf, strandAt } from "@/lib/analyses/strands";
import { solveRange } from "@/lib/analyses/sweep";
import { OUTCOMES, RUNGS } from "@/lib/solver/outcome";

function example(name: string): Job {
  const { job } = compile(readFileSync(`examples/${name}.swn`, "utf8"));
  if (job === null) throw new Error(`${name} does not compile.`);
  return job;
}

const whole = (job: Job): ShardResult => solveRange(job, 0, job.plan.points);

/** Every column of a result under its name. */
function columns(result: ShardResult): [string, Float64Array][] {
  return [
    ...result.traces.map((column, i): [string, Float64Array] => [`trace ${i}`, column]),
    ...result.unknowns.map((column, i): [string, Float64Array] => [`unknown ${i}`, column]),
    ["outcome", result.outcome],
    ["iterations", result.iterations],
    ["residual", result.residual],
    ["bound", result.bound],
    ["rung", result.rung],
  ];
}

/** The bits, so that NaN equals NaN and −0 is not 0. */
function bits(column: Float64Array): string {
  return Buffer.from(column.buffer, column.byteOffset, column.byteLength).toString("base64");
}

/** The plan cut into `n` ranges at the ends of strands. */
function cutInto(job: Job, n: number): PointRange[] {
  const { points } = job.plan;
  const cuts = Array.from({ length: n + 1 }, (_, k) =>
    k === n ? points : strandAt(job.plan, Math.floor((k * points) / n)).from,
  );
  return cuts.slice(1).map((to, k) => ({ from: cuts[k]!, to }));
}

function expectSame(job: Job, ranges: readonly PointRange[]): void {
  const wanted = new Map(columns(whole(job)));
  // The last range first, as workers might.
  for (const { from, to } of [...ranges].reverse()) {
    const part = solveRange(job, from, to);
    expect([part.from, part.to]).toEqual([from, to]);
    for (const [name, column] of columns(part)) {
      expect(bits(column), `${name} of ${from} to ${to}`).toBe(bits(wanted.get(name)!.slice(from, to)));
    }
  }
}

describe("any sharding gives the same bytes", () => {
  test.each([1, 2, 7])("%i shards of the multiplier", (n) => {
    const job = example("one-quadrant-multiplier");
    const ranges = cutInto(job, n);
    expect(ranges.length).toBe(n);
    expectSame(job, ranges);
  });

  test("the shards of the plan itself", () => {
    const job = example("diode-log-converter");
    const shards = shardsOf(job.plan);
    expect(shards.length).toBeGreaterThan(1);
    expectSame(job, shards);
  });

  test("ranges that begin and end inside a strand", () => {
    expectSame(example("log-ratio-head"), [
      { from: 0, to: 1 },
      { from: 1, to: 77 },
      { from: 77, to: 300 },
      { from: 300, to: 363 },
    ]);
  });

  test("a sweep in which points fail", () => {
    const job = compile(
      readFileSync("examples/reversed-input.swn", "utf8").replace("51 points", "700 points"),
    ).job!;
    expectSame(job, cutInto(job, 3));
  });
});

describe("the examples", () => {
  // Linear systems solved over all points, cold starts and polishing included, as counted when this was written: a slower solver fails.
  test.each([
    ["diode-log-converter", 423, 870, 6],
    ["log-ratio-head", 363, 750, 7],
    ["one-quadrant-divider", 453, 947, 12],
    ["one-quadrant-multiplier", 1204, 1580, 28],
    ["square-root-extractor", 301, 377, 7],
    ["transistor-log-converter", 303, 624, 5],
  ])("%s: all %i points solved in %i steps, none in more than %i", (name, points, total, most) => {
    const job = example(name);
    const result = whole(job);
    expect(job.plan.points).toBe(points);
    expect(result.failures).toEqual([]);
    expect(new Set(result.outcome)).toEqual(new Set([OUTCOMES.indexOf("converged")]));
    expect(result.iterations.reduce((sum, count) => sum + count)).toBeLessThanOrEqual(total);
    expect(total / points).toBeLessThanOrEqual(2.6);
    expect(Math.max(...result.iterations)).toBeLessThanOrEqual(most);
    for (const [, column] of columns(result)) expect(column.every(Number.isFinite)).toBe(true);
  });

  test("start cold once a strand and warm from then on", () => {
    const job = example("log-ratio-head");
    const { rung } = whole(job);
    const cold = [...rung.keys()].filter((point) => RUNGS[rung[point]!] === "newton");
    expect(cold).toEqual([0, 121, 242]);
  });
});

describe("a reversed input", () => {
  const job = example("reversed-input");
  const result = whole(job);

  test("fails where it is reversed, with the reason, and draws nothing there", () => {
    const reversed = job.plan.axes[0]!.values.flatMap((volts, point) => (volts < 0 ? [point] : []));
    expect(reversed).toHaveLength(10);
    expect(result.failures.map(({ point }) => point)).toEqual(reversed);
    for (const { point, outcome, unsettled } of result.failures) {
      expect(outcome).toBe("came to a stand");
      expect(unsettled).toEqual(["out", "sum", "Q1"]);
      expect(OUTCOMES[result.outcome[point]!]).toBe(outcome);
      for (const column of [...result.traces, ...result.unknowns]) expect(column[point]).toBeNaN();
    }
  });

  test("leaves the rest of the sweep standing", () => {
    const { values } = job.plan.axes[0]!;
    const last = values.length - 1;
    // I = Is·(e^(−vout/V_T) − 1), the published law of the stage, at 2 V through 10 kΩ and 25 °C.
    const wanted = -((1.380649e-23 * 298.15) / 1.602176634e-19) * Math.log1p(2e-4 / 0.4e-15);
    expect(result.traces[0]![last]).toBeCloseTo(wanted, 14);
    expect(result.traces[0]![values.indexOf(0)]).toBeCloseTo(0, 20);
  });
});

describe("progress", () => {
  test("is told on the way and at the end, and never goes back", () => {
    const told: number[] = [];
    const job = example("square-root-extractor");
    solveRange(job, 0, job.plan.points, (done) => told.push(done));
    expect(told.length).toBeGreaterThan(3);
    expect(told).toEqual([...told].sort((a, b) => a - b));
    expect(told.at(-1)).toBe(job.plan.points);
  });
});
