import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { histogram } from "@/app/(work)/[workspace]/runs/[id]/spread/histogram";

const NONE = { low: null, high: null };

describe("a histogram", () => {
  it("counts values in bins of one width", () => {
    // Six values: 5 bins of 0.2 from 0 to 1; the last edge belongs to the last bin.
    const { bins, known, unknown, outside } = histogram([0, 0.1, 0.25, null, 0.5, 0.95, 1], NONE)!;
    expect(bins.map(({ count }) => count)).toEqual([2, 1, 1, 0, 2]);
    expect(bins.map(({ from }) => Number(from.toFixed(12)))).toEqual([0, 0.2, 0.4, 0.6, 0.8]);
    expect({ known, unknown, outside }).toEqual({ known: 6, unknown: 1, outside: 0 });
  });

  it("has an edge where a limit is, and a value on the limit is within", () => {
    const { bins, outside } = histogram([0, 0.1, 0.3, 0.5, 0.7, 0.7, 1], { low: null, high: 0.7 })!;
    const first = bins.findIndex(({ isOutside }) => isOutside);
    expect(bins[first]!.from).toBeCloseTo(0.7, 12);
    expect(bins.slice(first).reduce((sum, { count }) => sum + count, 0)).toBe(1);
    expect(outside).toBe(1);
  });

  it("parts a value on a limit from those beyond it, at the ends too", () => {
    const least = histogram([1, 2, 3], { low: null, high: 1 })!;
    expect(least.bins.map(({ count, isOutside }) => [count, isOutside])[0]).toEqual([1, false]);
    expect(least.outside).toBe(2);
    const most = histogram([1, 2, 3], { low: 3, high: null })!;
    expect(most.bins.map(({ count, isOutside }) => [count, isOutside]).at(-1)).toEqual([1, false]);
    expect(most.outside).toBe(2);
  });

  it("is one bin for values that are all the same, and nothing without values", () => {
    expect(histogram([3, 3, 3], NONE)!.bins).toEqual([
      { from: expect.closeTo(2.9985, 9), to: expect.closeTo(3.0015, 9), count: 3, isOutside: false },
    ]);
    expect(histogram([0, 0], NONE)!.most).toBe(2);
    expect(histogram([null, null], NONE)).toBeNull();
    expect(histogram([], NONE)).toBeNull();
  });

  it("loses no value, and counts as outside exactly what stands in bins outside, wherever the limits are", () => {
    const value = fc.integer({ min: -9999, max: 9999 }).map((n) => n / 7);
    const limits = fc
      .tuple(fc.option(value), fc.option(value))
      .map(([a, b]) =>
        a !== null && b !== null ? { low: Math.min(a, b), high: Math.max(a, b) } : { low: a, high: b },
      );
    fc.assert(
      fc.property(fc.array(value, { minLength: 1, maxLength: 60 }), limits, (values, within) => {
        const { bins, known, outside } = histogram(values, within)!;
        const sum = (some: typeof bins) => some.reduce((total, { count }) => total + count, 0);
        expect(sum(bins)).toBe(known);
        const length = Math.max(...values) - Math.min(...values);
        const isNarrow =
          within.low !== null && within.high !== null && within.high - within.low < length / 50;
        // Bins have a least width, so limits that lie closer together than that may share one.
        if (length > 0 && !isNarrow) expect(sum(bins.filter((bin) => bin.isOutside))).toBe(outside);
      }),
    );
  });
});
