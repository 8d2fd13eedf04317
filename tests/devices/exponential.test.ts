import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { exp, expm1 } from "@/lib/units/exponential";
import { worst } from "./closeness";

interface Row {
  readonly y: number;
  readonly exp: string;
  readonly expm1: string;
}

/** Reference: mpmath at 120 digits, tests/reference/exponential.py. */
const ROWS: readonly Row[] = JSON.parse(readFileSync("tests/reference/exponential.json", "utf8"));

/** The error of a double in units in its last place against 40 digits, the digits beyond a double counted by a second one. */
function unitsOff(actual: number, wanted: string): number {
  const near = Number(wanted);
  if (near === 0) return actual === 0 ? 0 : Number.POSITIVE_INFINITY;
  const unit = 2 ** (Math.floor(Math.log2(Math.abs(near))) - 52);
  return Math.abs(actual - near) / unit + 0.5;
}

describe("the exponential", () => {
  test("agrees with mpmath from −708 to 709.5", () => {
    const { error, row } = worst(ROWS, (one) => unitsOff(exp(one.y), one.exp));
    expect(error, `at ${row.y}`).toBeLessThanOrEqual(1.5);
  });

  test("less 1 agrees with mpmath, near 0 too", () => {
    const { error, row } = worst(ROWS, (one) => unitsOff(expm1(one.y), one.expm1));
    expect(error, `at ${row.y}`).toBeLessThanOrEqual(2.5);
  });

  test("keeps to its ends", () => {
    expect([exp(0), expm1(0)]).toEqual([1, 0]);
    expect([exp(710), exp(Number.POSITIVE_INFINITY), expm1(710)]).toEqual(
      Array(3).fill(Number.POSITIVE_INFINITY),
    );
    expect([exp(-746), exp(Number.NEGATIVE_INFINITY)]).toEqual([0, 0]);
    expect([expm1(-41), expm1(Number.NEGATIVE_INFINITY)]).toEqual([-1, -1]);
    expect([exp(Number.NaN), expm1(Number.NaN)]).toEqual([Number.NaN, Number.NaN]);
    expect(exp(709.76)).toBeLessThan(Number.POSITIVE_INFINITY);
    expect(exp(-743)).toBeGreaterThan(0);
  });

  test("never falls where its argument rises by a step of the table", () => {
    for (let n = -32; n <= 32; n++) {
      const edge = ((n + 0.5) * Math.LN2) / 32;
      expect(exp(edge + 1e-15)).toBeGreaterThanOrEqual(exp(edge - 1e-15));
      expect(expm1(edge + 1e-15)).toBeGreaterThanOrEqual(expm1(edge - 1e-15));
    }
  });
});
