import { describe, expect, test } from "vitest";
import { type Elimination, eliminate } from "@/lib/solver/elimination";
import { factorsOf, type Kernel } from "@/lib/solver/kernel/kernel";
import { ListedKernel } from "@/lib/solver/kernel/listed";
import { LinearSolver } from "@/lib/solver/linear";
import { GeneratedKernel } from "./generated-kernel";
import { chain, leftOver, randomSystem, type SparseSystem, stream, withUnits } from "./systems";

interface Both {
  readonly system: SparseSystem;
  readonly plan: Elimination;
  readonly listed: Kernel;
  readonly generated: Kernel;
}

function bothOf(system: SparseSystem): Both {
  const plan = eliminate(system.shape, system.values)!;
  const generated = new GeneratedKernel(system.shape, plan);
  return { system, plan, listed: new ListedKernel(system.shape, plan), generated };
}

/** All that a kernel answers, to the bit: whether the pivots serve, and three solutions. */
function answers(kernel: Kernel, { plan, system }: Both, values: Float64Array, b: Float64Array) {
  const { size } = system.shape;
  const factors = factorsOf(plan);
  const solutions = [new Float64Array(size), new Float64Array(size), new Float64Array(size)] as const;
  const isGood = kernel.solve(values, b, solutions[0], factors);
  kernel.solveAgain(b.map(Math.sin), solutions[1], factors);
  kernel.solveTransposed(b, solutions[2], factors);
  return { isGood, solutions: solutions.map((solution) => [...new BigUint64Array(solution.buffer)]) };
}

describe("generated code and the list of operations", () => {
  test.each([1, 2, 3, 8, 20, 30])("give the same bytes, %i unknowns", (size) => {
    const next = stream(size + 100);
    for (let trial = 0; trial < 8; trial++) {
      const both = bothOf(randomSystem(size, next));
      for (let k = 0; k < 4; k++) {
        const values = both.system.values.map((value) => value * (1 + 0.5 * (next() - 0.5)));
        const b = Float64Array.from({ length: size + 1 }, () => next() - 0.5);
        const listed = answers(both.listed, both, values, b);
        expect(answers(both.generated, both, values, b)).toEqual(listed);
      }
    }
  });

  test.each([2, 6, 15])("give the same bytes where units are known, %i pairs", (pairs) => {
    const next = stream(pairs + 7);
    for (let trial = 0; trial < 8; trial++) {
      const both = bothOf(withUnits(pairs, next));
      expect(both.plan.constants.some((constant) => constant !== 0)).toBe(true);
      for (let k = 0; k < 4; k++) {
        const { units } = both.system.shape;
        const values = both.system.values.map((value, place) =>
          units![place] === 1 ? value : value * next(),
        );
        const b = Float64Array.from({ length: 2 * pairs + 1 }, () => next() - 0.5);
        const listed = answers(both.listed, both, values, b);
        expect(listed.isGood).toBe(true);
        expect(answers(both.generated, both, values, b)).toEqual(listed);
      }
    }
  });

  test("agree where a pivot vanishes or a value is not finite, and call no such solution good", () => {
    const both = bothOf(chain(6));
    for (const bad of [0, 1e-30, 1e300, Number.NaN, Number.POSITIVE_INFINITY]) {
      for (let place = 1; place < both.system.values.length; place++) {
        const values = both.system.values.slice();
        values[place] = bad;
        const b = Float64Array.of(1, -2, 0.5, 3, 0, 1, 0);
        const listed = answers(both.listed, both, values, b);
        const generated = answers(both.generated, both, values, b);
        expect(generated.isGood).toBe(listed.isGood);
        if (Number.isFinite(bad) && listed.isGood) expect(generated).toEqual(listed);
        if (!Number.isFinite(bad)) expect(listed.isGood).toBe(false);
      }
    }
  });
});

describe("solutions", () => {
  test.each([1, 5, 20, 60])("leave nothing but rounding over, transposed too, %i unknowns", (size) => {
    const next = stream(size);
    for (let trial = 0; trial < 5; trial++) {
      const system = randomSystem(size, next);
      const solver = new LinearSolver(system.shape, system.values);
      const b = Float64Array.from({ length: size }, () => next() - 0.5);
      const d = new Float64Array(size);
      expect(solver.solve(system.values, b, d)).toBe(true);
      expect(leftOver(system, d, b)).toBeLessThan(1e-12);
      solver.solveTransposed(b, d);
      const negative = b.map((value) => -value);
      expect(leftOver(system, d, negative, true)).toBeLessThan(1e-12);
    }
  });

  test("come from new pivots where the first would let the factors grow", () => {
    const shape = { size: 3, rows: [-1, 0, 0, 1, 1, 2, 2, 2], columns: [-1, 0, 1, 0, 1, 0, 1, 2] };
    const solver = new LinearSolver(shape, Float64Array.of(0, 4, 1, 1, 3, 1, 1, 2));
    const values = Float64Array.of(0, 1e-14, 1, 1, 1, 1, 2, 2);
    const b = Float64Array.of(-1, -2, -5);
    const d = new Float64Array(3);
    expect(solver.solve(values, b, d)).toBe(true);
    // By hand, to 1e-14: x = y = z = 1.
    for (const value of d) expect(Math.abs(value - 1)).toBeLessThan(1e-12);
  });
});
