import { OUTCOMES, type OutcomeKind } from "@/lib/solver/outcome";
import { type DocumentFrame, frameOf, type RunMatter } from "./document";
import type { AxisDocument } from "./result";

/**
 * The binary form of a run document, for readers of many numbers. Little-endian, each part beginning at a multiple of 8 bytes: the
 * text "swcolumn"; columns of Float64; the head; the length of the head in bytes, as Float64. The head is JSON in UTF-8, filled up
 * with spaces: the run document without its columns, with `points` a number, a `count` in place of the values of each axis, and
 * `columns`, the names of the columns in the order in which they lie. A column has one value a point, NaN where there is none:
 * "trace/k" of the k-th of `traces`, "read/k" of the k-th of `read`, "bound" (V), "outcome" (an index into `outcomes`); "axis/k"
 * has the values of the k-th axis. What the head says of all columns comes after them, so that they can be sent as they are read.
 */
const MARK = "swcolumn";

interface Head extends Omit<DocumentFrame, "axes"> {
  readonly axes: readonly (Omit<AxisDocument, "values"> & { readonly count: number })[];
  readonly points: number;
  readonly columns: readonly string[];
  readonly outcomes: readonly OutcomeKind[];
  readonly traces: readonly Named[];
  /** Readings per point, which have a column; `readings` has the others. */
  readonly read: readonly Named[];
}

interface Named {
  readonly name: string;
  readonly unit: string;
}

interface NamedColumn extends Named {
  readonly values: Float64Array;
}

/** A run document whose columns are numbers of the machine, NaN where a point is unsolved. */
export interface ColumnsDocument extends DocumentFrame {
  readonly traces: readonly NamedColumn[];
  /** Readings per point; `readings` has those that are one number a sweep. */
  readonly read: readonly NamedColumn[];
  readonly points: {
    readonly outcome: readonly (OutcomeKind | null)[];
    /** V. */
    readonly bound: Float64Array;
  };
}

/** The bytes that the binary form begins with. */
export function encodeMark(): Uint8Array {
  return new TextEncoder().encode(MARK);
}

/** The bytes of a column where it lies. */
export function encodeColumn({ buffer, byteOffset, byteLength }: Float64Array): Uint8Array {
  return new Uint8Array(buffer as ArrayBuffer, byteOffset, byteLength);
}

/** What follows the columns of traces, bounds and outcomes that were sent, in pieces; `sent` are their names in that order. */
export function encodeRest(matter: RunMatter, sent: readonly string[]): Uint8Array[] {
  const frame = frameOf(matter);
  const read = frame.readings.filter(({ per }) => per === "point");
  const head: Head = {
    ...frame,
    axes: frame.axes.map(({ values, ...axis }) => ({ ...axis, count: values.length })),
    points: matter.outcome.length,
    columns: [...sent, ...frame.axes.map((_, k) => `axis/${k}`), ...read.map((_, k) => `read/${k}`)],
    outcomes: OUTCOMES,
    traces: matter.plan.traces.map(({ name, unit }) => ({ name, unit })),
    read: read.map(({ name, unit }) => ({ name, unit })),
    readings: frame.readings.filter(({ per }) => per === "sweep"),
  };
  const json = new TextEncoder().encode(JSON.stringify(head));
  const padded = new Uint8Array(8 * Math.ceil(json.length / 8)).fill(32);
  padded.set(json);
  return [
    ...frame.axes.map(({ values }) => encodeColumn(Float64Array.from(values))),
    ...read.map(({ values }) => encodeColumn(Float64Array.from(values, (value) => value ?? Number.NaN))),
    padded,
    encodeColumn(Float64Array.of(padded.length)),
  ];
}

/** All of it, as pieces to be sent one after another; columns are not copied. */
export function encodeColumns(matter: RunMatter): Uint8Array[] {
  const names = [...matter.traces.map((_, k) => `trace/${k}`), "bound", "outcome"];
  const columns = [...matter.traces, matter.bound, matter.outcome];
  return [encodeMark(), ...columns.map(encodeColumn), ...encodeRest(matter, names)];
}

/** Reads the binary form; the columns lie in `buffer` itself. Throws a RangeError for bytes that are not of this form, or not all of it. */
export function decodeColumns(buffer: ArrayBuffer): ColumnsDocument {
  const text = new TextDecoder();
  const isMarked = buffer.byteLength >= 16 && text.decode(new Uint8Array(buffer, 0, 8)) === MARK;
  const [length] =
    isMarked && buffer.byteLength % 8 === 0 ? new Float64Array(buffer, buffer.byteLength - 8, 1) : [];
  if (length === undefined || !Number.isInteger(length) || length < 2 || length > buffer.byteLength - 16) {
    throw new RangeError("These bytes are not the columns of a run.");
  }
  const head: Head = JSON.parse(text.decode(new Uint8Array(buffer, buffer.byteLength - 8 - length, length)));
  const { outcomes, points, columns, axes, traces, read, ...frame } = head;
  const found = new Map<string, Float64Array>();
  let at = 8;
  for (const name of columns) {
    const count = name.startsWith("axis/") ? axes[Number(name.slice(5))]!.count : points;
    found.set(name, new Float64Array(buffer, at, count));
    at += 8 * count;
  }
  const column = (name: string) => found.get(name) ?? new Float64Array(points).fill(Number.NaN);
  const codes = column("outcome");
  const outcome = new Array<OutcomeKind | null>(points);
  for (let k = 0; k < points; k++) outcome[k] = outcomes[codes[k]!] ?? null;
  return {
    ...frame,
    axes: axes.map(({ count: _, ...axis }, k) => ({ ...axis, values: [...column(`axis/${k}`)] })),
    traces: traces.map((trace, k) => ({ ...trace, values: column(`trace/${k}`) })),
    read: read.map((one, k) => ({ ...one, values: column(`read/${k}`) })),
    points: { outcome, bound: column("bound") },
  };
}
