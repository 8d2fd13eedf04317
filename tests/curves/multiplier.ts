import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";

/** Made-up results of a plan with two sweeps: product = x·y, with the points of reversed x failed. Not from any solver. */
export function madeUpSource(x: readonly number[], y: readonly number[]): CurveSource {
  const points = y.flatMap((b) => x.map((a) => ({ a, b })));
  return {
    axes: [
      { knob: "V_x", unit: "V", scale: "logarithmic", values: x },
      { knob: "temperature", unit: "K", scale: "list", values: y },
    ],
    traces: [
      { name: "product", unit: "V", values: points.map(({ a, b }) => (a > 0 ? a * b : null)) },
      { name: "ratio", unit: "1", values: points.map(({ a, b }) => (a > 0 ? a / b : null)) },
    ],
    points: { outcome: points.map(({ a }) => (a > 0 ? "converged" : "came to a stand")) },
  };
}

export function madeUpSet(x: readonly number[], y: readonly number[] = [283.15, 298.15]) {
  const set = curveSet(madeUpSource(x, y));
  if (set === null) throw new Error("A plan with sweeps has curves.");
  return set;
}
