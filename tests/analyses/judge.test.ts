import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";

const CIRCUIT = "ground -- V1 : voltage k -- in -- R1 : resistor 1 kΩ ± 1 % -- ground\nknob k = 1 V\n";
const SWEEP = "sweep k from 1 mV to 1 V, 1 per decade\n";

/** Judges a contract over made-up values of the one trace `y`: a contract looks at nothing else. */
function judged(plan: string, contract: string, y: readonly number[]) {
  const { job, diagnostics } = compile(`${CIRCUIT}${plan}show y = in.v\n${contract}\n`);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  expect(y).toHaveLength(job.plan.points);
  return judge(job, { traces: [Float64Array.from(y)] });
}

/** One requirement over a sweep of k through 1 mV, 10 mV, 100 mV, 1 V. */
function required(contract: string, y: readonly number[]) {
  const { requirements } = judged(SWEEP, `require ${contract}`, y);
  return requirements[0]!;
}

const V = (value: number) => ({ knob: "k", unit: "V", value });

describe("a relation holds, with its margin and the place of the worst", () => {
  test.each([
    ["y <= 4 V", "holds", 0, 1],
    ["y < 4 V", "broken", 0, 1],
    ["y >= 2 V", "broken", -1, 0.001],
    ["y > 0.5 V", "holds", 0.5, 0.001],
    ["y within 3 V ± 2 V", "holds", 0, 0.001],
    ["y within 2 V ± 50 %", "broken", -1, 1],
    ["y between 0.5 V and 4.25 V", "holds", 0.25, 1],
    ["y rising", "holds", 1, 0.01],
    ["y falling", "broken", -1, 0.01],
    ["y <= 100 V * k / 1 V", "broken", -1, 0.01],
    ["-y >= -3.5 V for k in 1 mV .. 100 mV", "holds", 0.5, 0.1],
    ["y <= 1.5 V at k = 10 mV", "broken", -0.5, 0.01],
  ])("%s", (contract, verdict, margin, at) => {
    const found = required(contract, [1, 2, 3, 4]);
    expect(found).toMatchObject({ verdict, unit: "V", worst: { draw: 0, at: [V(at)] } });
    expect(found.margin).toBeCloseTo(margin, 12);
    expect(found.yield).toBeUndefined();
  });

  test("a reduction has no place on the first knob", () => {
    const found = required("highest(y) - lowest(y) <= 2.5 V", [1, 2, 3, 4]);
    expect(found).toMatchObject({
      label: "highest(y) - lowest(y) <= 2.5 V",
      verdict: "broken",
      margin: -0.5,
      unit: "V",
      worst: { draw: 0, at: [] },
    });
  });

  test("counts decades in decades", () => {
    expect(required("decades_where(y >= 2 V) >= 2", [1, 2, 3, 4])).toMatchObject({
      verdict: "holds",
      margin: 0,
      unit: "1",
    });
  });
});

describe("nothing unknown is held", () => {
  const gap = [1, Number.NaN, 3, 4];

  test.each([
    ["y <= 4 V", "no data"],
    ["y <= 3 V", "broken"],
    ["y <= 4 V at k = 1 V", "holds"],
    ["y <= 4 V at k = 10 mV", "no data"],
    ["y rising", "no data"],
    ["highest(y) <= 4 V", "no data"],
    ["decades_where(y <= 4 V) >= 1", "no data"],
    ["abs(deviation(y)) <= 9 V", "no data"],
    ["at(y, k = 100 mV) <= 4 V", "holds"],
    ["log10(-y / 1 V) <= 1 for k in 100 mV .. 1 V", "no data"],
  ])("%s", (contract, verdict) => {
    expect(required(contract, gap).verdict).toBe(verdict);
  });

  test("without a point there is neither margin nor place", () => {
    const none = required("y <= 4 V", Array(4).fill(Number.NaN));
    expect(none).toMatchObject({ verdict: "no data", margin: null, worst: null });
  });

  test("a level that is not reached is no reading", () => {
    const { readings, verdict } = judged(
      SWEEP,
      "read knee = reach(y, 9 V)\nrequire knee <= 1 V",
      [1, 2, 3, 4],
    );
    expect(readings).toEqual([{ name: "knee", unit: "V", per: "sweep", values: [null] }]);
    expect(verdict).toBe("no data");
  });
});

