import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";

// Every expected figure is worked out by hand from the four values of y.
const CIRCUIT = "ground -- V1 : voltage k -- in -- R1 : resistor 1 kΩ ± 1 % -- ground\nknob k = 1 V\n";
const SWEEP = "sweep k from 1 mV to 1 V, 1 per decade\n";

/** One requirement over made-up values of the one trace `y`. */
function required(contract: string, y: readonly number[], plan = SWEEP) {
  const { job, diagnostics } = compile(`${CIRCUIT}${plan}show y = in.v\n${contract}\n`);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  expect(y).toHaveLength(job.plan.points);
  return judge(job, { traces: [Float64Array.from(y)] }).requirements[0]!;
}

const Y = [1, 2, 3, 4];

describe("limits and what is compared with them", () => {
  test.each([
    ["y <= 3 V", { low: null, high: 3 }, { nominal: 4, worst: 4, low: 1, high: 4 }],
    ["y > 0.5 V", { low: 0.5, high: null }, { nominal: 1, worst: 1, low: 1, high: 4 }],
    ["y within 2 V ± 50 %", { low: 1, high: 3 }, { nominal: 4, worst: 4, low: 1, high: 4 }],
    ["y between 0 V and 6 V", { low: 0, high: 6 }, { nominal: 1, worst: 1, low: 1, high: 4 }],
    [
      "y between 0 V and 6 V for k in 10 mV .. 100 mV",
      { low: 0, high: 6 },
      { nominal: 2, worst: 2, low: 2, high: 3 },
    ],
    ["span(y) <= 2.5 V", { low: null, high: 2.5 }, { nominal: 3, worst: 3, low: 3, high: 3 }],
    ["y rising", { low: 0, high: null }, { nominal: 1, worst: 1, low: 1, high: 1 }],
    ["y falling", { low: null, high: 0 }, { nominal: 1, worst: 1, low: 1, high: 1 }],
  ])("%s", (contract, allowed, value) => {
    expect(required(`require ${contract}`, Y)).toMatchObject({ allowed, value });
  });

  test("a limit that differs from point to point: values keep their distance to it", () => {
    // Limits 0.1, 1, 10 and 100 V: beyond them by 0.9, 1, −7 and −96 V, the worst at 10 mV.
    const { allowed, value, bounds } = required("require y <= 100 V * k / 1 V", Y);
    expect(allowed.low).toBeNull();
    expect(allowed.high).toBeCloseTo(1, 12);
    expect(value.worst).toBe(2);
    expect(value.nominal).toBeCloseTo(2, 12);
    expect(value.low).toBeCloseTo(-95, 12);
    expect(value.high).toBeCloseTo(2, 12);
    expect(bounds).toEqual({ trace: "y", low: null, high: null });
  });

  test("two limits that differ from point to point: values keep their place between them", () => {
    // Limits 0.5 to 1.5, 5 to 15, 50 to 150 and 500 to 1500 V, the worst at 1 V: places 0.5, −0.3, −0.47 and −0.496.
    const { allowed, value } = required("require y within 1000 * k ± 50 %", Y);
    expect(allowed.low).toBeCloseTo(500, 9);
    expect(allowed.high).toBeCloseTo(1500, 9);
    expect(value.low).toBeCloseTo(4, 9);
    expect(value.high).toBeCloseTo(1000, 9);
    expect(value.worst).toBe(4);
  });

  test("equal limits on both sides leave no room, and values keep their distance", () => {
    const { allowed, value } = required("require y within 1000 * k ± 0 %", Y);
    expect(allowed).toEqual({ low: 1000, high: 1000 });
    expect(value).toMatchObject({ worst: 4, low: 4, high: 1000 });
  });

  test("an unknown value is left out, and where all are unknown nothing is said of them", () => {
    const some = required("require y <= 3 V", [1, Number.NaN, 2, Number.NaN]);
    expect(some.value).toEqual({ nominal: 2, worst: 2, low: 1, high: 2 });
    const none = required("require y <= 3 V", Array(4).fill(Number.NaN));
    expect(none.allowed).toEqual({ low: null, high: null });
    expect(none.value).toEqual({ nominal: null, worst: null, low: null, high: null });
    expect(none.drawn).toEqual([null]);
    expect(none.bounds).toEqual({ trace: "y", low: null, high: null });
  });
});

