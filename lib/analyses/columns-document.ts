import { OUTCOMES, type OutcomeKind } from "@/lib/solver/outcome";
import { type DocumentFrame, frameOf, type RunMatter } from "./document";
import type { AxisDocument } from "./result";

/**
 * The binary form of a run document, for readers of many numbers. Little-endian, in this order, each part beginning at a multiple
 * of 8 bytes: the text "swcolumn"; the length of the head in bytes, as Float64; the head, JSON in UTF-8, which is the run document
 * without its columns, with `points` a number, a `count` in place of the values of each axis, and the readings per point named in
 * `read`; then the values of each axis as Float64; then one Float64 a point for each of `traces`, each of `read`, and the bound
 * (V), NaN where there is none; then one byte a point for the outcome, its index in `outcomes` of the head, 255 where not solved.
 */
const MARK = "swcolumn";
const NOT_SOLVED = 255;

interface Head extends Omit<DocumentFrame, "axes"> {
  readonly axes: readonly (Omit<AxisDocument, "values"> & { readonly count: number })[];
  readonly points: number;
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

/** The bytes of what is known, as pieces to be sent one after another; columns are not copied. */
export function encodeColumns(matter: RunMatter): Uint8Array[] {
  const frame = frameOf(matter);
  const ofPoints = frame.readings.filter(({ per }) => per === "point");
  const head: Head = {
    ...frame,
    axes: frame.axes.map(({ values, ...axis }) => ({ ...axis, count: values.length })),
    points: matter.outcome.length,
    outcomes: OUTCOMES,
    traces: matter.plan.traces.map(({ name, unit }) => ({ name, unit })),
    read: ofPoints.map(({ name, unit }) => ({ name, unit })),
    readings: frame.readings.filter(({ per }) => per === "sweep"),
  };
  const json = new TextEncoder().encode(JSON.stringify(head));
  const padded = new Uint8Array(8 * Math.ceil(json.length / 8)).fill(32);
  padded.set(json);
  const columns = [
    ...frame.axes.map(({ values }) => Float64Array.from(values)),
    ...matter.traces,
    ...ofPoints.map(({ values }) => Float64Array.from(values, (value) => value ?? Number.NaN)),
    matter.bound,
  ];
  const outcome = Uint8Array.from(matter.outcome, (index) => (Number.isNaN(index) ? NOT_SOLVED : index));
  return [
    new TextEncoder().encode(MARK),
    bytesOf(Float64Array.of(json.length)),
    padded,
    ...columns.map(bytesOf),
    outcome,
  ];
}

function bytesOf({ buffer, byteOffset, byteLength }: Float64Array): Uint8Array {
  return new Uint8Array(buffer as ArrayBuffer, byteOffset, byteLength);
}

/** Reads the binary form; the columns lie in `buffer` itself. Throws a RangeError for bytes that are not of this form. */
export function decodeColumns(buffer: ArrayBuffer): ColumnsDocument {
  const text = new TextDecoder();
  if (buffer.byteLength < 16 || text.decode(new Uint8Array(buffer, 0, 8)) !== MARK) {
    throw new RangeError("These bytes are not the columns of a run.");
  }
  const [length] = new Float64Array(buffer, 8, 1);
  const head: Head = JSON.parse(text.decode(new Uint8Array(buffer, 16, length!)));
  let at = 16 + 8 * Math.ceil(length! / 8);
  const next = (count = head.points) => {
    const column = new Float64Array(buffer, at, count);
    at += column.byteLength;
    return column;
  };
  const { outcomes, points, axes, traces, read, ...frame } = head;
  const swept = axes.map(({ count, ...axis }) => ({ ...axis, values: [...next(count)] }));
  const shown = traces.map((trace) => ({ ...trace, values: next() }));
  const derived = read.map((one) => ({ ...one, values: next() }));
  const bound = next();
  const codes = new Uint8Array(buffer, at, points);
  const outcome = new Array<OutcomeKind | null>(points);
  for (let k = 0; k < points; k++) outcome[k] = outcomes[codes[k]!] ?? null;
  return { ...frame, axes: swept, traces: shown, read: derived, points: { outcome, bound } };
}
