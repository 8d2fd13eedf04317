import { describe, expect, test } from "vitest";
import { DenseFactors, indexOf } from "@/lib/solver/dense";
import { eliminate } from "@/lib/solver/elimination";
import { factorsOf } from "@/lib/solver/kernel/kernel";
import { ListedKernel } from "@/lib/solver/kernel/listed";
import { LinearSolver } from "@/lib/solver/linear";
import { chain, leftOver, randomSystem, type SparseSystem, stream } from "./kernel/systems";

/**
 * Rows of few entries whose pivots are a tenth of what stands below them, so that Markowitz's count takes them and every one
 * lets the last column grow tenfold (after Wilkinson, J. ACM 8, 1961, section 22).
 */
function treacherous(size: number): SparseSystem {
  const rows = [-1];
  const columns = [-1];
  const values = [0];
  const add = (row: number, column: number, value: number) => {
    rows.push(row);
    columns.push(column);
    values.push(value);
  };
  const last = size - 1;
  for (let i = 0; i < last; i++) {
    add(i, i, 0.1);
    if (i > 0) add(i, i - 1, 1);
    add(i, last, 1);
    add(last, i, 0.01 * (1 + i));
  }
  add(last, last, 1);
  return { shape: { size, rows, columns }, values: Float64Array.from(values) };
}

const wave = (size: number) => Float64Array.from({ length: size }, (_, i) => Math.sin(i + 1));

describe("dense factors", () => {
  test.each([1, 4, 30])("leave nothing but rounding over, transposed too, %i unknowns", (size) => {
    const system = randomSystem(size, stream(size + 5));
    const factors = DenseFactors.of(system.shape, system.values)!;
    const b = wave(size);
    const d = new Float64Array(size);
    factors.solve(b, d);
    expect(leftOver(system, d, b)).toBeLessThan(1e-12);
    factors.solveTransposed(b, d);
    expect(
      leftOver(
        system,
        d,
        b.map((value) => -value),
        true,
      ),
    ).toBeLessThan(1e-12);
  });

  test("are not made of what is singular, not finite or large", () => {
    const { shape, values } = chain(3);
    const empty = values.map((value, place) => (shape.rows[place] === 1 ? 0 : value));
    expect(DenseFactors.of(shape, empty)).toBeNull();
    expect(DenseFactors.of(shape, values.with(1, Number.NaN))).toBeNull();
    const large = chain(101);
    expect(DenseFactors.of(large.shape, large.values)).toBeNull();
    expect(DenseFactors.of(shape, values)).not.toBeNull();
  });

  test("serve where the sparse pivots of the values at hand lose every digit", () => {
    const system = treacherous(32);
    const { size } = system.shape;
    const plan = eliminate(system.shape, system.values)!;
    const b = wave(size);
    const d = new Float64Array(size);
    const sparse = new ListedKernel(system.shape, plan);
    expect(sparse.solve(system.values, b, d, factorsOf(plan))).toBe(false);
    expect(leftOver(system, d, b)).toBeGreaterThan(1e-3);
    const solver = new LinearSolver(system.shape, system.values);
    expect(solver.solve(system.values, b, d)).toBe(true);
    expect(leftOver(system, d, b)).toBeLessThan(1e-12);
    expect(solver.atHand).toBeNull();
    solver.solveAgain(b.map(Math.cos), d);
    expect(leftOver(system, d, b.map(Math.cos))).toBeLessThan(1e-12);
    solver.solveTransposed(b, d);
    expect(
      leftOver(
        system,
        d,
        b.map((value) => -value),
        true,
      ),
    ).toBeLessThan(1e-12);
  });
});

describe("the index of a solution", () => {
  // By hand: det [[1, 2], [3, 4]] = −2; with its rows changed about 2.
  const shape = { size: 2, rows: [-1, 0, 0, 1, 1], columns: [-1, 0, 1, 0, 1] };
  const masses = [
    { row: 0, column: 0, mass: 1 },
    { row: 1, column: 1, mass: 1 },
  ];

  test("has the sign of the determinant", () => {
    expect(indexOf(shape, Float64Array.of(0, 1, 2, 3, 4), masses)?.sign).toBe(-1);
    expect(indexOf(shape, Float64Array.of(0, 3, 4, 1, 2), masses)?.sign).toBe(1);
  });

  test("is stable where every eigenvalue of J has a positive real part", () => {
    // Eigenvalues by hand: 1 and 3; then 1 ± 2i; then −1 ± 2i.
    expect(indexOf(shape, Float64Array.of(0, 2, 1, 1, 2), masses)?.isStable).toBe(true);
    expect(indexOf(shape, Float64Array.of(0, 1, 2, -2, 1), masses)?.isStable).toBe(true);
    expect(indexOf(shape, Float64Array.of(0, -1, 2, -2, -1), masses)?.isStable).toBe(false);
  });
});
