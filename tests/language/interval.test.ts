import { describe, expect, test } from "vitest";
import type { Typed } from "@/lib/language/ast";
import { check } from "@/lib/language/checker";
import { evaluate } from "@/lib/language/evaluate";
import { evaluateInterval } from "@/lib/language/interval";

/** A law of two voltages, written with `x` and `y`, as the checker reads it. */
function lawOf(expression: string): Typed {
  const written = expression.replaceAll(/\b([xy])\b/g, "($1.v / 1 V)");
  const { design, diagnostics } = check(`ground -- R1 : resistor 1 Ω -- x -- R2 : resistor 1 Ω -- y
L : law { plus = x, minus = ground, amps = 1 A * (${written}) }
show x.v`);
  if (design === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return design.elements.find(({ name }) => name === "L")!.law!.value;
}

const nothing = { knob: () => Number.NaN, let: () => Number.NaN, thermalVoltage: 0.0257 };

function rangeOf(typed: Typed, x: readonly [number, number], y: readonly [number, number]) {
  return evaluateInterval(typed, {
    ...nothing,
    signal: (signal) => {
      const [low, high] = signal.of === "net" && signal.net === "x" ? x : y;
      return { low, high };
    },
  });
}

function valueAt(typed: Typed, x: number, y: number): number {
  return evaluate(typed, {
    ...nothing,
    signal: (signal) => (signal.of === "net" && signal.net === "x" ? x : y),
  });
}

const EXPRESSIONS = [
  "x + y * x - 3 / y",
  "x^3 - 2 * x^2 + y",
  "(x - 0.3)^2 + (-x)^4",
  "exp(x * 4) - y",
  "ln(y) + log10(y) * sqrt(y)",
  "abs(x) + min(x, y) * max(x, y, 0.1)",
  "tanh(x * 7) + atan(x - y)",
  "if(y > 0.01, x, -x) * y^0.5",
  "x * (1 A * exp(x)) / (1 A)",
];

describe("the interval of an expression", () => {
  test.each(EXPRESSIONS)("%s holds every value over a box", (expression) => {
    const typed = lawOf(expression);
    for (const [low, width] of [
      [-0.7, 0.05],
      [-0.02, 0.04],
      [0.3, 1e-9],
      [0.6, 0.5],
    ] as const) {
      const { low: least, high: most } = rangeOf(typed, [low, low + width], [0.5, 0.5 + width]);
      for (let i = 0; i <= 20; i++) {
        for (let j = 0; j <= 20; j++) {
          const value = valueAt(typed, low + (width * i) / 20, 0.5 + (width * j) / 20);
          expect(value).toBeGreaterThanOrEqual(least);
          expect(value).toBeLessThanOrEqual(most);
        }
      }
      // Not wider than forty times what the box makes of an expression whose slopes stay below a million.
      expect(most - least).toBeLessThanOrEqual(4e7 * width + 1e-12);
    }
  });

  test("holds the exact value of a single point between its ends, and they are close", () => {
    // e to 20 digits from any table: 2.71828182845904523536; Math.E is the double nearest to it.
    const { low, high } = rangeOf(lawOf("exp(x)"), [1, 1], [0, 0]);
    expect(low).toBeLessThan(Math.E);
    expect(high).toBeGreaterThan(Math.E);
    expect(high - low).toBeLessThan(2e-14);
  });

  test.each([
    ["1 / x", "a pole"],
    ["x^(-2)", "a pole of even order"],
    ["ln(x)", "a logarithm of what may be negative"],
    ["sqrt(x)", "a root of what may be negative"],
    ["if(x > 0, 1, 0)", "a choice that is not made"],
    ["exp(x * 1e6)", "an overflow"],
  ])("%s over zero is anything: %s", (expression) => {
    expect(rangeOf(lawOf(expression), [-0.1, 0.1], [0, 0])).toEqual({
      low: Number.NEGATIVE_INFINITY,
      high: Number.POSITIVE_INFINITY,
    });
  });
});
