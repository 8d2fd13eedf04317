/** Where a square sparse matrix has entries: entry k ≥ 1 stands at (rows[k], columns[k]); entry 0 is outside it. */
export interface SparseShape {
  readonly size: number;
  readonly rows: ArrayLike<number>;
  readonly columns: ArrayLike<number>;
}

/**
 * An elimination worked out once: which entry is the pivot of which step, and every multiplication in order, over one array of
 * values in which the matrix's own entries keep their places and fill-in follows.
 *
 * `factor`: for each step, the place of the pivot, the count of rows below and of columns right of it, the places of the pivot
 * row; then, for each row below, the place of its multiplier and the places it changes. `rowOf` and `columnOf` give the row and
 * column of each step's pivot; `rowPlaces`, `rowColumns` with `rowStarts` give the pivot rows, `belowPlaces`, `belowRows`
 * with `belowStarts` the multipliers, for the two substitutions.
 */
export interface Elimination {
  readonly places: number;
  readonly factor: Int32Array;
  readonly rowOf: Int32Array;
  readonly columnOf: Int32Array;
  readonly pivots: Int32Array;
  readonly rowStarts: Int32Array;
  readonly rowPlaces: Int32Array;
  readonly rowColumns: Int32Array;
  readonly belowStarts: Int32Array;
  readonly belowPlaces: Int32Array;
  readonly belowRows: Int32Array;
}

interface Entry {
  readonly place: number;
  value: number;
  /** Sum of the magnitudes that made `value`: below 1e-15 of it, a value is rounding and counts as 0. */
  size: number;
}

/** A pivot must reach this part of its column, rows being scaled to a largest entry of 1. */
const THRESHOLD = 0.1;
const ROUNDING = 1e-15;

/**
 * Chooses pivots on sample values by Markowitz's count (Management Science 3, 1957) among those that pass a threshold test in
 * their column (Duff, Erisman and Reid, Direct Methods for Sparse Matrices, 1986, from memory). Null where the sample is
 * singular or not finite. Cost grows with the entries times the size; meant to run once a structure.
 */
export function eliminate(shape: SparseShape, sample: Float64Array): Elimination | null {
  const { size } = shape;
  const rows = Array.from({ length: size }, () => new Map<number, Entry>());
  const columns = Array.from({ length: size }, () => new Set<number>());
  for (let k = 1; k < shape.rows.length; k++) {
    const value = sample[k]!;
    if (!Number.isFinite(value)) return null;
    rows[shape.rows[k]!]!.set(shape.columns[k]!, { place: k, value, size: Math.abs(value) });
    columns[shape.columns[k]!]!.add(shape.rows[k]!);
  }
  const largest = rows.map((row) => Math.max(0, ...[...row.values()].map((entry) => entry.size)));
  let places = shape.rows.length;
  const factor: number[] = [];
  const steps: { row: number; column: number; pivot: number; right: [number, Entry][]; below: number[] }[] =
    [];
  const belowPlaces: number[][] = [];
  const active = new Set(rows.keys());

  while (active.size > 0) {
    const best = choosePivot(rows, columns, active, largest);
    if (best === null) return null;
    const { row, column } = best;
    const pivotRow = rows[row]!;
    const pivot = pivotRow.get(column)!;
    active.delete(row);
    for (const other of pivotRow.keys()) columns[other]!.delete(row);
    const right = [...pivotRow].filter(([other]) => other !== column);
    const below = [...columns[column]!];
    factor.push(pivot.place, below.length, right.length, ...right.map(([, entry]) => entry.place));
    const multipliers: number[] = [];
    for (const target of below) {
      const targetRow = rows[target]!;
      const head = targetRow.get(column)!;
      targetRow.delete(column);
      multipliers.push(head.place);
      factor.push(head.place);
      const multiplier = head.value / pivot.value;
      for (const [other, entry] of right) {
        let changed = targetRow.get(other);
        if (changed === undefined) {
          changed = { place: places++, value: 0, size: 0 };
          targetRow.set(other, changed);
          columns[other]!.add(target);
        }
        changed.value -= multiplier * entry.value;
        changed.size += Math.abs(multiplier) * entry.size;
        factor.push(changed.place);
      }
    }
    columns[column]!.clear();
    steps.push({ row, column, pivot: pivot.place, right, below });
    belowPlaces.push(multipliers);
  }
  return {
    places,
    factor: Int32Array.from(factor),
    rowOf: Int32Array.from(steps, (step) => step.row),
    columnOf: Int32Array.from(steps, (step) => step.column),
    pivots: Int32Array.from(steps, (step) => step.pivot),
    rowStarts: starts(steps.map((step) => step.right.length)),
    rowPlaces: Int32Array.from(steps.flatMap((step) => step.right.map(([, entry]) => entry.place))),
    rowColumns: Int32Array.from(steps.flatMap((step) => step.right.map(([column]) => column))),
    belowStarts: starts(belowPlaces.map((list) => list.length)),
    belowPlaces: Int32Array.from(belowPlaces.flat()),
    belowRows: Int32Array.from(steps.flatMap((step) => step.below)),
  };
}

function choosePivot(
  rows: readonly ReadonlyMap<number, Entry>[],
  columns: readonly ReadonlySet<number>[],
  active: ReadonlySet<number>,
  largest: readonly number[],
): { row: number; column: number } | null {
  let best: { row: number; column: number } | null = null;
  let leastCost = Number.POSITIVE_INFINITY;
  let bestSize = 0;
  for (const row of active) {
    const entries = rows[row]!;
    for (const [column, entry] of entries) {
      const cost = (entries.size - 1) * (columns[column]!.size - 1);
      const size = scaled(entry) / largest[row]!;
      if (cost > leastCost || (cost === leastCost && size <= bestSize)) continue;
      if (!(size > 0) || size < THRESHOLD * largestIn(column, rows, columns, largest)) continue;
      best = { row, column };
      leastCost = cost;
      bestSize = size;
    }
    if (leastCost === 0) break;
  }
  return best;
}

function largestIn(
  column: number,
  rows: readonly ReadonlyMap<number, Entry>[],
  columns: readonly ReadonlySet<number>[],
  largest: readonly number[],
): number {
  let size = 0;
  for (const row of columns[column]!) size = Math.max(size, scaled(rows[row]!.get(column)!) / largest[row]!);
  return size;
}

function scaled({ value, size }: Entry): number {
  const magnitude = Math.abs(value);
  return magnitude > ROUNDING * size ? magnitude : 0;
}

function starts(lengths: readonly number[]): Int32Array {
  const result = new Int32Array(lengths.length + 1);
  lengths.forEach((length, k) => {
    result[k + 1] = result[k]! + length;
  });
  return result;
}
