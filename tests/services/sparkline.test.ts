import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { AxisDocument } from "@/lib/analyses/result";
import { encode } from "@/lib/services/chunks/codec";
import { valueAt } from "@/lib/services/chunks/value-at";
import { sparkline } from "@/lib/services/runs/sparkline";

const axis = (scale: AxisDocument["scale"], values: number[]): AxisDocument => ({
  knob: "x",
  unit: "V",
  scale,
  values,
});
const same = (point: number) => point;

describe("sparkline", () => {
  it("places a logarithmic axis by decades", () => {
    expect(sparkline(axis("logarithmic", [1, 10, 1000]), same)).toEqual({
      x: [0, 1 / 3, 1],
      y: [0, 1, 2],
      decades: 3,
    });
  });

  it("places a linear axis or a list evenly by value, ascending, whatever the order it was solved in", () => {
    expect(sparkline(axis("linear", [4, 2, 0]), same)).toEqual({ x: [0, 0.5, 1], y: [2, 1, 0], decades: 0 });
    expect(sparkline(axis("list", [1, 3, 2, 5]), same)).toEqual({
      x: [0, 0.25, 0.5, 1],
      y: [0, 2, 1, 3],
      decades: 0,
    });
  });

  it("is nothing where there is nothing to draw", () => {
    expect(sparkline(axis("linear", [1]), same)).toBeNull();
    expect(sparkline(axis("list", [2, 2]), same)).toBeNull();
    expect(sparkline(axis("linear", [1, 2]), () => Number.NaN)).toBeNull();
    expect(sparkline(axis("logarithmic", [-1, 1]), same)).toBeNull();
  });

  it("keeps both ends of a long axis, and 64 points in ascending order", () => {
    const values = Array.from({ length: 100_000 }, (_, i) => i);
    const curve = sparkline(axis("linear", values), same)!;
    expect([curve.y[0], curve.y.at(-1), curve.y.length]).toEqual([0, 99_999, 64]);
    expect(curve.x).toEqual([...curve.x].sort((a, b) => a - b));
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
