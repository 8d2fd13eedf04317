import type { Range } from "./range";

/** Lines over shared abscissae (places, ascending); null leaves a gap. */
export interface Columns {
  readonly x: readonly number[];
  readonly ys: readonly (readonly (number | null)[])[];
}

/** More points than this in view are reduced before they are drawn. */
export const DRAWN_WHOLE = 100_000;

/**
 * At most two points a pixel column for each line: the lowest and the highest in it, in the order in which they stand, so that no
 * peak is lost whatever the width. A column without any number is a gap. `width` in pixels.
 */
export function reduceColumns({ x, ys }: Columns, view: Range, width: number): Columns {
  const columns = Math.max(1, Math.floor(width));
  const span = (view.to - view.from) / columns;
  const [first, last] = [atLeast(x, view.from), atLeast(x, view.to + span)];
  const grid: number[] = [];
  for (let column = 0; column < columns; column++) {
    grid.push(view.from + (column + 0.25) * span, view.from + (column + 0.75) * span);
  }
  return { x: grid, ys: ys.map((y) => reduceOne(x, y, first, last, view.from, span, columns)) };
}

function reduceOne(
  x: readonly number[],
  y: readonly (number | null)[],
  first: number,
  last: number,
  from: number,
  span: number,
  columns: number,
): (number | null)[] {
  const low = new Int32Array(columns).fill(-1);
  const high = new Int32Array(columns).fill(-1);
  for (let i = first; i < last; i++) {
    const value = y[i];
    if (value === null || value === undefined) continue;
    const column = Math.min(columns - 1, Math.max(0, Math.floor((x[i]! - from) / span)));
    if (low[column] === -1 || value < y[low[column]!]!) low[column] = i;
    if (high[column] === -1 || value > y[high[column]!]!) high[column] = i;
  }
  const out: (number | null)[] = [];
  for (let column = 0; column < columns; column++) {
    const [a, b] = [low[column]!, high[column]!];
    if (a === -1) out.push(null, null);
    else out.push(y[Math.min(a, b)]!, y[Math.max(a, b)]!);
  }
  return out;
}

/** Index of the first abscissa that is not below `place`; the length where there is none. */
export function atLeast(x: readonly number[], place: number): number {
  let low = 0;
  let high = x.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x[middle]! < place) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Index of the abscissa nearest to `place`; −1 where there is none. */
export function nearest(x: readonly number[], place: number): number {
  const after = atLeast(x, place);
  if (after === 0) return x.length === 0 ? -1 : 0;
  if (after === x.length) return x.length - 1;
  return place - x[after - 1]! <= x[after]! - place ? after - 1 : after;
}
