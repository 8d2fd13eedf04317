import { describe, expect, it, vi } from "vitest";
import { horizontalAxis } from "@/app/_components/curves/axes";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { whyMissing } from "@/app/_components/curves/failed-reasons";
import { panned, stretched, valuesOf } from "@/app/_components/curves/view-range";
import { zoomByKey } from "@/app/_components/curves/zoom-keys";
import { madeUpSet, madeUpSource } from "./multiplier";

const ruler = { range: { from: 2, to: 4 }, whole: { from: 0, to: 10 } };

describe("a view moved along the ruler", () => {
  it("keeps its width and stops at the ends", () => {
    expect(panned(ruler, 0.5)).toEqual({ from: 3, to: 5 });
    expect(panned(ruler, -5)).toEqual({ from: 0, to: 2 });
    expect(panned(ruler, 50)).toEqual({ from: 8, to: 10 });
  });

  it("comes closer about a place that stays where it is, and is never wider than the ruler", () => {
    expect(stretched(ruler, 0.5, 2)).toEqual({ from: 2, to: 3 });
    expect(stretched(ruler, 0.5)).toEqual({ from: 2.5, to: 3.5 });
    expect(stretched(ruler, 100)).toEqual({ from: 0, to: 10 });
    const { from, to } = stretched(ruler, 1e-12);
    expect(to - from).toBeCloseTo(1e-6, 12);
  });
});

describe("a view in values of the knob", () => {
  const decades = madeUpSet(
    Array.from({ length: 61 }, (_, i) => Number((1e-9 * 10 ** (i / 10)).toPrecision(12))),
  );
  const axis = horizontalAxis(decades, USUAL_VIEW, 600);

  it("is short where it is wide, and has the digits that a close one needs", () => {
    expect(valuesOf(decades, axis, { from: -8, to: Math.log10(3e-7) })).toEqual({ from: 1e-8, to: 3e-7 });
    const close = valuesOf(decades, axis, { from: -7, to: -7 + 1e-6 })!;
    expect(close.from).toBe(1e-7);
    // By hand: 10^(1e-6) = 1 + 2.302588e-6, of which a thousandth is kept.
    expect((close.to / 1e-7 - 1) / 2.302588e-6).toBeCloseTo(1, 2);
  });

  it("is none for the whole ruler", () => {
    expect(valuesOf(decades, axis, axis.whole)).toBeNull();
  });
});

describe("keys that move the view", () => {
  it("do what the buttons do, and leave others alone", () => {
    const zoom = { show: vi.fn(), pan: vi.fn(), stretch: vi.fn(), back: vi.fn(), canGoBack: true };
    for (const key of ["+", "-", ",", ".", "0", "Backspace"]) expect(zoomByKey(key, 3, zoom)).toBe(true);
    expect(zoom.stretch.mock.calls).toEqual([
      [0.5, 3],
      [2, 3],
    ]);
    expect(zoom.pan.mock.calls).toEqual([[-0.25], [0.25]]);
    expect(zoom.show).toHaveBeenCalledWith(null);
    expect(zoom.back).toHaveBeenCalledOnce();
    expect(zoomByKey("q", 3, zoom)).toBe(false);
  });
});

describe("why a point has no value", () => {
  const source = {
    ...madeUpSource([-1, 1], [300]),
    failures: [
      { point: 0, outcome: "came to a stand" as const, unsettled: ["out", "sum", "A1", "D1", "D2"] },
    ],
  };

  it("is how it failed and what would not settle, as far as there is room", () => {
    expect(whyMissing(source, 0)).toMatch(/^failed: .*; out, sum, A1, D1 and 1 more would not settle$/);
    expect(whyMissing({ ...source, failures: [] }, 0)).toMatch(/^failed: /);
  });

  it("is not a failure where it is not solved, or has nothing to show", () => {
    expect(whyMissing({ ...source, points: { outcome: [null, "converged"] } }, 0)).toBe("not solved");
    expect(whyMissing({ ...source, points: { outcome: [null, "converged"] } }, 1)).toBe("no value");
  });
});
