import { describe, expect, test } from "vitest";
import { Course, reach, reduce } from "@/lib/analyses/reductions";
import reference from "@/tests/reference/reductions.json";

/** Relative to the size of what is summed: a few roundings over some tens of points. */
const ROUNDINGS = 1e-11;

const SINGLE = ["highest", "lowest", "mean", "span", "per_decade", "per_unit", "intercept"] as const;

/** The reductions of numpy and scipy; see tests/reference/reductions.py. */
describe.each(reference.cases)("the curve $name", (one) => {
  const ys = Float64Array.from(one.trace);
  const course = new Course(Float64Array.from(one.knob), one.scale === "logarithmic");
  const size = Math.max(...one.trace.map(Math.abs));

  test.each(SINGLE)("has its %s", (name) => {
    const slack = ROUNDINGS * Math.max(size, Math.abs(one[name]));
    expect(Math.abs(reduce(name, ys, course) - one[name])).toBeLessThanOrEqual(slack);
  });

  test("has its deviation from the line", () => {
    const found = course.own.deviations(ys);
    one.deviation.forEach((value, i) => {
      expect(Math.abs(found[i]! - value)).toBeLessThanOrEqual(ROUNDINGS * size);
    });
  });

  test("comes to its level where it should", () => {
    const found = reach(ys, one.level, course);
    if (one.reach === null) expect(found).toBeNaN();
    else expect(Math.abs(found / one.reach - 1)).toBeLessThan(1e-9);
  });

  test("is above its level over the widest run", () => {
    const above = ys.map((y) => (y > one.level ? 1 : 0));
    expect(Math.abs(reduce("decades_where", above, course) - one.decades_above)).toBeLessThan(1e-12);
  });
});

describe("a reduction", () => {
  const knob = Float64Array.of(1, 10, 100, 1000);
  const course = new Course(knob, true);

  test("knows nothing where a point is not known", () => {
    const ys = Float64Array.of(1, Number.NaN, 3, 4);
    for (const name of SINGLE) expect(reduce(name, ys, course)).toBeNaN();
    expect(reach(ys, 3.5, course)).toBeNaN();
    expect([...course.own.deviations(ys)].every(Number.isNaN)).toBe(true);
  });

  test("knows nothing over no point, and no line over one", () => {
    expect(reduce("highest", new Float64Array(), new Course(new Float64Array(), true))).toBeNaN();
    expect(reduce("per_decade", Float64Array.of(1), new Course(Float64Array.of(1), true))).toBeNaN();
  });

  test("goes along a rising knob whatever the order of the sweep", () => {
    const order = [2, 0, 3, 1];
    const shuffled = new Course(
      Float64Array.from(order, (i) => knob[i]!),
      true,
    );
    const ys = Float64Array.of(0, 1, 2, 1);
    const mixed = Float64Array.from(order, (i) => ys[i]!);
    expect(reach(mixed, 1.5, shuffled)).toBe(reach(ys, 1.5, course));
    expect(reduce("decades_where", mixed, shuffled)).toBe(2);
  });

  test("finds a level met at a point, and the first of several crossings", () => {
    expect(reach(Float64Array.of(0, 1, 0, 1), 1, course)).toBe(10);
    expect(reach(Float64Array.of(0, 2, 0, 2), 1, course)).toBeCloseTo(Math.sqrt(10), 12);
  });
});