describe("readings", () => {
  const temperatures = `${SWEEP}sweep temperature over 0 °C, 25 °C\n`;
  const y = [1, 2, 3, 4, 2, 4, 6, 8];

  test("are one number a sweep, taken in their windows alone", () => {
    const contract =
      "read slope = per_decade(y)\nread top = highest(y) for k in 1 mV .. 10 mV at temperature = 25 °C\nread one = y at k = 100 mV";
    const { readings, verdict } = judged(temperatures, contract, y);
    expect(
      readings.map(({ name, per, values }) => [name, per, values.map((v) => v && Number(v.toFixed(9)))]),
    ).toEqual([
      ["slope", "sweep", [1, 2]],
      ["top", "sweep", [null, 4]],
      ["one", "sweep", [3, 6]],
    ]);
    expect(verdict).toBeNull();
  });

  test("may be traces, use one another and look at another place", () => {
    const contract =
      "read bend = deviation(y) for k in 1 mV .. 100 mV\nread rise = error_from(y, y + bend)\nread drift = y - at(y, temperature = 0 °C)\nread gain = at(per_decade(y), temperature = 25 °C) / per_decade(y)";
    expect(() => judged(temperatures, contract, y)).toThrow("is a trace and has no single value");
    const mended = contract.replace(
      "read drift = y - at(y, temperature = 0 °C)",
      "read drift = highest(y - at(y, temperature = 0 °C))",
    );
    const { readings } = judged(temperatures, mended, y);
    const values = Object.fromEntries(readings.map((one) => [one.name, one.values]));
    expect(values.bend!.map((v) => (v === null ? null : Math.abs(v) < 1e-12))).toEqual([
      true,
      true,
      true,
      null,
      true,
      true,
      true,
      null,
    ]);
    expect(values.rise).toHaveLength(8);
    expect(values.drift).toEqual([0, 4]);
    expect(values.gain!.map((v) => Number(v!.toFixed(9)))).toEqual([2, 1]);
  });

  test("ask of their own windows only, and in theirs of everything", () => {
    const at =
      "read top = highest(y) at temperature = 25 °C\nrequire top <= 8 V\nrequire top <= 9 V - 1 V at temperature = 25 °C";
    expect(judged(temperatures, at, y).verdict).toBe("holds");
    const bent = [1, 2, 3, Number.NaN, 2, 4, 6, Number.NaN];
    const bend = "read bend = deviation(y) for k in 1 mV .. 100 mV\nrequire abs(bend) <= 1 nV";
    expect(judged(temperatures, bend, bent).verdict).toBe("holds");
  });

  test("hold over the outer knobs, the worst of which is named", () => {
    const { requirements } = judged(temperatures, "require per_decade(y) within 1 V ± 10 %", y);
    expect(requirements[0]).toMatchObject({
      verdict: "broken",
      worst: { draw: 0, at: [{ knob: "temperature", unit: "K", value: 298.15 }] },
    });
    expect(requirements[0]!.margin).toBeCloseTo(-0.9, 9);
  });
});

describe("draws", () => {
  const ten = "draws 10 seed 1\n";
  /** Draw 0 at 0 V, then 1 V to 10 V. */
  const y = Array.from({ length: 11 }, (_, i) => i);

  test("every one of them must hold, the nominal one too", () => {
    const { requirements, verdict } = judged(ten, "require y <= 9.5 V\nrequire y >= 0.5 V", y);
    expect(verdict).toBe("broken");
    expect(requirements[0]).toMatchObject({
      margin: -0.5,
      worst: { draw: 10, at: [] },
      yield: { holds: 9, of: 10 },
    });
    expect(requirements[1]).toMatchObject({
      margin: -0.5,
      worst: { draw: 0, at: [] },
      yield: { holds: 10, of: 10 },
    });
  });

  test.each([
    ["90 %", "holds", 0.5, 9],
    ["91 %", "broken", -0.5, 10],
    ["50 %", "holds", 4.5, 5],
    ["100 %", "broken", -0.5, 10],
  ])(
    "%s of them may be asked for: the margin is that of the draw that decides",
    (share, verdict, margin, draw) => {
      const { requirements } = judged(ten, `require y <= 9.5 V in ${share} of draws`, y);
      expect(requirements[0]).toMatchObject({ verdict, margin, worst: { draw } });
    },
  );

  test("a draw that is not solved does not hold, and leaves no verdict unless the rest decides", () => {
    const unsolved = y.map((value) => (value === 3 ? Number.NaN : value));
    const of = (contract: string) => judged(ten, `require ${contract}`, unsolved).requirements[0]!;
    expect(of("y <= 9.5 V in 80 % of draws")).toMatchObject({
      verdict: "no data",
      yield: { holds: 8, of: 10 },
    });
    expect(of("y <= 5.5 V in 80 % of draws").verdict).toBe("broken");
    expect(of("y <= 10 V").verdict).toBe("no data");
    expect(of("y <= 9 V").verdict).toBe("broken");
  });
});
