import { expect, test } from "vitest";
import { examine } from "@/app/_components/editor/examine";

const CONVERTER = `title "Converter"
knob I_in = 1 µA
model d : diode { Is = 2 fA }
model amp : opamp { }
ground -- IS : current I_in -- s
s -- D1 : d -- out
A1 : amp { plus = ground, minus = s, out = out }
sweep I_in from 1 nA to 1 mA, 100 per decade
sweep temperature over 10 °C, 40 °C
show v_log = out.v
`;

test("the plan of a text that is right: sweeps, points, traces, knobs and what is solved for", () => {
  const { diagnostics, plan } = examine(CONVERTER);
  expect(diagnostics).toEqual([]);
  expect(plan).toMatchObject({
    title: "Converter",
    points: 601 * 2,
    traces: [{ name: "v_log", unit: "V" }],
    elements: 3,
    unknowns: 3,
  });
  expect(plan!.sweeps.map(({ knob, unit, scale, count }) => [knob, unit, scale, count])).toEqual([
    ["I_in", "A", "logarithmic", 601],
    ["temperature", "K", "list", 2],
  ]);
  expect(plan!.knobs.find(({ name }) => name === "I_in")).toEqual({ name: "I_in", unit: "A", value: 1e-6 });
});

test("a long sweep is sent as at most 200 values, both ends among them", () => {
  const values = examine(CONVERTER).plan!.sweeps[0]!.values;
  expect(values).toHaveLength(200);
  expect(values[0]).toBeCloseTo(1e-9, 20);
  expect(values.at(-1)).toBeCloseTo(1e-3, 14);
  expect([...values].sort((a, b) => a - b)).toEqual(values);
});

test("a text with an error has no plan; one with a warning has both", () => {
  const wrong = examine(CONVERTER.replace("out.v", "uot.v"));
  expect(wrong.plan).toBeNull();
  expect(wrong.diagnostics.map(({ severity }) => severity)).toContain("error");
  const bare = examine(CONVERTER.replace("show v_log = out.v\n", ""));
  expect(bare.plan).not.toBeNull();
  expect(bare.diagnostics.map(({ severity }) => severity)).toEqual(["warning"]);
});
