import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Plan } from "@/lib/analyses/plan";
import { shardsOf, strandAt } from "@/lib/analyses/strands";

function planWith(lengths: readonly number[]): Plan {
  const axes = lengths.map((length, i) => ({
    knob: `k${i}`,
    unit: "1",
    scale: "linear" as const,
    values: Array.from({ length }, (_, k) => k),
  }));
  return {
    title: "",
    axes,
    draws: 0,
    points: lengths.reduce((product, length) => product * length, 1),
    traces: [],
    unknowns: [],
  };
}

const lengths = fc
  .array(fc.integer({ min: 1, max: 700 }), { maxLength: 3 })
  .filter((list) => list.reduce((product, length) => product * length, 1) < 60_000);

describe("strands", () => {
  test("are at most 256 neighbours of one row, and every point knows its own", () => {
    fc.assert(
      fc.property(lengths, fc.nat(), (list, any) => {
        const plan = planWith(list);
        const point = any % plan.points;
        const { from, to } = strandAt(plan, point);
        const row = list[0] ?? 1;
        expect(from).toBeLessThanOrEqual(point);
        expect(to).toBeGreaterThan(point);
        expect(to - from).toBeLessThanOrEqual(256);
        expect(Math.floor(from / row)).toBe(Math.floor((to - 1) / row));
        expect(strandAt(plan, from)).toEqual({ from, to });
        expect(strandAt(plan, to - 1)).toEqual({ from, to });
      }),
    );
  });

  test("cut a long axis evenly", () => {
    const plan = planWith([301, 2]);
    expect([0, 150, 301, 601].map((point) => strandAt(plan, point))).toEqual([
      { from: 0, to: 150 },
      { from: 150, to: 301 },
      { from: 301, to: 451 },
      { from: 451, to: 602 },
    ]);
  });
});

describe("shards", () => {
  test("cover every point once, begin and end with strands, and hold 4096 points at most", () => {
    fc.assert(
      fc.property(lengths, (list) => {
        const plan = planWith(list);
        const shards = shardsOf(plan);
        expect(shards[0]).toEqual(strandAt(plan, 0));
        let at = 0;
        for (const { from, to } of shards) {
          expect(from).toBe(at);
          expect(to).toBeGreaterThan(from);
          expect(to - from).toBeLessThanOrEqual(4096);
          expect(strandAt(plan, from).from).toBe(from);
          expect(strandAt(plan, to - 1).to).toBe(to);
          at = to;
        }
        expect(at).toBe(plan.points);
      }),
    );
  });

  test("fill up: a million points are not cut finer than they need be", () => {
    const shards = shardsOf(planWith([1000, 1000]));
    expect(shards.length).toBeLessThanOrEqual(1 + Math.ceil(1_000_000 / (4096 - 250)));
  });
});
