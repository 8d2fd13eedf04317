import { describe, expect, test } from "vitest";
import { type Counter, fraction, type Key, philox } from "@/lib/analyses/philox";

/**
 * Known answers published with the generator's reference code (Salmon, Moraes, Dror and Shaw, SC11 2011; its file of known
 * answers, from memory): all bits 0, all bits 1, the digits of π.
 */
const KNOWN: readonly (readonly [Counter, Key, string])[] = [
  [[0, 0, 0, 0], [0, 0], "6627e8d5 e169c58d bc57ac4c 9b00dbd8"],
  [
    [0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff],
    [0xffffffff, 0xffffffff],
    "408f276d 41c83b0e a20bc7c6 6d5451fd",
  ],
  [
    [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
    [0xa4093822, 0x299f31d0],
    "d16cfe09 94fdcceb 5001e420 24126ea1",
  ],
];

describe("Philox4x32-10", () => {
  test.each(KNOWN)("answers %j under %j as published", (counter, key, words) => {
    const answer = philox(counter, key).map((word) => word.toString(16).padStart(8, "0"));
    expect(answer.join(" ")).toBe(words);
  });
});

describe("a fraction of two words", () => {
  test("lies strictly between 0 and 1, at its ends too", () => {
    expect(fraction(0, 0)).toBe(2 ** -53);
    expect(fraction(0xffffffff, 0xffffffff)).toBe(1 - 2 ** -53);
    expect(fraction(0x80000000, 0)).toBe(0.5 + 2 ** -53);
  });

  test("has the mean and variance of a uniform law within 4.5 standard errors", () => {
    const n = 20_000;
    let sum = 0;
    let squares = 0;
    for (let k = 0; k < n; k++) {
      const [high, low] = philox([k, 0, 0, 0], [7, 0]);
      const u = fraction(high, low) - 0.5;
      sum += u;
      squares += u * u;
    }
    expect(Math.abs(sum / n)).toBeLessThan(4.5 * Math.sqrt(1 / 12 / n));
    expect(Math.abs(squares / n - 1 / 12)).toBeLessThan(4.5 * Math.sqrt(1 / 180 / n));
  });
});
