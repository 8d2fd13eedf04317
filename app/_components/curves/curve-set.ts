import { type Column, columnFrom } from "./columns";
import type { CurveAxis, CurveSource, CurveTrace } from "./curve-source";
import { formatKnob, isAmbient } from "./figures-in-words";

export type { CurveSource } from "./curve-source";

/** One setting of the outer sweeps: a curve of each trace. */
export interface Family {
  readonly index: number;
  /** "25 °C", "V_y 10 mV", "V_y 10 mV, 25 °C". Empty when there is no outer sweep. */
  readonly label: string;
}

/** A trace to be drawn: one that the netlist shows, or a reading that has a value at each point. */
export interface CurveColumn extends CurveTrace {
  readonly isReading: boolean;
}

/** The curves of a run: the horizontal axis in ascending order, the settings, and where each value stands. */
export interface CurveSet {
  readonly axis: CurveAxis;
  /** Swept values in ascending order, coherent SI units. */
  readonly x: Float64Array;
  /** Index on the first axis of each of `x`. */
  readonly order: Int32Array;
  readonly isAscending: boolean;
  readonly families: readonly Family[];
  readonly outer: readonly CurveAxis[];
  readonly source: CurveSource;
  /** Traces in the order of the netlist, then readings per point. */
  readonly traces: readonly CurveColumn[];
  /** Random draws whose values are here. */
  readonly draws: number;
  /** Columns of the nominal design in the order of `x`, by trace and setting; filled as they are asked for. */
  readonly columns: Map<string, Float64Array>;
}

/** Null for a run without a sweep, which has one operating point and no curve. */
export function curveSet(source: CurveSource): CurveSet | null {
  const [axis, ...outer] = source.axes;
  if (axis === undefined) return null;
  const { values } = axis;
  const isAscending = isSorted(values);
  const order = orderOf(values, isAscending);
  const count = outer.reduce((product, one) => product * one.values.length, 1);
  const texts = outer.map(settingTexts);
  const families = Array.from({ length: count }, (_, index) => ({
    index,
    label: familyLabel(outer, texts, index),
  }));
  return {
    axis,
    x: picked(values, order, 0),
    order,
    isAscending,
    families,
    outer,
    source,
    traces: tracesOf(source),
    draws: source.draws ?? 0,
    columns: new Map(),
  };
}

function isSorted(values: ArrayLike<number>): boolean {
  for (let i = 1; i < values.length; i++) if (values[i]! < values[i - 1]!) return false;
  return true;
}

function orderOf(values: ArrayLike<number>, isAscending: boolean): Int32Array {
  const order = new Int32Array(values.length);
  for (let i = 0; i < order.length; i++) order[i] = i;
  return isAscending ? order : order.sort((a, b) => values[a]! - values[b]!);
}

/** Values from `from` on in an order. Plain loops: `from` of a typed array takes ten times as long. */
function picked(values: ArrayLike<number>, order: Int32Array, from: number): Float64Array {
  const column = new Float64Array(order.length);
  for (let i = 0; i < order.length; i++) column[i] = values[from + order[i]!] ?? Number.NaN;
  return column;
}

/** A reading of the name of a trace stands for it, as a later line of the netlist could not. */
function tracesOf({ traces, readings = [], read = [] }: CurveSource): CurveColumn[] {
  const shown = new Set(traces.map(({ name }) => name));
  const perPoint = [...readings.filter(({ per }) => per === "point"), ...read];
  const below = perPoint.filter(({ name }) => !shown.has(name));
  return [
    ...traces.map((trace) => ({ ...trace, isReading: false })),
    ...below.map(({ name, unit, values }) => ({ name, unit, values, isReading: true })),
  ];
}

/** Index on each outer axis of a family; the first outer sweep turns fastest. */
export function outerIndices(outer: readonly CurveAxis[], family: number): number[] {
  let rest = family;
  return outer.map(({ values }) => {
    const index = rest % values.length;
    rest = Math.floor(rest / values.length);
    return index;
  });
}

/** The settings of an axis in as few digits, four at least, as tell them apart. */
function settingTexts(axis: CurveAxis): readonly string[] {
  if (axis.names !== undefined) return axis.names;
  const written = (digits: number) => axis.values.map((value) => formatKnob(axis, value, digits));
  const short = written(4);
  return new Set(short).size === short.length ? short : written(6);
}

function familyLabel(
  outer: readonly CurveAxis[],
  texts: readonly (readonly string[])[],
  family: number,
): string {
  const indices = outerIndices(outer, family);
  return outer
    .map((axis, i) => {
      const text = texts[i]![indices[i]!]!;
      return isAmbient(axis) || axis.names !== undefined ? text : `${axis.knob} ${text}`;
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

/** The column of one trace in one family, in the order of `x`, NaN where unsolved. The nominal one unless a draw is named. */
export function columnOf(set: CurveSet, trace: CurveColumn, family: number, draw = 0): Float64Array {
  const key = `${draw} ${family} ${trace.name}`;
  let column = set.columns.get(key);
  if (column === undefined) {
    column = ordered(set, trace.values, (draw * set.families.length + family) * set.x.length);
    set.columns.set(key, column);
  }
  return column;
}

function ordered({ isAscending, order, x }: CurveSet, values: Column, from: number): Float64Array {
  const all = columnFrom(values);
  if (isAscending && all.length >= from + x.length) return all.subarray(from, from + x.length);
  return all.length === 0 ? new Float64Array(x.length).fill(Number.NaN) : picked(all, order, from);
}

/** The setting of a point, the first sweep first. */
export function settingOf(
  axes: readonly CurveAxis[],
  point: number,
): { axis: CurveAxis; value: number; text: string }[] {
  let rest = point;
  return axes.map((axis) => {
    const index = rest % axis.values.length;
    rest = Math.floor(rest / axis.values.length);
    const value = axis.values[index]!;
    return { axis, value, text: axis.names?.[index] ?? formatKnob(axis, value) };
  });
}
