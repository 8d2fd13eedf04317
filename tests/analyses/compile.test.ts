import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { placeOnAxes } from "@/lib/analyses/plan";

const EXAMPLES = readdirSync("examples")
  .filter((name) => name.endsWith(".swn"))
  .map((name) => [name, readFileSync(`examples/${name}`, "utf8")] as const);

describe("compiling", () => {
  test.each(EXAMPLES)("gives a job and no diagnostic: %s", (_, text) => {
    const { job, diagnostics } = compile(text);
    expect(diagnostics).toEqual([]);
    expect(job).not.toBeNull();
  });

  test("gives no job where the text is wrong, nor where the wiring is", () => {
    const unknown = compile("ground -- V1 : voltage V_in -- a -- R1 : resistor 1 kΩ -- ground\nshow a.v");
    expect(unknown.job).toBeNull();
    expect(unknown.diagnostics.map(({ code }) => code)).toEqual(["NAM3"]);
    const loop = compile(
      "ground -- V1 : voltage 1 V -- a\nground -- V2 : voltage 2 V -- a\na -- R1 : resistor 1 kΩ -- ground\nshow a.v",
    );
    expect(loop.job).toBeNull();
    expect(loop.diagnostics.map(({ code }) => code)).toEqual(["WIR3"]);
  });

  test("gives a job beside warnings, all diagnostics in the order of the text", () => {
    const { job, diagnostics } = compile(
      "model amp : opamp { gain = 1e5 }\nground -- V1 : voltage 1 V -- a -- R1 : resistor 1 kΩ -- ground\nA1 : amp { plus = a, minus = ground, out = b }\nb -- R2 : resistor 1 kΩ -- ground",
    );
    expect(job).not.toBeNull();
    expect(diagnostics.map(({ code, severity }) => `${code} ${severity}`)).toEqual([
      "WIR6 warning",
      "PLN8 warning",
    ]);
  });
});

describe("the plan", () => {
  const { job } = compile(`title "Two axes"
knob V = 1 V
ground -- V1 : voltage V -- a -- R1 : resistor 1 kΩ { drift = 50 ppm/K } -- ground
sweep V from 1 mV to 1 V, 2 per decade
sweep temperature over 10 °C, 40 °C
show a.v, load = R1.i, R1.p / 1 W`);
  const { plan } = job!;

  test("is plain data: what JSON carries is all of it", () => {
    expect(JSON.parse(JSON.stringify(plan))).toEqual(plan);
  });

  test("names axes, traces and unknowns with coherent units, the first sweep first", () => {
    expect(plan.title).toBe("Two axes");
    expect(plan.axes.map(({ knob, unit, scale, values }) => [knob, unit, scale, values.length])).toEqual([
      ["V", "V", "logarithmic", 7],
      ["temperature", "K", "list", 2],
    ]);
    expect(plan.axes[1]!.values).toEqual([283.15, 313.15]);
    expect(plan.points).toBe(14);
    expect(plan.traces).toEqual([
      { name: "a.v", unit: "V" },
      { name: "load", unit: "A" },
      { name: "R1.p / 1 W", unit: "1" },
    ]);
    expect(plan.unknowns).toEqual([
      { name: "a.v", unit: "V" },
      { name: "V1.i", unit: "A" },
    ]);
  });

  test("counts points with the first axis fastest", () => {
    expect([0, 1, 6, 7, 13].map((point) => placeOnAxes(plan, point))).toEqual([
      [0, 0],
      [1, 0],
      [6, 0],
      [0, 1],
      [6, 1],
    ]);
  });

  test("has one point and no axis where nothing is swept", () => {
    const single = compile("ground -- V1 : voltage 1 V -- a -- R1 : resistor 1 Ω -- ground\nshow a.v").job!;
    expect([single.plan.points, single.plan.axes, placeOnAxes(single.plan, 0)]).toEqual([1, [], []]);
  });
});
