import { describe, expect, test } from "vitest";
import { allBudgets, type Budget, budgetsOf } from "@/lib/analyses/budget";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import { solveRange } from "@/lib/analyses/sweep";
import { YIELD_TABLE, YIELDS } from "@/tests/outside/yields";
import { THERMAL_VOLTAGE_25 } from "./thermal-voltage";

function jobOf(text: string) {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  return job;
}

function budgets(text: string): readonly Budget[] {
  return budgetsOf(jobOf(text))!;
}

function effects({ parts }: Budget): Record<string, number> {
  return Object.fromEntries(
    parts.map(({ part, parameter, effect }) => [parameter === "" ? part : `${part}/${parameter}`, effect]),
  );
}

/** Readings of a text by solving it, first row. */
function readings(text: string): Record<string, number> {
  const job = jobOf(text);
  const { readings: found } = judge(job, solveRange(job, 0, job.plan.points));
  return Object.fromEntries(found.map(({ name, values }) => [name, values[0]!]));
}

/** A mirror with an amplifier and a diode: every figure of it by name, so that each can be moved by hand. */
const FIGURES = {
  R1: 10e3,
  R2: 2e3,
  Is: 0.4e-15,
  beta: 120,
  Va: 60,
  D: 1e-14,
  Rs: 5,
  offset: 0.3e-3,
  bias: 2e-8,
  drift: 150,
  Re: 8,
  factor: 3,
};

function circuit(figures: Readonly<Record<keyof typeof FIGURES, number>>, isToleranced: boolean): string {
  const value = (name: keyof typeof FIGURES, unit: string) =>
    `${figures[name]}${unit === "" ? "" : ` ${unit}`}${isToleranced ? " ± 1 %" : ""}`;
  return `title "Slopes"
knob I = 100 µA
knob temperature = 60 °C
let factor = ${value("factor", "")}
model m1 : npn { Is = ${value("Is", "A")}, beta_f = ${value("beta", "")}, Va_f = ${value("Va", "V")}, R_emitter = ${value("Re", "Ω")} }
model m2 : npn { Is = 0.4 fA, beta_f = 120, Va_f = 60 V }
model d : diode { Is = ${value("D", "A")}, Rs = ${value("Rs", "Ω")} }
model amp : opamp { gain = 1e5, offset = ${value("offset", "V")}, bias = ${value("bias", "A")} }
ground -- VS : voltage 5 V -- vcc
vcc -- IN : current I -- b
Q1 : m1 { c = o, b = b, e = ground }
Q2 : m2 { c = b, b = b, e = ground }
vcc -- R1 : resistor ${value("R1", "Ω")} { drift = ${value("drift", "ppm/K")} } -- o
A1 : amp { plus = o, minus = f, out = f }
f -- R2 : resistor ${value("R2", "Ω")} -- x -- D1 : d -- ground
L1 : law { plus = g, minus = ground, volts = tanh(f.v / 4 V) * factor * 1 V + A1.out.i * 2 kΩ }
g -- R3 : resistor 1 kΩ -- ground
sweep I from 10 µA to 300 µA, 10 per decade
show out = f.v, heat = D1.p
read slope = per_decade(f.v)
read top = highest(heat)
read knee = reach(D1.i, 1 mA)
read base = Q1.b.i at I = 100 µA
read made = highest(g.v)
read bend = lowest(deviation(x.v)) / mean(out)`;
}

