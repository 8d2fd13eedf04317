import { expect, test } from "vitest";
import { rulerTicks } from "@/app/(work)/[workspace]/netlists/[id]/ruler-ticks";

const sweep = { knob: "I", unit: "A", count: 2 } as const;

test("a logarithmic sweep stands on decades: one long tick at each power of ten, nine steps between", () => {
  const { ticks, decades } = rulerTicks({ ...sweep, scale: "logarithmic", values: [1e-9, 1e-3] });
  expect(decades).toBeCloseTo(6, 12);
  const long = ticks.filter(({ length }) => length === 12).map(({ at }) => Number((at * 6).toFixed(9)));
  expect(long).toEqual([0, 1, 2, 3, 4, 5, 6]);
  expect(ticks).toHaveLength(6 * 9 + 1);
  expect(ticks[1]!.at).toBeCloseTo(Math.log10(2) / 6, 12);
});

test("a sweep downwards is drawn from its first value on the left", () => {
  const { points } = rulerTicks({ ...sweep, scale: "logarithmic", values: [1e-3, 1e-6, 1e-9] });
  expect(points[0]).toBeCloseTo(0, 12);
  expect(points[1]).toBeCloseTo(0.5, 12);
  expect(points[2]).toBeCloseTo(1, 12);
});

test("a list stands on decades where it spans one, and evenly where it cannot", () => {
  expect(rulerTicks({ ...sweep, scale: "list", values: [0.01, 0.1, 1] }).decades).toBeCloseTo(2, 12);
  const temperatures = rulerTicks({ ...sweep, scale: "list", values: [283.15, 298.15, 313.15] });
  expect(temperatures.decades).toBeNull();
  expect(temperatures.points[1]).toBeCloseTo(0.5, 12);
  expect(rulerTicks({ ...sweep, scale: "list", values: [-1, 0, 100] }).decades).toBeNull();
});

test("a single value does not divide by nothing", () => {
  const { ticks, points } = rulerTicks({ ...sweep, count: 1, scale: "list", values: [5] });
  expect(points).toEqual([0]);
  expect(ticks.every(({ at }) => Number.isFinite(at))).toBe(true);
});

test("sweeps over many decades keep only the long ticks", () => {
  const { ticks } = rulerTicks({ ...sweep, scale: "logarithmic", values: [1e-20, 1] });
  expect(ticks).toHaveLength(21);
});
