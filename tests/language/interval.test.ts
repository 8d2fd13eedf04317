import { describe, expect, test } from "vitest";
import type { Typed } from "@/lib/language/ast";
import { check } from "@/lib/language/checker";
import { differentiate } from "@/lib/language/differentiate";
import { evaluate } from "@/lib/language/evaluate";
import { evaluateInterval } from "@/lib/language/interval";
import { signalsOf } from "@/lib/language/signals-of";

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

function rangeOf(
  typed: Typed,
  x: readonly [number, number],
  y: readonly [number, number],
  isContinuous = false,
) {
  return evaluateInterval(typed, {
    ...nothing,
    isContinuous,
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
  ])("%s over zero is anything: %s", (expression) => {
    expect(rangeOf(lawOf(expression), [-0.1, 0.1], [0, 0])).toEqual({
      low: Number.NEGATIVE_INFINITY,
      high: Number.POSITIVE_INFINITY,
    });
  });

  test("that overflows reaches to infinity, and what it divides stays bounded", () => {
    // d tanh(u)/du = 1/cosh²u, below 1e-690 at u = 800: beyond the range of binary64, as e^1600 is.
    expect(rangeOf(lawOf("exp(x)"), [709, 720], [0, 0]).high).toBe(Number.POSITIVE_INFINITY);
    expect(rangeOf(lawOf("exp(x)"), [720, 730], [0, 0]).low).toBeGreaterThan(1e308);
    const law = lawOf("tanh(x)");
    const slope = differentiate(law, signalsOf(law)[0]!);
    const { low, high } = rangeOf(slope, [-801, -799], [0, 0]);
    expect(low).toBeLessThanOrEqual(0);
    expect(high).toBeGreaterThan(0);
    expect(high).toBeLessThan(1e-300);
  });

  test.each([
    ["abs(x)", -1, 1],
    ["max(x, 3 * x)", 1, 3],
    ["min(x, 3 * x) - y", 1, 3],
    ["x * abs(x)", 0, 0],
    ["max(x, x)", 1, 1],
  ])("the slope of %s at its kink lies between those of both sides", (expression, least, most) => {
    const law = lawOf(expression);
    const slope = differentiate(law, signalsOf(law)[0]!);
    expect(rangeOf(slope, [-0.1, 0.1], [0, 0]).high).toBe(Number.POSITIVE_INFINITY);
    const { low, high } = rangeOf(slope, [-0.1, 0.1], [0, 0], true);
    expect(low).toBeLessThanOrEqual(least);
    expect(low).toBeGreaterThan(least - 0.5);
    expect(high).toBeGreaterThanOrEqual(most);
    expect(high).toBeLessThan(most + 0.5);
  });
});