describe("adjoint sensitivities", () => {
  const found = budgets(circuit(FIGURES, true));
  const keys: Readonly<Record<string, string>> = {
    R1: "R1/value",
    R2: "R2/value",
    Is: "Q1/Is",
    beta: "Q1/beta_f",
    Va: "Q1/Va_f",
    D: "D1/Is",
    Rs: "D1/Rs",
    offset: "A1/offset",
    bias: "A1/bias",
    drift: "R1/drift",
    Re: "Q1/R_emitter",
    factor: "L1/factor",
  };

  test("know every toleranced value of every part, and no other", () => {
    expect(found.map(({ reading }) => reading)).toEqual(["slope", "top", "knee", "base", "made", "bend"]);
    for (const budget of found)
      expect(Object.keys(effects(budget)).sort()).toEqual(Object.values(keys).sort());
  });

  test.each(Object.entries(keys))("of %s agree with solving the circuit again", (name, key) => {
    const figure = FIGURES[name as keyof typeof FIGURES];
    const step = 2e-4;
    const at = (by: number) => readings(circuit({ ...FIGURES, [name]: figure * (1 + by * step) }, false));
    const [far, down, up, wide] = [-2, -1, 1, 2].map(at) as [
      ReturnType<typeof at>,
      ReturnType<typeof at>,
      ReturnType<typeof at>,
      ReturnType<typeof at>,
    ];
    for (const budget of found) {
      const { reading } = budget;
      const again = (8 * (up[reading]! - down[reading]!) - (wide[reading]! - far[reading]!)) / (12 * step);
      const adjoint = 100 * effects(budget)[key]!;
      // The difference keeps about nine digits of the reading itself.
      const slack = 1e-8 * Math.abs(again) + 1e-9 * Math.abs(budget.nominal);
      expect(Math.abs(adjoint - again)).toBeLessThanOrEqual(slack);
    }
  });
});

