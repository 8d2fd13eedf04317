import { describe, expect, test } from "vitest";
import { diodeAt, diodeLaw, diodeVoltage } from "@/lib/devices/diode";
import { junctionStep } from "@/lib/devices/junction-step";

const at = diodeAt({ Is: 1e-15, n: 1, Eg: null, x: null, T0: 298.15 }, null, 298.15);
const resistive = { ...at, Rs: 3 };

function stepFrom(diode: typeof at, v: number, target: number) {
  const law = { i: 0, g: 0 };
  diodeLaw(diode, v, law);
  return { next: junctionStep(diode, v, law.i, law.g, target), law };
}

describe("the current-matching step", () => {
  test.each([
    ["without", at],
    ["with", resistive],
  ])(
    "lands where the junction %s resistance carries the current that the linear model asks for",
    (_, diode) => {
      for (const [v, target] of [
        [0, 5],
        [0.5, 0.7],
        [0.62, 40],
        [0.65, 0.64],
      ] as const) {
        const { next, law } = stepFrom(diode, v, target);
        const reached = { i: 0, g: 0 };
        diodeLaw(diode, next, reached);
        expect(reached.i / (law.i + law.g * (target - v))).toBeCloseTo(1, 11);
      }
    },
  );

  test("is v + η·ln(1 + Δv/η) forward, the published form", () => {
    const { next } = stepFrom(at, 0.5, 0.9);
    expect(next).toBeCloseTo(0.5 + at.eta * Math.log(1 + 0.4 / at.eta), 13);
  });

  test("finds a forced current in one step from anywhere forward", () => {
    const wanted = diodeVoltage(at, 2e-4);
    for (const v of [0.2, 0.5, 0.69]) {
      const law = { i: 0, g: 0 };
      diodeLaw(at, v, law);
      const next = junctionStep(at, v, law.i, law.g, v + (2e-4 - law.i) / law.g);
      expect(next).toBeCloseTo(wanted, 9);
    }
  });

  test("lets the current fall tenfold at most where the model asks for less, or as far as the model itself does", () => {
    const slow = stepFrom(at, 0.7, 0.7 - 1.5 * at.eta).next;
    expect(slow).toBeCloseTo(0.7 - Math.LN10 * at.eta, 9);
    expect(stepFrom(at, 0.7, 0.7 - 4 * at.eta).next).toBe(0.7 - 4 * at.eta);
  });

  test("does not overflow however far the target", () => {
    expect(stepFrom(at, 0.6, 1e12).next).toBeLessThan(2);
    expect(stepFrom(at, -50, 1e12).next).toBeLessThan(2);
  });

  test("takes reverse targets whole, since the law is flat there", () => {
    expect(stepFrom(at, 0.01, -4).next).toBe(-4);
    expect(stepFrom(at, -3, -1).next).toBe(-1);
    expect(stepFrom(at, -1, -3).next).toBe(-3);
  });
});
