import { describe, expect, it } from "vitest";
import { horizontalAxis } from "@/app/_components/curves/axes";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { bandOf } from "@/app/_components/curves/draw-bands";
import { storeyViews } from "@/app/_components/curves/storey-views";
import { shownWorst, worstDraws } from "@/app/_components/curves/worst-draw";

describe("the band of the draws", () => {
  it("lies at the 5th and 95th percentile of what is solved, the nominal design left out", () => {
    // One point, nominal 1000, then draws 0 to 100: their percentiles are their own numbers.
    const values = Float64Array.of(1000, ...Array.from({ length: 101 }, (_, i) => (i * 37) % 101));
    expect(bandOf(values, { length: 1, families: 1, draws: 101 })).toEqual({
      low: Float64Array.of(5),
      high: Float64Array.of(95),
    });
  });

  it("interpolates between order statistics as R does by default (definition 7)", () => {
    // By hand: of 1, 2, 3, 4 the 5th percentile is 1 + 0.15 and the 95th 3 + 0.85.
    const { low, high } = bandOf(Float64Array.of(0, 4, 2, 3, 1), { length: 1, families: 1, draws: 4 });
    expect(low[0]).toBeCloseTo(1.15, 12);
    expect(high[0]).toBeCloseTo(3.85, 12);
  });

  it("counts the solved draws alone, and leaves a gap where none is", () => {
    const values = Float64Array.of(1, 1, Number.NaN, Number.NaN, 7, Number.NaN);
    const { low, high } = bandOf(values, { length: 2, families: 1, draws: 2 });
    expect([...low, ...high]).toEqual([7, Number.NaN, 7, Number.NaN]);
  });
});

/** Made up: two settings of three points, two draws. */
const source: CurveSource = {
  axes: [
    { knob: "I", unit: "A", scale: "logarithmic", values: [1e-9, 1e-8, 1e-7] },
    { knob: "temperature", unit: "K", scale: "list", values: [283.15, 298.15] },
  ],
  draws: 2,
  traces: [{ name: "out", unit: "V", values: Array.from({ length: 18 }, (_, i) => i) }],
  points: { outcome: Array.from({ length: 18 }, () => "converged" as const) },
  readings: [
    { name: "bend", unit: "V", per: "point", values: Array.from({ length: 18 }, (_, i) => 1e-4 * i) },
    { name: "scale", unit: "V", per: "sweep", values: [1, 2, 3, 4, 5, 6] },
  ],
  requirements: [
    { label: "zero", verdict: "holds", worst: { draw: 1 } },
    { label: "nominal", verdict: "holds", worst: { draw: 0 } },
    { label: "conformance", verdict: "broken", worst: { draw: 2 } },
  ],
};
const set = curveSet(source)!;
const allowed = [
  { label: "conformance", trace: "bend", from: 1e-9, to: 1e-8, low: -1e-3, high: 1e-3, at: [] },
  {
    label: "one setting",
    trace: "out",
    from: 1e-8,
    to: 1e-8,
    low: null,
    high: 3,
    at: [{ knob: "temperature", low: 298.15, high: 298.15 }],
  },
];
const bands = new Map([["bend 0", { low: Float64Array.of(0, 0, 0), high: Float64Array.of(1, 2, 4) }]]);
const viewsOf = (view = USUAL_VIEW, worst: number | null = null) =>
  storeyViews(set, view, horizontalAxis(set, view, 600), false, { allowed, bands, worst });

describe("storeys of a run with draws and readings", () => {
  it("stand two high: the trace above, below it what is read at each point", () => {
    expect(viewsOf().map(({ key, traces, isReading }) => [key, traces, isReading])).toEqual([
      ["V", ["out"], false],
      ["V read", ["bend"], true],
    ]);
  });

  it("draw the values of the worst draw beside those of the nominal design", () => {
    const [above] = viewsOf(USUAL_VIEW, 2);
    expect(above!.lines.map(({ values }) => [...values])).toEqual([
      [0, 1, 2],
      [3, 4, 5],
    ]);
    expect(above!.worst.map(({ values }) => [...values])).toEqual([
      [12, 13, 14],
      [15, 16, 17],
    ]);
    expect(above!.axis.range.to).toBeGreaterThanOrEqual(17);
  });

  it("make room for a band, and hide it where the reader does", () => {
    expect(viewsOf()[1]!.axis.range.to).toBeGreaterThanOrEqual(4);
    const hidden = viewsOf({ ...USUAL_VIEW, band: false })[1]!;
    expect(hidden.bands).toEqual([]);
    expect(hidden.axis.range.to).toBeLessThan(1);
  });

  it("shade what is allowed where it belongs, for the settings it is about", () => {
    const [above, below] = viewsOf({ ...USUAL_VIEW, band: false });
    expect(below!.allowed).toEqual([{ label: "conformance", from: -9, to: -8, low: -1e-3, high: 1e-3 }]);
    expect(below!.axis.range).toEqual({ from: -1e-3, to: 1e-3 });
    expect(above!.allowed).toEqual([{ label: "one setting", from: -8, to: -8, low: null, high: 3 }]);
    const cold = viewsOf({ ...USUAL_VIEW, families: [0] });
    expect(cold[0]!.allowed).toEqual([]);
  });

  it("number a low axis at three values at least, in the unit of those", () => {
    const wide = [{ ...allowed[0]!, low: -0.59e-3, high: 0.59e-3 }];
    const rest = { allowed: wide, bands: new Map(), worst: null };
    for (const narrow of [false, true, "brief"] as const) {
      const [, below] = storeyViews(set, USUAL_VIEW, horizontalAxis(set, USUAL_VIEW, 600), narrow, rest);
      expect(below!.axis.labels.texts.size, String(narrow)).toBeGreaterThanOrEqual(3);
      expect(below!.axis.labels.unit).toMatch(/^[mµ]V$/u);
    }
  });

  it("do not lie flat for the sake of limits far beyond them", () => {
    const far = [{ ...allowed[0]!, low: -10, high: 10 }];
    const [, below] = storeyViews(set, USUAL_VIEW, horizontalAxis(set, USUAL_VIEW, 600), false, {
      allowed: far,
      bands: new Map(),
      worst: null,
    });
    expect(below!.axis.range.to).toBeLessThan(1e-2);
  });
});

describe("worst draws", () => {
  it("are those that requirements name, of broken ones first, and never the nominal design", () => {
    expect(worstDraws(set)).toEqual([
      { label: "conformance", draw: 2 },
      { label: "zero", draw: 1 },
    ]);
  });

  it("follow the view: the first unless another is named, none where none is wanted", () => {
    expect(shownWorst(set, USUAL_VIEW)?.draw).toBe(2);
    expect(shownWorst(set, { ...USUAL_VIEW, worst: "zero" })?.draw).toBe(1);
    expect(shownWorst(set, { ...USUAL_VIEW, worst: "" })).toBeNull();
  });
});
