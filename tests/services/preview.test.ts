import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { AxisDocument } from "@/lib/analyses/result";
import { encode } from "@/lib/services/chunks/codec";
import { valueAt } from "@/lib/services/chunks/value-at";
import { previewOf } from "@/lib/services/runs/preview";

const plan = (scale: AxisDocument["scale"], values: number[]) => ({
  axes: [{ knob: "x", unit: "V", scale, values }],
  traces: [{ name: "y", unit: "V" }],
});

describe("previewOf", () => {
  it("places a logarithmic axis by decades", () => {
    expect(previewOf(plan("logarithmic", [1, 10, 1000]))).toEqual({
      points: [0, 1, 2],
      x: [0, 1 / 3, 1],
      decades: 3,
    });
  });

  it("places a linear axis or a list by value, ascending, whatever the order it was solved in", () => {
    expect(previewOf(plan("linear", [4, 2, 0]))).toEqual({ points: [2, 1, 0], x: [0, 0.5, 1], decades: 0 });
    expect(previewOf(plan("list", [1, 3, 2, 5]))).toEqual({
      points: [0, 2, 1, 3],
      x: [0, 0.25, 0.5, 1],
      decades: 0,
    });
  });

  it("is nothing where there is nothing to draw", () => {
    expect(previewOf({ ...plan("linear", [1, 2]), axes: [] })).toBeNull();
    expect(previewOf({ ...plan("linear", [1, 2]), traces: [] })).toBeNull();
    expect(previewOf(plan("linear", [1]))).toBeNull();
    expect(previewOf(plan("list", [2, 2]))).toBeNull();
    expect(previewOf(plan("logarithmic", [-1, 1]))).toBeNull();
  });

  it("keeps both ends of a long axis, and 64 points in ascending order", () => {
    const values = Array.from({ length: 100_000 }, (_, i) => i);
    const { points, x } = previewOf(plan("linear", values))!;
    expect([points[0], points.at(-1), points.length]).toEqual([0, 99_999, 64]);
    expect(x).toEqual([...x].sort((a, b) => a - b));
  });
});

describe("valueAt", () => {
  it("reads every value of an encoded chunk bit for bit", () => {
    fc.assert(
      fc.property(fc.float64Array({ minLength: 1, maxLength: 50 }), (values) => {
        const data = encode(values);
        expect(Array.from(values, (_, i) => valueAt(data, i))).toEqual([...values]);
      }),
    );
  });
});
