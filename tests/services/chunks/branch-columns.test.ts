import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { Plan } from "@/lib/analyses/plan";
import { numbersIn, rowFrom, storedRow } from "@/lib/services/chunks/branch-columns";
import { CHUNK_POINTS, decode } from "@/lib/services/chunks/codec";

/** A plan of so many values of the first axis at two settings of the second, with two traces. */
function planOf(length: number): Plan {
  return {
    title: "",
    axes: [
      { knob: "a", unit: "V", scale: "linear", values: Array.from({ length }, (_, k) => k) },
      { knob: "b", unit: "A", scale: "list", values: [1, 2.5] },
    ],
    draws: 0,
    points: 2 * length,
    seek: 3,
    traces: [
      { name: "x", unit: "V" },
      { name: "y", unit: "A" },
    ],
    unknowns: [],
  };
}

const value = fc.option(fc.double({ noNaN: true, noDefaultInfinity: true }));

function rows(length: number): fc.Arbitrary<BranchesDocument> {
  const column = fc.array(value, { minLength: length, maxLength: length });
  const branch = fc.record({
    stable: fc.array(fc.option(fc.boolean()), { minLength: length, maxLength: length }),
    bound: column,
    traces: fc.tuple(column, column).map(([x, y]) => [
      { name: "x", unit: "V", values: x },
      { name: "y", unit: "A", values: y },
    ]),
  });
  const fold = fc.record({
    value: fc.double({ noNaN: true, noDefaultInfinity: true }),
    traces: fc.tuple(value, value),
  });
  return fc.record({
    at: fc.constant([{ knob: "b", value: 2.5 }]),
    complete: fc.boolean(),
    branches: fc.array(branch, { maxLength: 4 }),
    folds: fc.array(fold, { maxLength: 4 }),
  });
}

/** A row as it comes back from the tables, its chunks put together in order. */
function back(plan: Plan, row: BranchesDocument): BranchesDocument {
  const { found, columns } = storedRow(row);
  const named = new Map(
    columns.map(({ column, chunks }) => [
      column,
      Float64Array.from(chunks.flatMap(({ data }) => [...decode(data)])),
    ]),
  );
  return rowFrom(plan, 1, JSON.parse(JSON.stringify(found)), named);
}

describe("the branches of a row", () => {
  test("come back from their columns as the same JSON", () => {
    const cases = fc
      .integer({ min: 1, max: 9 })
      .chain((length) => rows(length).map((row) => ({ length, row })));
    fc.assert(
      fc.property(cases, ({ length, row }) => {
        expect(JSON.stringify(back(planOf(length), row))).toBe(JSON.stringify(row));
      }),
    );
  });

  test("come back from several chunks", () => {
    const [row] = fc.sample(rows(CHUNK_POINTS + 5), { numRuns: 1, seed: 4 });
    const two = { ...row!, branches: [...row!.branches, ...row!.branches] };
    expect(JSON.stringify(back(planOf(CHUNK_POINTS + 5), two))).toBe(JSON.stringify(two));
  });

  test("keep the reason why they were not found", () => {
    const row = {
      at: [{ knob: "b", value: 2.5 }],
      complete: false,
      branches: [],
      folds: [],
      fault: "Too long.",
    };
    expect(back(planOf(3), row)).toEqual(row);
  });

  test("are counted by the numbers in their document", () => {
    const found = { complete: true, branches: 3, folds: 2 };
    expect(numbersIn(planOf(10), found)).toBe(3 * 10 * 4 + 2 * 3);
  });

  test("are refused where a column is cut short", () => {
    const [row] = fc.sample(
      rows(5).filter(({ branches }) => branches.length > 0),
      { numRuns: 1, seed: 1 },
    );
    const { found } = storedRow(row!);
    expect(() => rowFrom(planOf(5), 1, found, new Map())).toThrow(/branch\/stable of row 1 is not whole/);
  });
});
