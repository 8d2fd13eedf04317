import { describe, expect, test } from "vitest";
import { breakdownAt, breakdownLaw, breakdownStep } from "@/lib/devices/breakdown";
import { diodeAt, diodeLaw } from "@/lib/devices/diode";
import { breakdownDoubt, breakdownSpread } from "@/lib/devices/diode-proof";
import { thermalVoltage } from "@/lib/units/constants";
import { relativeError, worst } from "@/tests/devices/closeness";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, both exponentials with 60 digits, behind Rs by bisection.

type Row = (typeof reference.breakdown)[number];

function diodeOf(row: Row) {
  const diode = diodeAt({ Is: row.Is, n: row.n, Eg: null, x: null, T0: 298.15 }, row.Rs, row.T);
  const eta = row.n_breakdown * thermalVoltage(row.T);
  return { diode, reverse: breakdownAt(diode, row.I_breakdown, row.V_breakdown, eta) };
}

function lawOf(row: Row, V = row.V) {
  const { diode, reverse } = diodeOf(row);
  const law = { i: 0, g: 0 };
  breakdownLaw(diode, reverse, V, law);
  return law;
}

describe("the diode with breakdown", () => {
  test("carries the current of 60 digits to 1e-12, from −1000 V to 100 V", () => {
    const found = worst(reference.breakdown, (row) =>
      Math.abs(lawOf(row).i - Number(row.i)) < 1e-40 ? 0 : relativeError(lawOf(row).i, Number(row.i)),
    );
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-12);
  });

  test("has the slope of 60 digits to 1e-11", () => {
    const found = worst(reference.breakdown, (row) => relativeError(lawOf(row).g, Number(row.g)));
    expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(1e-11);
  });

  test("lies as close to the 60 digits as its bound on rounding says", () => {
    for (const row of reference.breakdown) {
      const { diode, reverse } = diodeOf(row);
      const law = lawOf(row);
      const bound = breakdownDoubt(diode, reverse, row.V, law);
      expect(Math.abs(law.i - Number(row.i)), JSON.stringify(row)).toBeLessThanOrEqual(bound);
      // A bound that is much wider than the error proves nothing.
      expect(bound).toBeLessThanOrEqual(1e-10 * (Math.abs(law.i) + row.Is + law.g * 1e-3));
    }
  });

  test("changes its slope by no more than its bound says", () => {
    for (const row of reference.breakdown) {
      const { diode, reverse } = diodeOf(row);
      const { g } = lawOf(row);
      for (const delta of [1e-9, 1e-4, 0.01]) {
        const bound = breakdownSpread(diode, reverse, row.V, g, delta);
        for (const share of [-1, -0.3, 0.5, 1]) {
          const moved = lawOf(row, row.V + share * delta).g;
          expect(Math.abs(moved - g), JSON.stringify(row)).toBeLessThanOrEqual(bound);
        }
      }
    }
  });

  test("is the diode without breakdown where the breakdown lies beyond every voltage", () => {
    for (const row of reference.diode) {
      if (row.V < -1 || row.V > 20) continue;
      const diode = diodeAt({ Is: row.Is, n: row.n, Eg: null, x: null, T0: 298.15 }, null, row.T);
      if (row.V / diode.eta > 600) continue;
      const [plain, far] = [
        { i: 0, g: 0 },
        { i: 0, g: 0 },
      ];
      diodeLaw(diode, row.V, plain);
      breakdownLaw(diode, breakdownAt(diode, 1e-3, 1e6, diode.eta), row.V, far);
      expect(far).toEqual(plain);
    }
  });
});

describe("the step of a junction with breakdown", () => {
  const zener = diodeOf(reference.breakdown.find((row) => row.Rs === null && row.V_breakdown === 5.1)!);

  function stepFrom(v: number, target: number): number {
    const law = { i: 0, g: 0 };
    breakdownLaw(zener.diode, zener.reverse, v, law);
    return breakdownStep(zener.diode, zener.reverse, v, law.i, law.g, target);
  }

  test("does not run deep into breakdown from either side", () => {
    for (const v of [0.6, 0, -3, -5]) {
      expect(stepFrom(v, -1e9)).toBeGreaterThan(-7);
      expect(stepFrom(v, -1e9)).toBeLessThan(-4.8);
    }
  });

  test("does not run into the forward exponential out of breakdown", () => {
    expect(stepFrom(-5.2, 1e9)).toBeLessThan(2);
    expect(stepFrom(-5.2, 1e9)).toBeGreaterThan(0.3);
  });

  test("matches the current in breakdown as it does forward", () => {
    const law = { i: 0, g: 0 };
    breakdownLaw(zener.diode, zener.reverse, -5.1, law);
    const next = breakdownStep(zener.diode, zener.reverse, -5.1, law.i, law.g, -5.4);
    const reached = { i: 0, g: 0 };
    breakdownLaw(zener.diode, zener.reverse, next, reached);
    expect(reached.i / (law.i + law.g * (-5.4 + 5.1))).toBeCloseTo(1, 3);
  });

  test("takes steps between the two knees whole", () => {
    expect(stepFrom(-3, -1)).toBe(-1);
    expect(stepFrom(-1, -4)).toBe(-4);
  });

  test("comes to rest at its target from wherever the breakdown begins", () => {
    // A junction whose current stands still on the way makes Newton's method wait for it for ever.
    const { diode, reverse } = zener;
    for (const from of [1e-9, 1e-7, 1e-6, 2e-6, 1e-5, 1e-3]) {
      const v = -reverse.volts - reverse.eta * Math.log(from / reverse.amperes);
      for (const by of [-5, -1.4, -0.3, 0.3, 1.4, 5]) {
        const target = v + by * reverse.eta;
        let at = v;
        for (let step = 0; step < 12; step++) at = stepFrom(at, target);
        expect(Math.abs(at - target), `${from} A, ${by}`).toBeLessThanOrEqual(0.01 * diode.eta);
      }
    }
  });
});
