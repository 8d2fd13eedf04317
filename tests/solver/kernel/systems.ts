import type { SparseShape } from "@/lib/solver/elimination";

/** A repeatable stream of numbers in [0, 1) (Lehmer's generator of 1951 with the multiplier 48271). */
export function stream(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

export interface SparseSystem {
  readonly shape: SparseShape;
  readonly values: Float64Array;
}

type Fill = (add: (row: number, column: number, value: number) => void) => void;

function systemOf(size: number, fill: Fill): SparseSystem {
  const rows = [-1];
  const columns = [-1];
  const values = [0];
  fill((row, column, value) => {
    rows.push(row);
    columns.push(column);
    values.push(value);
  });
  return { shape: { size, rows, columns }, values: Float64Array.from(values) };
}

/** A random sparse matrix without a zero on its diagonal, whose rows differ by up to twelve decades, like currents and voltages. */
export function randomSystem(size: number, next: () => number): SparseSystem {
  return systemOf(size, (add) => {
    for (let i = 0; i < size; i++) {
      const scale = 10 ** (-12 * next());
      for (let j = 0; j < size; j++) {
        if (i === j) add(i, j, scale * (2 + next()));
        else if (next() <= 3 / size) add(i, j, scale * (next() - 0.5));
      }
    }
  });
}

/** A chain of nets, each joined to the next: three entries a row. */
export function chain(size: number): SparseSystem {
  return systemOf(size, (add) => {
    for (let i = 0; i < size; i++) {
      if (i > 0) add(i, i - 1, -1);
      add(i, i, 2.5);
      if (i < size - 1) add(i, i + 1, -1);
    }
  });
}

/** Nets that all hang on one rail, which a source holds: the last two rows are the rail's and the source's. */
export function rail(nets: number): SparseSystem {
  return systemOf(nets + 2, (add) => {
    for (let i = 0; i < nets; i++) {
      add(i, i, 2);
      add(i, nets, -1);
      add(nets, i, -1);
    }
    add(nets, nets, nets);
    add(nets, nets + 1, 1);
    add(nets + 1, nets, 1);
  });
}

/** Nets joined at random, each held by a source of its own: branch currents and laws with entries of +1 and −1 that stay. */
export function withUnits(pairs: number, next: () => number): SparseSystem {
  const units = [0];
  const system = systemOf(2 * pairs, (add) => {
    const put = (row: number, column: number, value: number, isUnit: boolean) => {
      add(row, column, value);
      units.push(isUnit ? 1 : 0);
    };
    for (let i = 0; i < pairs; i++) {
      put(i, i, 2 + next(), false);
      put(i, pairs + i, next() < 0.5 ? 1 : -1, true);
      put(pairs + i, i, next() < 0.5 ? 1 : -1, true);
      if (next() < 0.5) put(pairs + i, (i + 1) % pairs, -1e-6 * (1 + next()), false);
      if (pairs > 2) put(i, (i + 1) % pairs, -next(), false);
    }
  });
  return { ...system, shape: { ...system.shape, units: Uint8Array.from(units) } };
}

/** The largest |J·d + b|_i (or of Jᵀ) as a part of Σ_j |J_ij·d_j| + |b_i|: the componentwise backward error of a solution. */
export function leftOver(
  { shape, values }: SparseSystem,
  d: Float64Array,
  b: Float64Array,
  isTransposed = false,
): number {
  const { rows, columns, size } = shape;
  const sums = Float64Array.from(b.subarray(0, size));
  const sizes = sums.map(Math.abs);
  for (let k = 1; k < values.length; k++) {
    const row = isTransposed ? columns[k]! : rows[k]!;
    const term = values[k]! * d[isTransposed ? rows[k]! : columns[k]!]!;
    sums[row]! += term;
    sizes[row]! += Math.abs(term);
  }
  let worst = 0;
  for (let i = 0; i < size; i++) worst = Math.max(worst, Math.abs(sums[i]!) / (sizes[i]! || 1));
  return worst;
}
