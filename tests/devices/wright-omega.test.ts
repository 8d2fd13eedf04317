import { expect, test } from "vitest";
import { wrightOmega } from "@/lib/devices/wright-omega";
import { relativeError, worst } from "@/tests/devices/closeness";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, w + ln w = z solved with 60 digits.

test("agrees with 60 digits to 4 ulp from −700 to 1e300", () => {
  const found = worst(reference.omega, ({ z, w }) => relativeError(wrightOmega(z), Number(w)));
  expect(found.error, JSON.stringify(found.row)).toBeLessThanOrEqual(4 * 2.3e-16);
});

test("solves its own equation everywhere between", () => {
  for (let z = -30; z <= 60; z += 0.0173) {
    const w = wrightOmega(z);
    // A rounding of w moves w + ln w by (w + 1) ulp, one of ln w by |ln w| ulp.
    expect(Math.abs(w + Math.log(w) - z)).toBeLessThanOrEqual(4.5e-16 * (w + 1 + Math.abs(z)));
  }
});

test("has its limits at the ends", () => {
  expect(wrightOmega(Number.NEGATIVE_INFINITY)).toBe(0);
  expect(wrightOmega(Number.POSITIVE_INFINITY)).toBe(Number.POSITIVE_INFINITY);
  expect(wrightOmega(Number.NaN)).toBeNaN();
});
