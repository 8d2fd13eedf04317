import { renderToStaticMarkup } from "react-dom/server";
import { expect, test } from "vitest";
import { Prose } from "@/app/docs/_parts/prose";
import { wholeQuantities } from "@/app/docs/_parts/whole-quantities";

test.each([
  ["at 1 mA it costs 1.3 mV, 5 %", "at 1\u00a0mA it costs 1.3\u00a0mV, 5\u00a0%"],
  ["from 10 °C to 40 °C.", "from 10\u00a0°C to 40\u00a0°C."],
  ["-2 mV/K and 20 ppm/K", "-2\u00a0mV/K and 20\u00a0ppm/K"],
  ["the 2 Amplifiers of 3 volts, 200 draws, 5 As", "the 2 Amplifiers of 3 volts, 200 draws, 5 As"],
])("the numbers of %s stay with their units, and nothing else clings", (sentence, kept) => {
  expect(wholeQuantities(sentence)).toBe(kept);
});

test("text of a netlist keeps the blanks that it is copied with", () => {
  const page = renderToStaticMarkup(<Prose>{"at 25 °C write `10 mV`"}</Prose>);
  expect(page).toContain("25\u00a0°C");
  expect(page).toContain("<code>10 mV</code>");
});
