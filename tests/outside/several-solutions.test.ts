import { describe, expect, test, vi } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { seek } from "@/lib/solver/seek";
import { SEVERAL, textOf } from "./several-solutions";

vi.setConfig({ testTimeout: 60_000 });

describe.each(SEVERAL)("$id: $source", (record) => {
  const { job, diagnostics } = compile(textOf(record));
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const system = new System(job.design, job.circuit);
  const found = seek(system, 9);
  const wanted = record.solutions.map(({ values, remark }) => ({
    remark: remark ?? "",
    values: Object.entries(values).map(
      ([net, value]) => [job.circuit.nets.get(net)!, Number(value)] as const,
    ),
  }));
  /** The farthest of a point's voltages from a solution of the record, V. */
  const apart = (x: Float64Array, { values }: (typeof wanted)[number]) =>
    Math.max(...values.map(([net, value]) => Math.abs(x[net]! - value)));

  test(`all ${record.solutions.length} solutions are found and none is invented`, () => {
    expect(found.isComplete).toBe(true);
    expect(found.points).toHaveLength(wanted.length);
    for (const solution of wanted) {
      // A double-precision root is good to 1e-14 V; the record's figures have 40 digits.
      expect(found.points.filter(({ x }) => apart(x, solution) <= 1e-12)).toHaveLength(1);
    }
  });

  test("each is proved, and within its bound", () => {
    // The record's figures are read as doubles, which round by 2e-16 V here.
    for (const { x, bound } of found.points) {
      expect(bound).toBeLessThan(10e-12);
      expect(Math.min(...wanted.map((one) => apart(x, one)))).toBeLessThanOrEqual(bound + 2e-16);
    }
  });

  test("those that are called stable are, and no others", () => {
    for (const solution of wanted) {
      const point = found.points.find(({ x }) => apart(x, solution) <= 1e-9)!;
      if (solution.remark === "") continue;
      expect(point.isStable, solution.remark).toBe(!solution.remark.startsWith("unstable"));
    }
  });
});
