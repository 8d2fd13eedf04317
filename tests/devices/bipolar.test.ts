import { describe, expect, test } from "vitest";
import { type BipolarTerms, bipolarAt, bipolarLaw } from "@/lib/devices/bipolar";
import { relativeError, worst } from "@/tests/devices/closeness";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, the published laws with 60 digits, slopes by differences.

type Bias = { readonly model: BipolarTerms; readonly T: number; readonly vbe: number; readonly vce: number };

function lawOf({ model, T, vbe, vce }: Bias) {
  const law = { ic: 0, ib: 0, icF: 0, icR: 0, ibF: 0, ibR: 0 };
  bipolarLaw(bipolarAt(model, T), vbe, vbe - vce, vce, law);
  return law;
}

describe("the transistor", () => {
  // v_bc = v_be − v_ce is rounded before the exponential: 3e-15 through 1/V_T, which the base current's difference may magnify.
  test.each(["ic", "ib", "icF", "icR", "ibF", "ibR"] as const)("has the %s of 60 digits to 1e-12", (name) => {
    const found = worst(reference.bipolar, (row) => {
      const [actual, wanted] = [lawOf(row)[name], Number(row[name])];
      return Math.abs(actual - wanted) < 1e-40 ? 0 : relativeError(actual, wanted);
    });
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-12);
  });

  test("keeps the digits of its current 10 pV from saturation's end", () => {
    const model = reference.bipolar.find((row) => row.model.beta_f === null)!.model;
    const rows = reference.bipolar.filter((row) => row.model.beta_f === null && Math.abs(row.vce) === 1e-11);
    expect(rows.length).toBe(6);
    for (const row of rows) {
      expect(relativeError(lawOf({ ...row, model }).ic, Number(row.ic))).toBeLessThanOrEqual(2e-14);
    }
  });

  test("drops what its model leaves out exactly", () => {
    const bare = {
      Is: 1e-15,
      n: 1,
      Eg: null,
      x: null,
      T0: 298.15,
      beta_f: null,
      beta_r: null,
      Va_f: null,
      Va_r: null,
      beta_power: null,
    };
    const law = lawOf({ model: bare, T: 310, vbe: 0.6, vce: 2 });
    expect([law.ib, law.ibF, law.ibR]).toEqual([0, 0, 0]);
    const far = lawOf({ model: bare, T: 310, vbe: 0.6, vce: 20 });
    expect(far.ic).toBe(law.ic);
    const cold = lawOf({ model: { ...bare, beta_f: 100 }, T: 250, vbe: 0.6, vce: 2 });
    expect(relativeError(cold.ib, cold.ic / 100)).toBeLessThanOrEqual(1e-9);
  });
});
