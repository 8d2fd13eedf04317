import { describe, expect, test } from "vitest";
import { diodeAt, diodeLaw, diodeVoltage } from "@/lib/devices/diode";
import { saturationCurrent } from "@/lib/devices/saturation";
import { relativeError, worst } from "@/tests/devices/closeness";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, the published laws with 60 digits, slopes by differences.

const plain = { n: 1, Eg: null, x: null, T0: 298.15 };

function lawOf(row: { Is: number; n: number; Rs: number | null; T: number; V: number }) {
  const law = { i: 0, g: 0 };
  diodeLaw(diodeAt({ ...plain, Is: row.Is, n: row.n }, row.Rs, row.T), row.V, law);
  return law;
}

describe("the saturation current", () => {
  test("follows temperature to 1e-13", () => {
    const found = worst(reference.saturation, (row) =>
      relativeError(saturationCurrent(row, row.T), Number(row.value)),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-13);
  });

  test("is exactly Is at T0, and everywhere where no term is given", () => {
    expect(saturationCurrent({ Is: 3e-15, n: 1.3, Eg: 1.12, x: 3, T0: 311 }, 311)).toBe(3e-15);
    expect(saturationCurrent({ ...plain, Is: 3e-15 }, 400)).toBe(3e-15);
  });
});

describe("the diode", () => {
  // V/(n·V_T) is rounded once before the exponential, which costs |V/(n·V_T)| half ulps; 1e-13 allows for 40 V_T · 10.
  test("carries the current of 60 digits to 1e-13, from reverse to 40,000 thermal voltages", () => {
    const found = worst(reference.diode, (row) =>
      Math.abs(lawOf(row).i - Number(row.i)) < 1e-60 ? 0 : relativeError(lawOf(row).i, Number(row.i)),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-13);
  });

  test("has the slope of 60 digits to 1e-12", () => {
    const found = worst(reference.diode, (row) => relativeError(lawOf(row).g, Number(row.g)));
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-12);
  });

  test("without a series resistance drops the term exactly", () => {
    for (const V of [-5, -1e-3, 0.1, 0.7]) {
      const without = lawOf({ Is: 1e-14, n: 1, Rs: null, T: 300, V });
      expect(lawOf({ Is: 1e-14, n: 1, Rs: 0, T: 300, V })).toEqual(without);
    }
  });

  test.each([null, 0.6, 1e5])("gives back the voltage of a current, Rs = %s Ω", (Rs) => {
    const at = diodeAt({ ...plain, Is: 1e-14 }, Rs, 300);
    const law = { i: 0, g: 0 };
    for (const i of [-9e-15, 0, 1e-20, 1e-12, 1e-6, 0.1]) {
      diodeLaw(at, diodeVoltage(at, i), law);
      expect(Math.abs(law.i - i)).toBeLessThanOrEqual(1e-13 * Math.abs(i) + 1e-28);
    }
  });
});
