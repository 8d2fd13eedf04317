import { describe, expect, test } from "vitest";
import { eliminate } from "@/lib/solver/elimination";
import { Buckets } from "@/lib/solver/kernel/buckets";
import { factorsOf } from "@/lib/solver/kernel/kernel";
import { ListedKernel } from "@/lib/solver/kernel/listed";
import { chain, leftOver, rail, type SparseSystem } from "./systems";

/** Solves with the sample's own pivots: the places that were needed, and what the solution leaves over. */
function solved(system: SparseSystem): { places: number; error: number } {
  const { size } = system.shape;
  const plan = eliminate(system.shape, system.values)!;
  const b = Float64Array.from({ length: size }, (_, i) => Math.sin(i + 1));
  const d = new Float64Array(size);
  new ListedKernel(system.shape, plan).solve(system.values, b, d, factorsOf(plan));
  return { places: plan.places, error: leftOver(system, d, b) };
}

describe("the order of pivots", () => {
  test.each([10, 1000, 20_000])("keeps a chain of %i nets free of fill-in", (size) => {
    const system = chain(size);
    const { places, error } = solved(system);
    expect(places).toBe(system.values.length);
    expect(error).toBeLessThan(1e-13);
  });

  test.each([10, 2000])("keeps %i nets on one rail free of fill-in", (nets) => {
    const system = rail(nets);
    const { places, error } = solved(system);
    expect(places).toBe(system.values.length);
    expect(error).toBeLessThan(1e-12);
  });

  test("passes by a column that is rounding now and fills later", () => {
    // Column 2 of row 2 is 0 until another row is subtracted from it.
    const shape = { size: 3, rows: [-1, 0, 0, 1, 1, 2, 2], columns: [-1, 0, 2, 0, 1, 0, 2] };
    const values = Float64Array.of(0, 1, 1, 1, 1, 1, 0);
    const plan = eliminate(shape, values)!;
    const d = new Float64Array(3);
    const b = Float64Array.of(-3, -3, -1);
    new ListedKernel(shape, plan).solve(values, b, d, new Float64Array(plan.places + 3));
    // By hand: x0 + x2 = 3, x0 + x1 = 3, x0 = 1.
    expect([...d]).toEqual([1, 2, 2]);
  });
});

describe("lists by count", () => {
  test("hold each item once, under its count", () => {
    const lists = new Buckets(5);
    [3, 1, 3, 0, 3].forEach((count, item) => {
      lists.put(item, count);
    });
    lists.put(2, 1);
    lists.put(2, 1);
    lists.take(4);
    const held = [0, 1, 2, 3].map((count) => {
      const items: number[] = [];
      for (let item = lists.first(count); item !== -1; item = lists.next(item)) items.push(item);
      return items.sort();
    });
    expect(held).toEqual([[3], [1, 2], [], [0]]);
  });
});
