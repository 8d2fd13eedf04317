import { Matrix, solve } from "ml-matrix";
import { describe, expect, test } from "vitest";
import { freeUnknowns } from "@/lib/solver/dense";
import { eliminate } from "@/lib/solver/elimination";
import { LinearSolver } from "@/lib/solver/linear";

/** A repeatable stream of numbers in [0, 1) (Lehmer's generator of 1951 with the multiplier 48271). */
function stream(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

/** A random sparse matrix without a zero on its diagonal, whose rows differ by up to twelve decades, like currents and voltages. */
function randomSystem(size: number, next: () => number) {
  const rows = [-1];
  const columns = [-1];
  const values = [0];
  for (let i = 0; i < size; i++) {
    const scale = 10 ** (-12 * next());
    for (let j = 0; j < size; j++) {
      if (i !== j && next() > 3 / size) continue;
      rows.push(i);
      columns.push(j);
      values.push(scale * (i === j ? 2 + next() : next() - 0.5));
    }
  }
  return { shape: { size, rows, columns }, values: Float64Array.from(values) };
}

function dense({ shape, values }: ReturnType<typeof randomSystem>): Matrix {
  const matrix = Matrix.zeros(shape.size, shape.size);
  for (let k = 1; k < values.length; k++) matrix.set(shape.rows[k]!, shape.columns[k]!, values[k]!);
  return matrix;
}

describe("the linear solver", () => {
  // Reference: the dense pivoted LU of the package ml-matrix, on rows scaled alike.
  test.each([1, 2, 5, 20, 60])("agrees with a dense pivoted solution, %i unknowns", (size) => {
    const next = stream(size);
    for (let trial = 0; trial < 10; trial++) {
      const system = randomSystem(size, next);
      const residual = Float64Array.from({ length: size }, () => next() - 0.5);
      const step = new Float64Array(size);
      const solver = new LinearSolver(system.shape, system.values);
      expect(solver.solve(system.values, residual, step)).toBe(true);
      const matrix = dense(system);
      const right = Matrix.columnVector([...residual].map((value) => -value));
      for (let i = 0; i < size; i++) {
        const scale = 1 / Math.max(...matrix.getRow(i).map(Math.abs));
        matrix.mulRow(i, scale);
        right.mulRow(i, scale);
      }
      const wanted = solve(matrix, right).getColumn(0);
      const largest = Math.max(...wanted.map(Math.abs));
      for (let i = 0; i < size; i++)
        expect(Math.abs(step[i]! - wanted[i]!) / largest).toBeLessThanOrEqual(1e-11);
    }
  });

  test("chooses new pivots where the first ones vanish, and goes back to them on reset", () => {
    const shape = { size: 2, rows: [-1, 0, 0, 1, 1], columns: [-1, 0, 1, 0, 1] };
    const solver = new LinearSolver(shape, Float64Array.of(0, 5, 1, 1, 3));
    const step = new Float64Array(2);
    // x + y·0 … : with a zero where the pivot was, y = −1 and x = −2 by hand.
    expect(solver.solve(Float64Array.of(0, 0, 1, 1, 0), Float64Array.of(1, 2), step)).toBe(true);
    expect([...step]).toEqual([-2, -1]);
    const values = Float64Array.of(0, 5.1, 0.7, 0.9, 3.3);
    const residual = Float64Array.of(0.3, 0.7);
    solver.reset();
    solver.solve(values, residual, step);
    const afterwards = [...step];
    const fresh = new LinearSolver(shape, Float64Array.of(0, 5, 1, 1, 3));
    fresh.solve(values, residual, step);
    expect(afterwards).toEqual([...step]);
  });

  test("refuses what is singular or not finite", () => {
    const shape = { size: 2, rows: [-1, 0, 0, 1, 1], columns: [-1, 0, 1, 0, 1] };
    const step = new Float64Array(2);
    const good = Float64Array.of(0, 2, 1, 1, 2);
    const refused = [
      Float64Array.of(0, 1, 2, 2, 4),
      Float64Array.of(0, 0, 0, 1, 1),
      Float64Array.of(0, Number.NaN, 1, 1, 2),
      Float64Array.of(0, Number.POSITIVE_INFINITY, 1, 1, 2),
    ];
    for (const values of refused) {
      const solver = new LinearSolver(shape, good);
      expect(solver.solve(values, Float64Array.of(1, 1), step), values.join()).toBe(false);
    }
  });

  test("solves again with the factors at hand", () => {
    const system = randomSystem(12, stream(3));
    const solver = new LinearSolver(system.shape, system.values);
    const step = new Float64Array(12);
    const residual = Float64Array.from({ length: 12 }, (_, i) => Math.cos(i));
    solver.solve(system.values, new Float64Array(12).fill(1), step);
    solver.solveAgain(residual, step);
    const again = [...step];
    solver.solve(system.values, residual, step);
    expect(again).toEqual([...step]);
  });
});

describe("the elimination", () => {
  test("keeps a chain of nets free of fill-in", () => {
    const size = 200;
    const rows = [-1];
    const columns = [-1];
    const values = [0];
    for (let i = 0; i < size; i++) {
      for (const j of [i - 1, i, i + 1]) {
        if (j < 0 || j >= size) continue;
        rows.push(i);
        columns.push(j);
        values.push(i === j ? 2.5 : -1);
      }
    }
    const plan = eliminate({ size, rows, columns }, Float64Array.from(values))!;
    expect(plan.places).toBe(rows.length);
  });

  test("takes a pivot of rounding only for none", () => {
    const shape = { size: 2, rows: [-1, 0, 0, 1, 1], columns: [-1, 0, 1, 0, 1] };
    // 0.1 + 0.2 is not 0.3 in binary64: the determinant is 5.6e-17.
    expect(eliminate(shape, Float64Array.of(0, 0.3, 1, 0.1 + 0.2, 1))).toBeNull();
    expect(eliminate(shape, Float64Array.of(0, 0.3, 1, 0.31, 1))).not.toBeNull();
  });
});

describe("the diagnosis of a singular matrix", () => {
  test("names the unknowns that it leaves free", () => {
    // Net 1 hangs on nothing: its column and row are empty.
    const shape = { size: 3, rows: [-1, 0, 0, 2, 2, 1], columns: [-1, 0, 2, 0, 2, 1] };
    expect(freeUnknowns(shape, Float64Array.of(0, 2, -1, -1, 2, 0))).toEqual([1]);
    // Nets 0 and 1 are joined to each other only, and move together.
    const joined = { size: 3, rows: [-1, 0, 0, 1, 1, 2], columns: [-1, 0, 1, 0, 1, 2] };
    expect(freeUnknowns(joined, Float64Array.of(0, 1, -1, -1, 1, 5)).sort()).toEqual([0, 1]);
  });

  test("says nothing of what is not finite", () => {
    const shape = { size: 1, rows: [-1, 0], columns: [-1, 0] };
    expect(freeUnknowns(shape, Float64Array.of(0, Number.NaN))).toEqual([]);
  });
});
