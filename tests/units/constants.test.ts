import { expect, test } from "vitest";
import {
  BOLTZMANN,
  ELEMENTARY_CHARGE,
  ROOM_TEMPERATURE,
  thermalVoltage,
  ZERO_CELSIUS,
} from "@/lib/units/constants";
import reference from "@/tests/reference/constants.json";

// Source of the figures: SI Brochure, 9th ed. (BIPM 2019), section 2.2, as cited in tests/reference/constants.json;
// exact by definition, so binary64 must agree to 2 ulp (relative 4.5e-16).
const TWO_ULP = 4.5e-16;

test("k and q are the exact SI values", () => {
  expect(BOLTZMANN).toBe(Number(reference.k_J_per_K));
  expect(ELEMENTARY_CHARGE).toBe(Number(reference.q_C));
  expect(Math.abs(thermalVoltage(1) / Number(reference.k_over_q_V_per_K) - 1)).toBeLessThanOrEqual(TWO_ULP);
});

test.each(reference.temperatures)("thermal voltage and its decades at $label", (at) => {
  const voltage = thermalVoltage(Number(at.T_K));
  expect(Math.abs(voltage / Number(at.VT_V) - 1)).toBeLessThanOrEqual(TWO_ULP);
  const perDecade = voltage * Math.LN10 * 1000;
  expect(Math.abs(perDecade / Number(at.mV_per_decade) - 1)).toBeLessThanOrEqual(2 * TWO_ULP);
  const perOctave = voltage * Math.LN2 * 1000;
  expect(Math.abs(perOctave / Number(at.mV_per_octave) - 1)).toBeLessThanOrEqual(2 * TWO_ULP);
});

test("25 °C stands 298.15 K above the absolute zero", () => {
  expect(ROOM_TEMPERATURE).toBe(ZERO_CELSIUS + 25);
});
