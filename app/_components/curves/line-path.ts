import { atLeast } from "./columns";
import { endsIn } from "./pyramid";
import type { Range } from "./range";
import { type Mapping, placeOf } from "./scale";

/** What a line is drawn with: a path of a canvas, or the text of one in SVG. */
export interface Pen {
  moveTo(x: number, y: number): void;
  lineTo(x: number, y: number): void;
}

/** A line over abscissae (places along the axis, ascending) and how it is brought onto a field. */
export interface Course {
  readonly x: Float64Array;
  /** NaN where unsolved, which leaves a gap. */
  readonly values: Float64Array;
  readonly mapping: Mapping;
  /** Points that are not part of the line, by 1; the line passes over them without a gap. */
  readonly absent: Uint8Array | null;
}

/** The part of the axes in view, and the size of the field it fills, in the unit of the pen. */
export interface Field {
  readonly horizontal: Range;
  readonly vertical: Range;
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** A line with more points in view than so many a column of the field is reduced to two points a column. */
const DENSE = 4;

/** Points of the line that lie in view, with the neighbour outside on either side, so that a line leaves the field and does not end in it. */
export function inView(x: Float64Array, { from, to }: Range): { first: number; end: number } {
  const first = Math.max(0, atLeast(x, from) - 1);
  const after = atLeast(x, to);
  return { first, end: Math.min(x.length, after + (x[after] === to ? 2 : 1)) };
}

export function acrossField({ left, width, horizontal }: Field, place: number): number {
  return left + (width * (place - horizontal.from)) / (horizontal.to - horizontal.from);
}

export function downField({ top, height, vertical }: Field, place: number): number {
  return top + (height * (vertical.to - place)) / (vertical.to - vertical.from);
}

/**
 * Draws a line in view. Where it is dense, at most two points a column of one unit of the pen: its lowest and its highest there, in
 * the order in which they stand, so that no peak is lost whatever the width. Returns how many points were drawn.
 */
export function drawLine(pen: Pen, course: Course, field: Field, column = 1): number {
  const { first, end } = inView(course.x, field.horizontal);
  const columns = Math.max(1, Math.floor(field.width / column));
  return end - first > DENSE * columns && course.absent === null
    ? drawDense(pen, course, field, columns)
    : drawWhole(pen, course, field, first, end);
}

function drawWhole(pen: Pen, course: Course, field: Field, first: number, end: number): number {
  const { x, values, mapping, absent } = course;
  let down = false;
  let drawn = 0;
  for (let i = first; i < end; i++) {
    if (absent?.[i] === 1) continue;
    const place = placeOf(mapping, values[i]!);
    if (place === null) {
      down = false;
      continue;
    }
    const at = acrossField(field, x[i]!);
    const height = downField(field, place);
    if (down) pen.lineTo(at, height);
    else pen.moveTo(at, height);
    down = true;
    drawn++;
  }
  return drawn;
}

function drawDense(pen: Pen, { x, values, mapping }: Course, field: Field, columns: number): number {
  const { from, to } = field.horizontal;
  const span = (to - from) / columns;
  let down = false;
  let drawn = 0;
  let start = atLeast(x, from);
  for (let column = 0; column < columns; column++) {
    // The last column takes the point on the edge too.
    const next =
      column === columns - 1 ? inView(x, field.horizontal).end : atLeast(x, from + (column + 1) * span);
    const ends = endsIn(values, start, next);
    const isEmpty = start === next;
    start = next;
    if (ends === null) {
      // A column without points is no gap; one whose points are all unsolved is.
      if (!isEmpty) down = false;
      continue;
    }
    for (const i of ends.low <= ends.high ? [ends.low, ends.high] : [ends.high, ends.low]) {
      const place = placeOf(mapping, values[i]!);
      if (place === null) continue;
      const at = acrossField(field, x[i]!);
      const height = downField(field, place);
      if (down) pen.lineTo(at, height);
      else pen.moveTo(at, height);
      down = true;
      drawn++;
      if (ends.low === ends.high) break;
    }
  }
  return drawn;
}

/** Points that a line alone would not show: all of a short line, and of a longer one those between two gaps. */
export function markedPoints(course: Course, field: Field, few: number): { x: number; y: number }[] {
  const { x, values, mapping, absent } = course;
  const { first, end } = inView(x, field.horizontal);
  if (end - first > DENSE * field.width) return [];
  const isGap = (i: number) => !(i >= 0 && i < values.length) || placeOf(mapping, values[i]!) === null;
  const marked: { x: number; y: number }[] = [];
  const own = absent === null ? values.length : absent.reduce((sum, one) => sum + 1 - one, 0);
  for (let i = first; i < end; i++) {
    if (absent?.[i] === 1 || isGap(i)) continue;
    if (own > few && !(absent === null && isGap(i - 1) && isGap(i + 1))) continue;
    marked.push({ x: acrossField(field, x[i]!), y: downField(field, placeOf(mapping, values[i]!)!) });
  }
  return marked;
}