describe("closed forms", () => {
  test("a log converter: V_T for ln Is and ln R, the offset and the bias as they stand", () => {
    const text = `let I = 1 µA
model q : npn { Is = 1 fA ± 2 % }
model amp : opamp { offset = 0 V ± 1 mV, bias = 0 A ± 1 nA }
ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 MΩ ± 3 % -- s
Q1 : q { c = s, b = ground, e = out }
A1 : amp { plus = ground, minus = s, out = out }
read v = out.v`;
    const [budget] = budgets(text);
    const found = effects(budget!);
    const V_T = THERMAL_VOLTAGE_25;
    // v = −V_T·ln((V − v_s)/(R·Is)) − … with v_s at the offset; the bias takes from the current.
    expect(found["Q1/Is"]! / (0.02 * V_T) - 1).toBeCloseTo(0, 8);
    expect(found["R1/value"]! / (0.03 * V_T) - 1).toBeCloseTo(0, 8);
    expect(Math.abs(found["A1/offset"]!) / (1e-3 * V_T) - 1).toBeCloseTo(0, 6);
    expect(Math.abs(found["A1/bias"]!) / (1e-3 * V_T) - 1).toBeCloseTo(0, 6);
  });

  test("a divider: standard deviation of first order and worst case of the table of yields", () => {
    const record = YIELD_TABLE.find(({ id }) => id === "MC5")!;
    const { text } = YIELDS.find((one) => one.record.id === "MC5")!;
    const [budget] = budgets(`${text}read v = out`);
    expect(budget!.nominal).toBe(0.5);
    expect(budget!.sigma / Number(record.first_order_sd) - 1).toBeCloseTo(0, 9);
    expect(budget!.low).toBeCloseTo(Number(record.worst_case![0]), 9);
    expect(budget!.high).toBeCloseTo(Number(record.worst_case![1]), 9);
    expect(budget!.parts.map(({ share }) => share)).toEqual([expect.closeTo(0.5, 9), expect.closeTo(0.5, 9)]);
    expect(budget!.parts[0]!.slope).toBeCloseTo(budget!.parts[0]!.effect / 0.05, 12);
  });

  test("parts that track share what they have in common", () => {
    const text = `let R = 1 kΩ ± 5 % track pair within 0.2 %
ground -- V1 : voltage 1 V ± 1 % normal 2 sigma -- a -- R1 : resistor R -- o -- R2 : resistor R -- ground
read half = o.v
read current = R1.i`;
    const [half, current] = budgets(text);
    expect(effects(half!)["track pair"]).toBeCloseTo(0, 12);
    expect(effects(half!)["R1/R"]).toBeCloseTo(-0.0005, 9);
    expect(effects(current!)["track pair"]).toBeCloseTo(-0.05 * 0.5e-3, 9);
    const { parts, sigma } = current!;
    const variance = (0.05 * 0.5e-3) ** 2 / 3 + (2 * (0.001 * 0.5e-3) ** 2) / 3 + (0.01 * 0.5e-3) ** 2 / 4;
    expect(sigma / Math.sqrt(variance) - 1).toBeCloseTo(0, 8);
    expect(parts[0]!.part).toBe("track pair");
    expect(parts.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
  });

  test("agree with the spread of the draws to first order", () => {
    const text = `title "Spread"\nlet R = 10 kΩ ± 1 %\nmodel q : npn { Is = 1 fA ± 5 % normal 1 sigma }
ground -- V1 : voltage 1 V -- in -- R1 : resistor R -- s
Q1 : q { c = s, b = ground, e = out }
model amp : opamp { }
A1 : amp { plus = ground, minus = s, out = out }
draws 4000 seed 2
read v = out.v`;
    const job = jobOf(text);
    const { readings: found } = judge(job, solveRange(job, 0, job.plan.points));
    const random = found[0]!.values.slice(1).map(Number);
    const mean = random.reduce((sum, v) => sum + v, 0) / random.length;
    const sd = Math.sqrt(random.reduce((sum, v) => sum + (v - mean) ** 2, 0) / random.length);
    // The second order of ln(1 + 5 %) widens it by a thousandth.
    expect(Math.abs(sd / budgetsOf(job)![0]!.sigma - 1)).toBeLessThan(
      4.5 / Math.sqrt(2 * random.length) + 2e-3,
    );
  });
});

describe("a budget", () => {
  test("is of every row, and of readings that are numbers", () => {
    const text = `knob k = 1 V\nground -- V1 : voltage k -- a -- R1 : resistor 1 kΩ ± 1 % -- o -- R2 : resistor 1 kΩ -- ground
sweep k from 1 V to 2 V, 3 points
sweep temperature over 0 °C, 25 °C
read top = highest(o.v)
read warm = highest(o.v) at temperature = 25 °C
read bend = deviation(o.v)`;
    const found = budgets(text);
    expect(found.map(({ reading, row, at }) => [reading, row, at[0]!.value])).toEqual([
      ["top", 0, 273.15],
      ["top", 1, 298.15],
      ["warm", 1, 298.15],
    ]);
  });

  test("is of what each requirement is about, where that is worst", () => {
    const text = `knob k = 1 V
ground -- V1 : voltage k -- a -- R1 : resistor 1 kΩ ± 2 % -- o -- R2 : resistor 1 kΩ ± 1 % -- ground
sweep k from 1 V to 2 V, 3 points
sweep temperature over 0 °C, 25 °C
read top = highest(o.v)
require o.v within k / 2 ± 1 % as "half"
require R1.i <= 0.8 mA for k in 1 V .. 1.6 V
require top <= 2 V as "top"`;
    const { requirements } = allBudgets(jobOf(text))!;
    expect(requirements.map(({ reading, nominal }) => [reading, nominal])).toEqual([
      ["half", 0.5],
      ["R1.i <= 0.8 mA for k in 1 V .. 1.6 V", 0.75e-3],
      ["top", 1],
    ]);
    const [half, current, top] = requirements;
    expect(half!.parts.map(({ part, share }) => [part, share])).toEqual([
      ["R1", expect.closeTo(0.8, 9)],
      ["R2", expect.closeTo(0.2, 9)],
    ]);
    expect(effects(current!)["R1/value"]).toBeCloseTo((-0.02 * 0.75e-3) / 2, 12);
    expect(effects(top!)["R2/value"]).toBeCloseTo(0.01 / 2, 9);
  });

  test("is empty where nothing has a tolerance, and absent where the run is too large", () => {
    const plain =
      "knob k = 1 V\nground -- V1 : voltage k -- a -- R1 : resistor 1 kΩ -- ground\nread top = highest(a.v)\n";
    expect(budgets(plain)).toEqual([]);
    const large = `${plain.replace("1 kΩ", "1 kΩ ± 1 %")}sweep k from 1 V to 2 V, 1000000 points`;
    expect(budgetsOf(jobOf(large))).toBeNull();
  });
});
