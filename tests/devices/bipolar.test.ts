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
    const model = reference.bipolar.find(({ model }) => model.beta_f === null)!.model;
    const rows = reference.bipolar.filter((row) => row.model.beta_f === null && Math.abs(row.vce) === 1e-11);
    expect(rows.length).toBe(6);
    for (const row of rows) {
      expect(relativeError(lawOf({ ...row, model }).ic, Number(row.ic))).toBeLessThanOrEqual(2e-14);
    }
  });

  test("drops what its model leaves out exactly", () => {
    const bare = reference.bipolar.find((row) => row.model.beta_f === null)!.model;
    const law = lawOf({ model: bare, T: 310, vbe: 0.6, vce: 2 });
    expect([law.ib, law.ibF, law.ibR]).toEqual([0, 0, 0]);
    const far = lawOf({ model: bare, T: 310, vbe: 0.6, vce: 20 });
    expect(far.ic).toBe(law.ic);
    const cold = lawOf({ model: { ...bare, beta_f: 100 }, T: 250, vbe: 0.6, vce: 2 });
    expect(relativeError(cold.ib, cold.ic / 100)).toBeLessThanOrEqual(1e-9);
  });

  test("is the same, bit by bit, without high injection and with a knee beyond every current", () => {
    for (const { model, T, vbe, vce } of reference.bipolar) {
      if (model.I_knee_f !== null) continue;
      const bias = { T, vbe, vce };
      const far = { ...model, I_knee_f: Number.POSITIVE_INFINITY, I_knee_r: Number.POSITIVE_INFINITY };
      expect(lawOf({ ...bias, model: far })).toEqual(lawOf({ ...bias, model }));
    }
  });

  test("carries the square root of the current far above the knee", () => {
    // Webster, Proc. IRE 42 (1954), from memory: e^(v/2V_T) above the knee, so tenfold current takes twice the voltage.
    const { model } = reference.bipolar.find((row) => row.model.I_knee_f === 2e-3)!;
    const high = (vbe: number) => lawOf({ model, T: 298.15, vbe, vce: vbe }).ic;
    const eta = (1.380649e-23 * 298.15) / 1.602176634e-19;
    expect(high(1 + 2 * eta * Math.LN10) / high(1)).toBeCloseTo(10, 1);
  });
});
