import { describe, expect, it } from "vitest";
import { decodeColumns, encodeColumns } from "@/lib/analyses/columns-document";
import { compile } from "@/lib/analyses/compile";
import { type RunMatter, toDocument } from "@/lib/analyses/document";
import { countOf, outlineOf } from "@/lib/analyses/plan";
import { OUTCOMES } from "@/lib/solver/outcome";

const TEXT = `title "Columns (invented)"
knob k = 1 V
ground -- V1 : voltage k -- in -- R1 : resistor 1 kΩ ± 1 % -- ground
sweep k from 1 mV to 1 V, 1 per decade
draws 2 seed 1
show y = in.v
show i = R1.i
read bend = deviation(y)
read top  = highest(y)
require abs(bend) <= 1 mV as "straight"
`;

/** A run of made-up figures: a point of the second draw is not solved, and one has failed. */
function madeUp(): RunMatter {
  const { job, diagnostics } = compile(TEXT);
  const { plan, design } = job!;
  const column = (of: (k: number) => number) => Float64Array.from({ length: plan.points }, (_, k) => of(k));
  const lost = (k: number) => k === 9 || k === 10;
  return {
    ...{ plan, design, text: TEXT, diagnostics },
    traces: [column((k) => (lost(k) ? Number.NaN : 0.1 + k / 3)), column((k) => (lost(k) ? Number.NaN : -k))],
    outcome: column((k) =>
      k === 9 ? Number.NaN : OUTCOMES.indexOf(k === 10 ? "undetermined" : "converged"),
    ),
    iterations: column(() => 3),
    rung: column(() => 0),
    bound: column((k) => (k < 4 ? 1e-12 * k : Number.NaN)),
    failures: [{ point: 10, outcome: "undetermined", unsettled: ["in"] }],
  };
}

function joined(pieces: readonly Uint8Array[]): ArrayBuffer {
  const whole = new Uint8Array(pieces.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const piece of pieces) {
    whole.set(piece, at);
    at += piece.length;
  }
  return whole.buffer;
}

const listed = (values: ArrayLike<number | null>) =>
  Array.from(values, (value) => (value === null || Number.isNaN(value) ? null : value));

describe("the binary form of a run document", () => {
  const matter = madeUp();
  const bytes = joined(encodeColumns(matter));

  it("says what the document says, value by value", () => {
    const read = decodeColumns(bytes);
    const { points, traces, readings, ...rest } = toDocument(matter);
    expect(read).toMatchObject(rest);
    expect(read.readings).toEqual(readings.filter(({ per }) => per === "sweep"));
    expect(read.traces.map(({ name, unit, values }) => ({ name, unit, values: listed(values) }))).toEqual(
      traces,
    );
    const perPoint = readings.filter(({ per }) => per === "point");
    expect(read.read.map((one) => ({ ...one, per: "point", values: listed(one.values) }))).toEqual(perPoint);
    expect(read.points.outcome).toEqual(points.outcome);
    expect(listed(read.points.bound)).toEqual(points.bound);
  });

  it("lays each column at a multiple of 8 bytes, little-endian, and the head behind them, as its docstring says", () => {
    const view = new DataView(bytes);
    const end = bytes.byteLength - 8;
    const length = view.getFloat64(end, true);
    const head = JSON.parse(new TextDecoder().decode(new Uint8Array(bytes, end - length, length)));
    expect(head).toMatchObject({
      points: 12,
      traces: [{ name: "y" }, { name: "i" }],
      columns: ["trace/0", "trace/1", "bound", "outcome", "axis/0", "read/0"],
    });
    expect(view.getFloat64(8 + 8 * 3, true)).toBe(0.1 + 3 / 3);
    expect(view.getFloat64(8 + 8 * (3 * 12 + 10), true)).toBe(OUTCOMES.indexOf("undetermined"));
    expect(end - length).toBe(8 + 8 * (5 * 12 + 4));
  });

  it("refuses other bytes, and a part of its own", () => {
    expect(() => decodeColumns(bytes.slice(0, bytes.byteLength - 24))).toThrow(RangeError);
    expect(() => decodeColumns(new TextEncoder().encode('{"format":"sweepwright-run/1"}').buffer)).toThrow(
      RangeError,
    );
  });
});

describe("the outline of a plan", () => {
  const { plan } = madeUp();
  const [axis] = plan.axes;
  const long = { ...axis!, values: Array.from({ length: 5000 }, (_, i) => i / 7) };

  it("has the ends of a long axis and how many values it has, and leaves a short one as it is", () => {
    const outline = outlineOf({ ...plan, axes: [long, axis!] });
    expect(outline.axes).toEqual([{ ...long, values: [0, 4999 / 7], count: 5000 }, axis]);
    expect(outline.axes.map(countOf)).toEqual([5000, 4]);
  });
});
