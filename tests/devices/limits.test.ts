import { describe, expect, test } from "vitest";
import { KNEE, limited, limitStep } from "@/lib/devices/limits";
import { relativeError } from "@/tests/devices/closeness";
import reference from "@/tests/reference/device-laws.json";

// Source of the figures: tests/reference/device-laws.py, the stated law with 60 digits and more; its slope also by differences.

function lawOf(low: number | null, high: number | null, s: number) {
  const law = { v: 0, slope: 0 };
  limited({ low, high }, s, law);
  return law;
}

describe("the limits of an output", () => {
  test("hold the voltage of 60 digits to a few roundings of the limits", () => {
    for (const { low, high, s, v } of reference.limits) {
      const size = Math.abs(Number(v)) + Math.abs(low ?? 0) + Math.abs(high ?? 0) + KNEE;
      const error = Math.abs(lawOf(low, high, s).v - Number(v));
      expect(error, `${low} … ${high} at ${s}`).toBeLessThanOrEqual(4 * 2 ** -53 * size);
    }
  });

  test("have the slope of 60 digits to 1e-13 beside 1", () => {
    for (const { low, high, s, slope } of reference.limits) {
      expect(Math.abs(lawOf(low, high, s).slope - Number(slope))).toBeLessThanOrEqual(
        1e-13 * Number(slope) + 1e-300,
      );
    }
  });

  test("drop a limit that is not given exactly", () => {
    for (const s of [-1e7, -3, 0.1, 4, 1e9]) {
      expect(lawOf(null, null, s)).toEqual({ v: s, slope: 1 });
      expect(lawOf(null, 2, s)).toEqual(lawOf(-1e12, 2, s));
    }
  });

  test("are 0.05 V · ln 2 short of a limit where the output would just reach it, by hand", () => {
    expect(relativeError(lawOf(null, 12, 12).v, 12 - 0.05 * Math.LN2)).toBeLessThanOrEqual(1e-15);
    expect(lawOf(null, 12, 12).slope).toBe(0.5);
  });
});

describe("the step over the limits", () => {
  const limits = { low: -1, high: 2 };
  const step = (s: number, target: number, mayJump = true) => limitStep(limits, s, target, mayJump);

  test("rests on a knee that it would cross, the nearer one first", () => {
    expect(step(0, 1e6)).toBe(2);
    expect(step(0, -1e6)).toBe(-1);
    expect(step(1e6, 0)).toBe(2);
    expect(step(1e6, -5, false)).toBe(2);
    expect(step(-1e6, 5, false)).toBe(-1);
  });

  test("goes from beyond one limit to beyond the other where it may jump", () => {
    expect(step(1e6, -5)).toBe(-5);
    expect(step(-1e6, 5)).toBe(5);
  });

  test("goes from a knee wherever it is asked to, and freely between", () => {
    expect(step(2, 1e6)).toBe(1e6);
    expect(step(2, 0)).toBe(0);
    expect(step(2, -7)).toBe(-1);
    expect(step(0.5, 1.9)).toBe(1.9);
    expect(limitStep({ low: null, high: null }, 0, 1e9, false)).toBe(1e9);
  });
});
