import { describe, expect, test } from "vitest";
import { Predictor } from "@/lib/analyses/predictor";
import { newState } from "@/lib/circuit/state";

/** Predictions for the points 0, 1, 2, … of a curve, each learned after it was predicted; null where there was none. */
function predictions(curve: (k: number) => number | null, count: number): (number | null)[] {
  const state = newState(1, 1);
  const predictor = new Predictor(state);
  return Array.from({ length: count }, (_, k) => {
    const predicted = predictor.predict() ? state.x[0]! : null;
    const value = curve(k);
    state.x[0] = value ?? Number.NaN;
    predictor.learn(value !== null);
    return predicted;
  });
}

describe("the predictor", () => {
  test("goes through the last neighbours: a point, a line, a parabola", () => {
    const curve = (k: number) => 3 + 2 * k + 5 * k * k;
    expect(predictions(curve, 6)).toEqual([null, 3, 17, curve(3), curve(4), curve(5)]);
  });

  test("follows a smooth curve by up to seven neighbours, to the last digits", () => {
    const curve = (k: number) => 0.6 + 0.0257 * Math.log(100 + k);
    const predicted = predictions(curve, 40);
    // ∇⁷ of the logarithm at 110 is 720·0.0257/110⁷ = 1e-13.
    for (let k = 12; k < 40; k++) expect(Math.abs(predicted[k]! - curve(k))).toBeLessThan(1e-12);
  });

  test("takes a lower degree where a higher one overshoots", () => {
    const curve = (k: number) => (k < 20 ? 1 : 1 + 0.001 * (k - 20) + 0.0001 * Math.sin(1e6 * k));
    const predicted = predictions(curve, 60);
    for (let k = 30; k < 60; k++) expect(Math.abs(predicted[k]! - curve(k))).toBeLessThan(0.002);
  });

  test("starts anew after a point that failed", () => {
    const curve = (k: number) => (k === 2 ? null : k);
    expect(predictions(curve, 6)).toEqual([null, 0, 2, null, 3, 5]);
  });

  test("drops the rounding of the point before", () => {
    const state = newState(1, 1);
    const predictor = new Predictor(state);
    state.x[0] = 1;
    state.low[0] = 1e-20;
    predictor.learn(true);
    predictor.predict();
    expect([state.x[0], state.low[0]]).toEqual([1, 0]);
    predictor.reset();
    expect(predictor.predict()).toBe(false);
  });
});
