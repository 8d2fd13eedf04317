import type { AxisDocument, TraceDocument } from "@/lib/analyses/result";
import type { OutcomeKind } from "@/lib/solver/outcome";
import { formatKnob, isAmbient } from "./figures-in-words";

/** What curves are drawn from: a run document, or a plan with empty columns while nothing is solved. */
export interface CurveSource {
  readonly axes: readonly AxisDocument[];
  readonly traces: readonly TraceDocument[];
  readonly points: {
    readonly outcome: readonly (OutcomeKind | null)[];
    /** A true solution lies within so many volts; null without a proof. Absent while nothing is solved. */
    readonly bound?: readonly (number | null)[];
  };
}

/** One setting of the outer sweeps: a curve of each trace. */
export interface Family {
  readonly index: number;
  /** "25 °C", "V_y 10 mV", "V_y 10 mV, 25 °C". Empty when there is no outer sweep. */
  readonly label: string;
}

/** The curves of a run: the horizontal axis in ascending order, the settings, and where each value stands. */
export interface CurveSet {
  readonly axis: AxisDocument;
  /** Swept values in ascending order, coherent SI units. */
  readonly x: readonly number[];
  /** Index on the first axis of each of `x`. */
  readonly order: readonly number[];
  readonly families: readonly Family[];
  readonly outer: readonly AxisDocument[];
  readonly source: CurveSource;
}

/** Null for a run without a sweep, which has one operating point and no curve. */
export function curveSet(source: CurveSource): CurveSet | null {
  const [axis, ...outer] = source.axes;
  if (axis === undefined) return null;
  const order = axis.values.map((_, index) => index).sort((a, b) => axis.values[a]! - axis.values[b]!);
  const count = outer.reduce((product, { values }) => product * values.length, 1);
  const texts = outer.map(settingTexts);
  const families = Array.from({ length: count }, (_, index) => ({
    index,
    label: familyLabel(outer, texts, index),
  }));
  return { axis, x: order.map((index) => axis.values[index]!), order, families, outer, source };
}

/** Index on each outer axis of a family; the first outer sweep turns fastest. */
export function outerIndices(outer: readonly AxisDocument[], family: number): number[] {
  let rest = family;
  return outer.map(({ values }) => {
    const index = rest % values.length;
    rest = Math.floor(rest / values.length);
    return index;
  });
}

/** The settings of an axis in as few digits, four at least, as tell them apart. */
function settingTexts(axis: AxisDocument): string[] {
  const written = (digits: number) => axis.values.map((value) => formatKnob(axis, value, digits));
  const short = written(4);
  return new Set(short).size === short.length ? short : written(6);
}

function familyLabel(
  outer: readonly AxisDocument[],
  texts: readonly (readonly string[])[],
  family: number,
): string {
  const indices = outerIndices(outer, family);
  return outer
    .map((axis, i) => {
      const text = texts[i]![indices[i]!]!;
      return isAmbient(axis) ? text : `${axis.knob} ${text}`;
    })
    .join(", ");
}

/** Flat number of the point at a place along the horizontal axis and in a family. */
export function pointAt(set: CurveSet, family: number, place: number): number {
  return family * set.x.length + set.order[place]!;
}

/** Where a flat point stands: the inverse of `pointAt`; null when the run has no such point. */
export function placeOfPoint(set: CurveSet, point: number): { family: number; place: number } | null {
  const length = set.x.length;
  const family = Math.floor(point / length);
  if (!Number.isInteger(point) || point < 0 || family >= set.families.length) return null;
  return { family, place: set.order.indexOf(point % length) };
}

/** The column of one trace in one family, in the order of `x`; null where unsolved. */
export function columnOf(set: CurveSet, trace: TraceDocument, family: number): (number | null)[] {
  const from = family * set.x.length;
  return set.order.map((index) => trace.values[from + index] ?? null);
}

/** The setting of a point, the first sweep first. */
export function settingOf(
  axes: readonly AxisDocument[],
  point: number,
): { axis: AxisDocument; value: number }[] {
  let rest = point;
  return axes.map((axis) => {
    const value = axis.values[rest % axis.values.length]!;
    rest = Math.floor(rest / axis.values.length);
    return { axis, value };
  });
}