describe("over draws", () => {
  const drawn = `${SWEEP}draws 3 seed 1\n`;
  const y = [1, 1, 1, 2, 0, 1, 1, 2, 1, 1, 1, 4, 1, 1, 1, 3];

  test("the nominal design is its own worst, the spread that of all draws", () => {
    const found = required("require y <= 3.5 V", y, drawn);
    expect(found).toMatchObject({ verdict: "broken", worst: { draw: 2 }, margin: -0.5 });
    expect(found.value).toEqual({ nominal: 2, worst: 4, low: 0, high: 4 });
    expect(found.drawn).toEqual([2, 2, 4, 3]);
  });

  test("a share is decided by its draw, which the worst value is of", () => {
    const found = required("require y <= 3.5 V in 60 % of draws", y, drawn);
    expect(found).toMatchObject({ verdict: "holds", worst: { draw: 3 } });
    expect(found.margin).toBeCloseTo(0.5, 12);
    expect(found.value).toEqual({ nominal: 2, worst: 3, low: 0, high: 4 });
  });
});

describe("the trace that is bounded, and where", () => {
  test.each([
    ["y <= 3 V", { trace: "y", low: null, high: 3 }],
    ["y between 0 V and 6 V", { trace: "y", low: 0, high: 6 }],
    ["abs(y) <= 3 V", { trace: "y", low: -3, high: 3 }],
    ["abs(y) between 1 V and 3 V", { trace: "y", low: null, high: null }],
    ["y + 1 V <= 3 V", null],
    ["y rising", null],
    ["highest(y) <= 3 V", null],
  ])("%s", (contract, bounds) => {
    expect(required(`require ${contract}`, Y).bounds).toEqual(bounds);
  });

  test("windows of the requirement and of the reading that it is about, narrowed", () => {
    const text =
      "read bend = deviation(y) for k in 1 mV .. 100 mV\nrequire abs(bend) <= 1 V for k in 10 mV .. 1 V";
    const { windows, bounds } = required(text, Y);
    expect(bounds).toEqual({ trace: "bend", low: -1, high: 1 });
    expect(windows).toEqual([{ knob: "k", low: 0.01, high: 0.1 }]);
    expect(required("require y <= 3 V at k = 1 V", Y).windows).toEqual([{ knob: "k", low: 1, high: 1 }]);
    expect(required("require y <= 3 V", Y).windows).toEqual([]);
  });
});

describe("the reading that is bounded", () => {
  const twoTemperatures = `${SWEEP}sweep temperature over 0 °C, 25 °C\n`;
  const y = [1, 2, 3, 4, 2, 4, 6, 8];

  test("with its limits at each setting, whatever they depend on", () => {
    const found = required(
      "read top = highest(y)\nrequire top within 10 V * temperature / 298.15 K ± 50 %",
      y,
      twoTemperatures,
    );
    // 10 V at 25 °C and 10 · 273.15/298.15 V at 0 °C.
    const cold = (10 * 273.15) / 298.15;
    expect(found.reading?.name).toBe("top");
    expect(found.reading?.limits).toEqual([
      { low: expect.closeTo(0.5 * cold, 9), high: expect.closeTo(1.5 * cold, 9) },
      { low: expect.closeTo(5, 9), high: expect.closeTo(15, 9) },
    ]);
  });

  test.each([
    ["top <= 9 V at temperature = 25 °C", [none(), { low: null, high: 9 }]],
    ["abs(top) <= 9 V", [within(9), within(9)]],
    ["abs(top) >= 1 V", [none(), none()]],
    ["top between 0 V and 9 V", [zeroTo(9), zeroTo(9)]],
  ])("%s", (contract, limits) => {
    const found = required(`read top = highest(y)\nrequire ${contract}`, y, twoTemperatures);
    expect(found.reading).toEqual({ name: "top", limits });
  });

  test("not where it is about anything else", () => {
    expect(required("require highest(y) <= 9 V", Y).reading).toBeNull();
    expect(required("require y <= 9 V", Y).reading).toBeNull();
    expect(required("read bend = deviation(y)\nrequire bend <= 9 V", Y).reading).toBeNull();
  });
});

function none() {
  return { low: null, high: null };
}

function within(size: number) {
  return { low: -size, high: size };
}

function zeroTo(high: number) {
  return { low: 0, high };
}
