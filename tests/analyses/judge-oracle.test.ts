import fc from "fast-check";
import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";

const KNOBS = ["k", "l", "m"] as const;

interface Axis {
  readonly values: readonly number[];
  /** A window by its first and last value, null for none. */
  readonly window: readonly [number, number] | null;
}

const axis: fc.Arbitrary<Axis> = fc
  .uniqueArray(fc.integer({ min: -9, max: 9 }), { minLength: 1, maxLength: 4 })
  .chain((values) => {
    const one = fc.constantFrom(...values);
    const window = fc.tuple(one, one).map(([a, b]): [number, number] => [Math.min(a, b), Math.max(a, b)]);
    return fc.record({ values: fc.constant(values), window: fc.option(window) });
  });

function textOf(axes: readonly Axis[], draws: number, bound: number): string {
  const windows = axes
    .map(({ window }, i) => (window ? ` for ${KNOBS[i]} in ${window[0]} V .. ${window[1]} V` : ""))
    .join("");
  const lines = [
    ...axes.map((_, i) => `knob ${KNOBS[i]} = 1 V`),
    "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ ± 1 % -- ground",
    ...axes.map(
      ({ values }, i) => `sweep ${KNOBS[i]} over ${values.map((value) => `${value} V`).join(", ")}`,
    ),
    ...(draws > 0 ? [`draws ${draws} seed 1`] : []),
    "show y = in.v",
    `read top = highest(y)${windows}`,
    `require y <= ${bound} V${windows}`,
    `require top <= ${bound} V as "by a reading"`,
  ];
  return lines.join("\n");
}

/** Goes over every point with nothing but its place on the axes: what a contract must come to. */
function oracle(axes: readonly Axis[], points: number, y: readonly number[], bound: number) {
  let margin = Number.POSITIVE_INFINITY;
  let lacks = false;
  for (let point = 0; point < points; point++) {
    let rest = point;
    const isAsked = axes.every(({ values, window }) => {
      const value = values[rest % values.length]!;
      rest = Math.floor(rest / values.length);
      return window === null || (value >= window[0] && value <= window[1]);
    });
    if (!isAsked) continue;
    if (Number.isNaN(y[point])) lacks = true;
    else margin = Math.min(margin, bound - y[point]!);
  }
  const verdict = margin < 0 ? "broken" : lacks ? "no data" : "holds";
  return { verdict, margin: Number.isFinite(margin) ? margin : null };
}

test("a bound over windows of any axes and draws is what going over every point says", () => {
  const run = fc
    .record({
      axes: fc.array(axis, { maxLength: 3 }),
      draws: fc.integer({ min: 0, max: 3 }),
      bound: fc.integer({ min: 0, max: 9 }),
    })
    .chain((plan) => {
      const points = plan.axes.reduce((product, { values }) => product * values.length, plan.draws + 1);
      const value = fc.oneof(
        { weight: 20, arbitrary: fc.integer({ min: 0, max: 9 }) },
        { weight: 1, arbitrary: fc.constant(Number.NaN) },
      );
      return fc.record({
        plan: fc.constant({ ...plan, points }),
        y: fc.array(value, { minLength: points, maxLength: points }),
      });
    });
  fc.assert(
    fc.property(run, ({ plan: { axes, draws, bound, points }, y }) => {
      const { job, diagnostics } = compile(textOf(axes, draws, bound));
      expect(diagnostics).toEqual([]);
      expect(job!.plan.points).toBe(points);
      const { requirements } = judge(job!, { traces: [Float64Array.from(y)] });
      const wanted = oracle(axes, points, y, bound);
      expect(requirements[0]).toMatchObject(wanted);
      // A row with a gap has no highest value, so a reading may know less, and never says that more holds.
      if (wanted.verdict !== "broken") expect(requirements[1]!.verdict).toBe(wanted.verdict);
      else expect(["broken", "no data"]).toContain(requirements[1]!.verdict);
    }),
    { numRuns: 200 },
  );
});
