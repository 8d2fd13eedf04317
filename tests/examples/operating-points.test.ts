import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { type Branches, branchesOf } from "@/lib/analyses/branches";
import { compile } from "@/lib/analyses/compile";

function branchesIn(name: string, from = 0): Branches {
  const { job } = compile(readFileSync(`examples/${name}.swn`, "utf8"));
  return branchesOf(job!, from);
}

describe("the examples with several operating points", () => {
  test("the bandgap reference has a zero state and a working one, and an unstable point between them", () => {
    const { branches, folds, isComplete } = branchesIn("bandgap-start-up", 13);
    expect(folds).toEqual([]);
    expect(isComplete).toBe(true);
    const middle = branches.map(({ points }) => points[6]!).sort((a, b) => a.traces[0]! - b.traces[0]!);
    expect(middle.map(({ isStable }) => isStable)).toEqual([true, false, true]);
    expect(middle[0]!.traces[0]!).toBeLessThan(1e-3);
    expect(middle[2]!.traces[0]!).toBeGreaterThan(1.17);
    for (const { points } of branches) expect(points).not.toContain(null);
  });

  test("with its start-up resistor the working state alone is left", () => {
    const { branches, isComplete } = branchesIn("bandgap-start-up");
    expect(isComplete).toBe(true);
    expect(branches).toHaveLength(1);
    for (const point of branches[0]!.points) {
      expect(point).toMatchObject({ isStable: true, index: 1 });
      expect(point!.traces[0]!).toBeGreaterThan(1.17);
    }
  });

  test("the trigger has its thresholds at the folds, and three points between them", () => {
    const { branches, folds, isComplete } = branchesIn("schmitt-trigger");
    expect(isComplete).toBe(true);
    const thresholds = folds.map(({ value }) => value).sort();
    expect(thresholds[0]).toBeCloseTo(1.39, 2);
    expect(thresholds[1]).toBeCloseTo(2.41, 2);
    expect(branches).toHaveLength(3);
    // The sweep has a point every 50 mV from 1 V on.
    for (const [place, count] of [
      [0, 1],
      [20, 3],
      [60, 1],
    ] as const) {
      const there = branches.flatMap(({ points }) => points[place] ?? []);
      expect(there).toHaveLength(count);
      expect(there.filter(({ isStable }) => isStable)).toHaveLength(count === 1 ? 1 : 2);
    }
  });
});
