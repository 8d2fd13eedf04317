import { expect, test } from "vitest";
import { valueAtPlace } from "@/app/_components/preview/value-at-place";
import { previewOf } from "./solve-preview";

/** 10 V over 1 kΩ and 4 kΩ in a block, twice; a current turned by a knob through a diode. */
const TEXT = `title "Values"
knob I_in = 1 mA
let  half = I_in / 2
model d : diode { Is = 1 fA }
block divider(top) {
  top -- R1 : resistor 1 kΩ -- tap -- R2 : resistor 4 kΩ -- ground
}
ground -- V : voltage 10 V -- a
A : divider { top = a }
B : divider { top = a }
ground -- IS : current I_in -- s -- D : d -- ground
sweep I_in from 1 mA to 3 mA, 3 points
sweep temperature over 25 °C, 50 °C
show s.v
`;

async function told(names: readonly string[], place: number, turned = new Map<string, number>()) {
  const { answers } = await previewOf(TEXT, turned, place);
  const outline = answers.find((one) => one.kind === "outline")!.outline;
  const figures = answers.find((one) => one.kind === "figures")!.figures;
  return names.map((name) => valueAtPlace(outline, figures, name)?.replaceAll("\u202f", " ") ?? null);
}

test("nets, elements, knobs and lets have their values at the place that is read", async () => {
  expect(await told(["a", "A.tap", "A.R1", "I_in", "half", "temperature"], 1)).toEqual([
    "10.00 V at I_in 2 mA, 25 °C",
    "8.000 V at I_in 2 mA, 25 °C",
    "v 2.000 V, i 2.000 mA, p 4.000 mW at I_in 2 mA, 25 °C",
    "2.000 mA at I_in 2 mA, 25 °C",
    "1.000 mA at I_in 2 mA, 25 °C",
    "25 °C at I_in 2 mA, 25 °C",
  ]);
});

test("a name inside a block is told for each instance, a model for the elements that follow it", async () => {
  const [tap, model] = await told(["tap", "d"], 2, new Map([["temperature", 323.15]]));
  expect(tap).toBe("A.tap: 8.000 V; B.tap: 8.000 V at I_in 3 mA, 50 °C");
  // 27.85 mV is k·323.15 K/q; times ln(3 mA / 1 fA) = 28.73: 0.800 V.
  expect(model).toMatch(/^D: v 800\.\d mV, i 3\.000 mA, p 2\.40\d mW at I_in 3 mA, 50 °C$/);
});

test("what is no value, or is not solved, is not told", async () => {
  expect(await told(["divider", "nothing", "ground"], 0)).toEqual([null, null, null]);
  // A diode that takes 1 mA backwards has no answer.
  const reversed = TEXT.replace("from 1 mA to 3 mA", "from -1 mA to 3 mA");
  const { answers } = await previewOf(reversed, new Map(), 0);
  const outline = answers.find((one) => one.kind === "outline")!.outline;
  const figures = answers.find((one) => one.kind === "figures")!.figures;
  expect(valueAtPlace(outline, figures, "s")).toBe(null);
  expect(valueAtPlace(outline, figures, "I_in")).toMatch(/^−1/);
});
