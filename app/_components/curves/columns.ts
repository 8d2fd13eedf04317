/** Values of a trace as documents carry them, null where unsolved, or as computed and binary ones do, NaN where unsolved. */
export type Column = Float64Array | readonly (number | null)[];

const known = new WeakMap<readonly (number | null)[], Float64Array>();

/** A column as numbers of the machine, NaN where unsolved. The same list gives the same column. */
export function columnFrom(values: Column): Float64Array {
  if (values instanceof Float64Array) return values;
  let column = known.get(values);
  if (column === undefined) {
    column = new Float64Array(values.length);
    for (let i = 0; i < values.length; i++) column[i] = values[i] ?? Number.NaN;
    known.set(values, column);
  }
  return column;
}

/** One value of a column; null where unsolved, or where there is no such point. */
export function valueIn(values: Column, index: number): number | null {
  const value = values[index];
  return value === undefined || value === null || !Number.isFinite(value) ? null : value;
}

/** Index of the first of ascending numbers that is not below `place`; their count where there is none. */
export function atLeast(x: ArrayLike<number>, place: number): number {
  let low = 0;
  let high = x.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x[middle]! < place) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Index of the number nearest to `place` among ascending ones; −1 where there is none. */
export function nearest(x: ArrayLike<number>, place: number): number {
  const after = atLeast(x, place);
  if (after === 0) return x.length === 0 ? -1 : 0;
  if (after === x.length) return x.length - 1;
  return place - x[after - 1]! <= x[after]! - place ? after - 1 : after;
}
