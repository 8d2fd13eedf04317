import { describe, expect, it } from "vitest";
import { horizontalAxis } from "@/app/_components/curves/axes";
import { nearest } from "@/app/_components/curves/columns";
import { choiceOf, drawnChoice, USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { placeLabels } from "@/app/_components/curves/label-places";
import { moved } from "@/app/_components/curves/move-cursor";
import { verticalRange, zoomed } from "@/app/_components/curves/range";
import { readQuantity } from "@/app/_components/curves/read-quantity";
import { LINEAR } from "@/app/_components/curves/scale";
import { storeyViews } from "@/app/_components/curves/storey-views";
import { madeUpSet } from "./multiplier";

describe("axes of a view", () => {
  it("stands on the ruler when the plan sweeps by decades, and on a linear axis when asked or when it must", () => {
    const set = madeUpSet(
      Array.from({ length: 41 }, (_, i) => Number((1e-3 * 10 ** (i / 20)).toPrecision(12))),
    );
    expect(horizontalAxis(set, USUAL_VIEW, 600)).toMatchObject({
      mapping: { scale: "logarithmic" },
      range: { from: -3, to: -1 },
    });
    expect(horizontalAxis(set, { ...USUAL_VIEW, x: "linear" }, 600).mapping.scale).toBe("linear");
    const through = madeUpSet([-1, 0, 1]);
    expect(horizontalAxis(through, { ...USUAL_VIEW, x: "logarithmic" }, 600).mapping.scale).toBe("linear");
  });

  it("leaves room around few points, and numbers no axis without a value", () => {
    const few = madeUpSet([-1, -0.5, 0]);
    const horizontal = horizontalAxis(few, USUAL_VIEW, 600);
    expect(horizontal.range.from).toBeLessThan(-1);
    expect(horizontal.range.to).toBeGreaterThan(0);
    expect(storeyViews(few, USUAL_VIEW, horizontal, false).map(({ axis }) => axis.ticks)).toEqual([[], []]);
  });

  it("draws what is usual where an address names nothing that the run has, and nothing where it asks for nothing", () => {
    const set = madeUpSet([1, 2]);
    const strange = { ...USUAL_VIEW, traces: ["gone"], families: [99] };
    expect(choiceOf(set, strange)).toEqual({ traces: ["product", "ratio"], families: [0, 1] });
    expect(choiceOf(set, { ...USUAL_VIEW, traces: [], families: [1, 99] })).toEqual({
      traces: [],
      families: [1],
    });
  });

  it("narrows what is drawn to the one trace or setting seen alone, and leaves the choice as it was", () => {
    const set = madeUpSet([1, 2]);
    const alone = { ...USUAL_VIEW, families: [0], only: { family: 1 } };
    expect(drawnChoice(set, alone).families).toEqual([1]);
    expect(choiceOf(set, alone).families).toEqual([0]);
    expect(drawnChoice(set, { ...USUAL_VIEW, only: { trace: "ratio" } }).traces).toEqual(["ratio"]);
    expect(drawnChoice(set, { ...USUAL_VIEW, only: { trace: "gone" } }).traces).toEqual(["product", "ratio"]);
  });

  it("fits a storey to what is in view", () => {
    const set = madeUpSet([1, 10, 100, 1000], [300]);
    const view = {
      ...USUAL_VIEW,
      traces: ["product"],
      y: { V: "linear" as const },
      zoom: { from: 1, to: 10 },
    };
    const horizontal = horizontalAxis(set, view, 600);
    expect(horizontal.range).toEqual({ from: 0, to: 1 });
    const [storey] = storeyViews(set, view, horizontal, false);
    expect(storey?.axis.range).toEqual({ from: 0, to: 3000 });
  });

  it("takes a logarithmic axis by itself where values reach over more than three decades", () => {
    const set = madeUpSet([1e-3, 10], [300]);
    const [product] = storeyViews(set, USUAL_VIEW, horizontalAxis(set, USUAL_VIEW, 600), false);
    expect(product?.axis.mapping.scale).toBe("logarithmic");
  });
});

describe("ranges", () => {
  it("end on steps, and leave room around a constant", () => {
    expect(verticalRange({ from: -187, to: 181 }, LINEAR)).toEqual({ from: -200, to: 200 });
    expect(verticalRange({ from: 5, to: 5 }, LINEAR)).toEqual({ from: 4.5, to: 5.5 });
    expect(verticalRange({ from: 0, to: 0 }, LINEAR)).toEqual({ from: -1, to: 1 });
    expect(verticalRange({ from: 8, to: 8 + 2e-15 }, LINEAR).to).toBeCloseTo(8.8, 9);
    expect(verticalRange(null, LINEAR)).toEqual({ from: 0, to: 1 });
  });

  it("never zoom into nothing", () => {
    const whole = { from: 0, to: 10 };
    expect(zoomed(whole, { from: 2, to: 40 })).toEqual({ from: 2, to: 10 });
    expect(zoomed(whole, { from: 20, to: 40 })).toEqual(whole);
    expect(zoomed(whole, { from: 3, to: 3 })).toEqual(whole);
  });
});

describe("cursor keys", () => {
  it("find the nearest abscissa", () => {
    expect([-5, 0.4, 0.6, 9].map((at) => nearest([0, 1, 2], at))).toEqual([0, 0, 1, 2]);
    expect(nearest([], 1)).toBe(-1);
  });

  const field = { x: Float64Array.of(0, 1, 2, 3, 4, 5), families: [0, 3], view: { from: 1, to: 4 } };

  it("start in the middle, step, and stop at the ends of the view", () => {
    expect(moved("ArrowRight", false, null, field)).toEqual({ place: 2, family: 0 });
    expect(moved("ArrowRight", false, { place: 4, family: 0 }, field)).toEqual({ place: 4, family: 0 });
    expect(moved("ArrowLeft", true, { place: 3, family: 0 }, field)).toEqual({ place: 1, family: 0 });
    expect(moved("End", false, { place: 1, family: 3 }, field)).toEqual({ place: 4, family: 3 });
    expect(moved("Home", false, { place: 4, family: 3 }, field)).toEqual({ place: 1, family: 3 });
  });

  it("change the setting up and down, and leave other keys alone", () => {
    expect(moved("ArrowDown", false, { place: 2, family: 0 }, field)).toEqual({ place: 2, family: 3 });
    expect(moved("ArrowDown", false, { place: 2, family: 3 }, field)).toEqual({ place: 2, family: 3 });
    expect(moved("a", false, null, field)).toBeNull();
  });
});

describe("labels at line ends", () => {
  it("move apart, keep their order and stay inside", () => {
    const wishes = [90, 91, 92, 10].map((at, i) => ({ key: String(i), at }));
    const places = placeLabels(wishes, 100, 15);
    expect([...places].map(([key]) => key)).toEqual(["3", "0", "1", "2"]);
    expect([...places.values()]).toEqual([10, 70, 85, 100]);
  });

  it("leave some out where not all fit, but not the first and the last", () => {
    const wishes = Array.from({ length: 30 }, (_, i) => ({ key: String(i), at: i }));
    const places = placeLabels(wishes, 60, 15);
    expect(places.size).toBe(5);
    expect(places.has("0") && places.has("29")).toBe(true);
  });
});

describe("quantities typed for the view", () => {
  const current = { knob: "I_in", unit: "A" };
  const ambient = { knob: "temperature", unit: "K" };

  it("are read with their unit", () => {
    expect(readQuantity("10 nA", current)).toEqual({ value: 1e-8 });
    expect(readQuantity("−4.7µA", current)).toEqual({ value: -4.7e-6 });
    expect(readQuantity("25 °C", ambient)).toEqual({ value: 298.15 });
    expect(readQuantity("0.5", { knob: "k", unit: "1" })).toEqual({ value: 0.5 });
  });

  it("are refused without one, or with another's, in a sentence that says how", () => {
    expect(readQuantity("10", current)).toEqual({ problem: "Write the unit too, such as 1\u202fmA." });
    expect(readQuantity("10 mV", current)).toEqual({ problem: "I_in is in A, not mV." });
    expect(readQuantity("", current)).toHaveProperty("problem");
    expect(readQuantity("10 bananas", current)).toHaveProperty("problem");
  });
});
