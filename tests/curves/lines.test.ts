import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { drawLine, type Field, markedPoints } from "@/app/_components/curves/line-path";
import { inkOf, styleInOrder } from "@/app/_components/curves/line-style";
import { endsIn } from "@/app/_components/curves/pyramid";
import { LINEAR } from "@/app/_components/curves/scale";

/** What a pen was told: an "M" for each start, then the points. */
function recorded() {
  const strokes: [number, number][][] = [];
  return {
    strokes,
    moveTo: (x: number, y: number) => void strokes.push([[x, y]]),
    lineTo: (x: number, y: number) => void strokes.at(-1)!.push([x, y]),
  };
}

const field = (from: number, to: number, width: number): Field => ({
  horizontal: { from, to },
  vertical: { from: 0, to: 100 },
  left: 0,
  top: 0,
  width,
  height: 100,
});

const lineOf = (values: Float64Array, absent: Uint8Array | null = null) => ({
  x: values.map((_, i) => i),
  values,
  mapping: LINEAR,
  absent,
});

describe("the pyramid of a column", () => {
  it("finds in any part what a look at every value finds", () => {
    const value = fc.oneof(fc.double({ noNaN: true, min: -1e3, max: 1e3 }), fc.constant(Number.NaN));
    const length = 3000;
    fc.assert(
      fc.property(
        fc.array(value, { minLength: length, maxLength: length }),
        fc.nat(length),
        fc.nat(length),
        (list, a, b) => {
          const column = Float64Array.from(list);
          const [from, to] = [Math.min(a, b), Math.max(a, b)];
          const known = list.slice(from, to).filter((one) => !Number.isNaN(one));
          const ends = endsIn(column, from, to);
          if (known.length === 0) return ends === null;
          return column[ends!.low] === Math.min(...known) && column[ends!.high] === Math.max(...known);
        },
      ),
      { numRuns: 60, seed: 4 },
    );
  });

  it("takes no infinite value for the highest", () => {
    expect(endsIn(Float64Array.of(1, Number.POSITIVE_INFINITY, 3))).toEqual({ low: 0, high: 2 });
    expect(endsIn(Float64Array.of(Number.NaN))).toBeNull();
  });
});

describe("a line in view", () => {
  it("keeps every peak of a dense line in at most two points a column", () => {
    const values = Float64Array.from({ length: 200_000 }, (_, i) => 50 + Math.sin(i / 5000));
    values[123_456] = 90;
    values[77_777] = 10;
    const pen = recorded();
    const drawn = drawLine(pen, lineOf(values), field(0, 199_999, 700));
    expect(drawn).toBeLessThanOrEqual(1400);
    const heights = pen.strokes.flat().map(([, y]) => y);
    expect([Math.min(...heights), Math.max(...heights)]).toEqual([10, 90]);
    const [at] = pen.strokes.flat().find(([, y]) => y === 10)!;
    expect(Math.abs(at - (700 * 123_456) / 199_999)).toBeLessThan(1e-6);
    expect(pen.strokes).toHaveLength(1);
  });

  it("breaks where points are unsolved, dense or not, and not where a column of the field has no point", () => {
    const gap = (length: number) =>
      Float64Array.from({ length }, (_, i) => (i >= length / 2 && i < 0.6 * length ? Number.NaN : 1));
    for (const length of [100, 100_000]) {
      const pen = recorded();
      drawLine(pen, lineOf(gap(length)), field(0, length - 1, 200));
      expect(pen.strokes).toHaveLength(2);
    }
    const uneven = {
      ...lineOf(new Float64Array(2000).fill(1)),
      x: new Float64Array(2000).map((_, i) => (i < 1000 ? i / 1000 : 99 + i / 1000)),
    };
    const pen = recorded();
    drawLine(pen, uneven, field(0, 101, 100));
    expect(pen.strokes).toHaveLength(1);
  });

  it("reaches the edges of a part of the sweep, by its neighbours outside", () => {
    const pen = recorded();
    drawLine(pen, lineOf(Float64Array.of(0, 10, 20, 30, 40)), field(1.5, 2.5, 100));
    expect(pen.strokes).toEqual([
      [
        [-50, 90],
        [50, 80],
        [150, 70],
      ],
    ]);
  });

  it("passes over points that are another source's, which are no gaps", () => {
    const values = Float64Array.of(1, Number.NaN, 3, Number.NaN, 5);
    const pen = recorded();
    drawLine(pen, lineOf(values, Uint8Array.of(0, 1, 0, 0, 0)), field(0, 4, 4));
    expect(pen.strokes.map((stroke) => stroke.length)).toEqual([2, 1]);
  });

  it("marks the points of a short line, and of a long one those that stand alone", () => {
    const short = lineOf(Float64Array.of(1, 2, 3));
    expect(markedPoints(short, field(0, 2, 300), 24)).toHaveLength(3);
    const long = new Float64Array(60).fill(1);
    long[20] = Number.NaN;
    long[22] = Number.NaN;
    expect(
      markedPoints(lineOf(long), field(0, 59, 300), 24).map(({ x }) => Math.round((x * 59) / 300)),
    ).toEqual([21]);
  });
});

describe("lines in an order", () => {
  const colours = {
    "--trace-1": "#0072b2",
    "--trace-2": "#d55e00",
    "--trace-3": "#00805e",
    "--trace-4": "#a8578a",
    "--trace-5": "#17202a",
    "--trace-6": "#8f6400",
  };

  it("are graded without one colour twice, from the first token to the last", () => {
    const inks = Array.from({ length: 60 }, (_, k) => inkOf(styleInOrder(k, 60), colours));
    expect(new Set(inks).size).toBe(60);
    expect([inks[0], inks.at(-1)]).toEqual([colours["--trace-1"], colours["--trace-2"]]);
  });

  it("keep 3:1 against the paper of the light theme all along", () => {
    const channel = (hex: string, i: number) => Number.parseInt(hex.slice(1 + 2 * i, 3 + 2 * i), 16) / 255;
    // Relative luminance of WCAG 2.2.
    const luminance = (hex: string) =>
      [0.2126, 0.7152, 0.0722].reduce((sum, weight, i) => {
        const c = channel(hex, i);
        return sum + weight * (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4);
      }, 0);
    const paper = luminance("#fbfaf6");
    for (let k = 0; k < 60; k++) {
      const ink = luminance(inkOf(styleInOrder(k, 60), colours));
      expect((paper + 0.05) / (ink + 0.05)).toBeGreaterThan(3);
    }
  });
});
