import { ActiveMatrix, type Entry } from "./kernel/active";
import { PivotSearch } from "./kernel/pivot";

/** Where a square sparse matrix has entries: entry k ≥ 1 stands at (rows[k], columns[k]); entry 0 is outside it. */
export interface SparseShape {
  readonly size: number;
  readonly rows: ArrayLike<number>;
  readonly columns: ArrayLike<number>;
  /** 1 at each place that holds +1 or −1, and keeps it. */
  readonly units?: Uint8Array;
}

/**
 * An elimination worked out once: which entry is the pivot of which step, and every multiplication in order, over one array of
 * values in which the matrix's own entries keep their places and fill-in follows.
 *
 * `factor`: for each step, the place of the pivot, the count of rows below and of columns right of it, the places of the pivot
 * row; then, for each row below, the place of its multiplier and the places it changes. `rowOf` and `columnOf` give the row and
 * column of each step's pivot; `rowPlaces`, `rowColumns` with `rowStarts` give the pivot rows, `belowPlaces`, `belowRows`
 * with `belowStarts` the multipliers, for the two substitutions. `anchors`: of each row, the place of its largest entry on the
 * sample. `parity`: 1 where an even number of exchanges brings the pivots to the diagonal, −1 where an odd one does. `changed`: the rows from which anything is subtracted. `operations` counts the multiplications of a factorisation and a solution.
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
  readonly anchors: Int32Array;
  readonly parity: 1 | -1;
  readonly changed: Int32Array;
  /** Of each place, +1 or −1 where the elimination leaves it at that whatever the values are, or 0. */
  readonly constants: Int8Array;
  readonly operations: number;
}

interface Step {
  readonly row: number;
  readonly column: number;
  readonly pivot: Entry;
  readonly right: readonly [number, Entry][];
  readonly below: readonly [number, Entry][];
}

/**
 * The first pivoted factorisation of a structure: chooses pivots on sample values by Markowitz's count (Management Science 3, 1957).
 * Null where the sample is singular or not finite. Cost grows with the entries and the fill-in; meant to run once a structure.
 */
export function eliminate(shape: SparseShape, sample: Float64Array): Elimination | null {
  for (let k = 1; k < shape.rows.length; k++) if (!Number.isFinite(sample[k]!)) return null;
  const matrix = new ActiveMatrix(shape, sample);
  const search = new PivotSearch(matrix);
  const factor: number[] = [];
  const steps: Step[] = [];
  let operations = 0;
  while (steps.length < shape.size) {
    const at = search.find();
    if (at === null) return null;
    const { pivot, right, below } = matrix.remove(at.row, at.column);
    factor.push(pivot.place, below.length, right.length);
    for (const [, entry] of right) factor.push(entry.place);
    for (const [target, head] of below) {
      const multiplier = head.value / pivot.value;
      factor.push(head.place);
      for (const [column, entry] of right) factor.push(matrix.change(target, column, multiplier, entry));
    }
    matrix.recount(below, right);
    operations += below.length * (right.length + 2) + right.length + 1;
    steps.push({ ...at, pivot, right, below });
  }
  return {
    places: matrix.places,
    factor: Int32Array.from(factor),
    rowOf: Int32Array.from(steps, ({ row }) => row),
    columnOf: Int32Array.from(steps, ({ column }) => column),
    pivots: Int32Array.from(steps, ({ pivot }) => pivot.place),
    rowStarts: starts(steps.map(({ right }) => right.length)),
    rowPlaces: Int32Array.from(steps.flatMap(({ right }) => right.map(([, entry]) => entry.place))),
    rowColumns: Int32Array.from(steps.flatMap(({ right }) => right.map(([column]) => column))),
    belowStarts: starts(steps.map(({ below }) => below.length)),
    belowPlaces: Int32Array.from(steps.flatMap(({ below }) => below.map(([, entry]) => entry.place))),
    belowRows: Int32Array.from(steps.flatMap(({ below }) => below.map(([row]) => row))),
    anchors: anchorsOf(shape, sample),
    parity: parityOf(steps),
    changed: changedBy(steps),
    constants: constantsOf(shape, sample, Int32Array.from(factor), matrix.places),
    operations,
  };
}

/** −1 to the count of even cycles of the permutation that takes the column of each pivot to its row. */
function parityOf(steps: readonly Step[]): 1 | -1 {
  const rowOf = new Int32Array(steps.length);
  for (const { row, column } of steps) rowOf[column] = row;
  const seen = new Uint8Array(steps.length);
  let parity: 1 | -1 = 1;
  for (let start = 0; start < steps.length; start++) {
    for (let at = start, length = 0; seen[at] === 0; at = rowOf[at]!, length++) {
      seen[at] = 1;
      if (length > 0) parity = parity === 1 ? -1 : 1;
    }
  }
  return parity;
}

function changedBy(steps: readonly Step[]): Int32Array {
  const changed = new Set<number>();
  for (const { right, below } of steps) {
    if (right.length > 0) for (const [row] of below) changed.add(row);
  }
  return Int32Array.from(changed).sort();
}

/** What units the elimination leaves: those from which nothing is subtracted, divided by their pivot where they lie below one. */
function constantsOf(
  { units }: SparseShape,
  sample: Float64Array,
  factor: Int32Array,
  places: number,
): Int8Array {
  const constants = new Int8Array(places);
  if (units === undefined) return constants;
  for (let k = 1; k < units.length; k++)
    if (units[k] === 1 && Math.abs(sample[k]!) === 1) constants[k] = sample[k]!;
  for (let at = 0; at < factor.length; ) {
    const pivot = factor[at]!;
    const below = factor[at + 1]!;
    const right = factor[at + 2]!;
    at += 3 + right;
    for (let i = 0; i < below; i++) {
      constants[factor[at]!]! *= constants[pivot]!;
      for (let j = 1; j <= right; j++) constants[factor[at + j]!] = 0;
      at += right + 1;
    }
  }
  return constants;
}

function anchorsOf({ size, rows }: SparseShape, sample: Float64Array): Int32Array {
  const anchors = new Int32Array(size);
  for (let k = 1; k < rows.length; k++) {
    const best = anchors[rows[k]!]!;
    if (best === 0 || Math.abs(sample[k]!) > Math.abs(sample[best]!)) anchors[rows[k]!] = k;
  }
  return anchors;
}

function starts(lengths: readonly number[]): Int32Array {
  const result = new Int32Array(lengths.length + 1);
  lengths.forEach((length, k) => {
    result[k + 1] = result[k]! + length;
  });
  return result;
}
