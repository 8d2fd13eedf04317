import { expect, test } from "vitest";
import { drivenCurrent } from "@/lib/devices/current";
import { gainMismatch } from "@/lib/devices/gain";
import { biasInto, offsetAt, opampMismatch } from "@/lib/devices/opamp";
import { conductance } from "@/lib/devices/resistor";
import { voltageMismatch } from "@/lib/devices/voltage";

test("a resistor drifts from 25 °C, and without drift not at all", () => {
  expect(conductance(1000, null, 400)).toBe(1 / 1000);
  expect(conductance(1000, 100e-6, 298.15)).toBe(1 / 1000);
  // 1 kΩ · (1 + 100 ppm/K · 50 K) = 1005 Ω, by hand.
  expect(conductance(1000, 100e-6, 348.15)).toBeCloseTo(1 / 1005, 15);
});

test("a voltage element raises the potential from left to right", () => {
  // Left at 1 V, right at 4 V, 3 V element: nothing amiss.
  expect(voltageMismatch(1 - 4, 3)).toBe(0);
  expect(voltageMismatch(1 - 4, 2)).toBe(1);
});

test("a current element drives the share of its value that acts", () => {
  expect(drivenCurrent(2e-6, 1)).toBe(2e-6);
  expect(drivenCurrent(2e-6, 0.25)).toBe(5e-7);
});

test("an amplifier of gain A holds vout = A·(difference + offset); an ideal one no difference but the offset", () => {
  expect(opampMismatch(2e-5, 1e-5, 3, 1 / 1e5)).toBeCloseTo(0, 18);
  expect(opampMismatch(-1e-4, 1e-4, 7, 0)).toBe(0);
});

test("an offset drifts from its temperature, and without drift not at all", () => {
  expect(offsetAt(1e-3, null, 298.15, 400)).toBe(1e-3);
  expect(offsetAt(1e-3, 5e-6, 310, 310)).toBe(1e-3);
  // 1 mV + 5 µV/K · 40 K = 1.2 mV, by hand.
  expect(offsetAt(1e-3, 5e-6, 298.15, 338.15)).toBeCloseTo(1.2e-3, 15);
});

test("bias currents differ by their difference and have their mean", () => {
  expect(biasInto(1, 1e-8, 4e-9)).toBeCloseTo(1.2e-8, 20);
  expect(biasInto(-1, 1e-8, 4e-9)).toBeCloseTo(8e-9, 20);
  expect(biasInto(1, 1e-8, 0)).toBe(1e-8);
});

test("a gain holds vout = ratio·difference", () => {
  expect(gainMismatch(-6, 2, -3)).toBe(0);
  expect(gainMismatch(1, 2, 3)).toBe(-5);
});
