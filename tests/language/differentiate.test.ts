import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import type { Signal, Typed } from "@/lib/language/ast";
import { check } from "@/lib/language/checker";
import { differentiate } from "@/lib/language/differentiate";
import { evaluate } from "@/lib/language/evaluate";
import { FUNCTION_NAMES } from "@/lib/language/functions";
import { signalsOf } from "@/lib/language/signals-of";
import { ROOM_TEMPERATURE, thermalVoltage } from "@/lib/units/constants";
import { AMPERE, divide, PURE, sameDimension, VOLT } from "@/lib/units/dimension";

interface Point {
  readonly a: number;
  readonly b: number;
  readonly value: string;
  readonly by_a: string;
  readonly by_b: string;
  readonly by_a_a: string;
  readonly by_a_b: string;
}

/** Values and slopes by mpmath at 50 digits, without a rule of the calculus: tests/reference/derivatives.py. */
const { cases } = JSON.parse(
  readFileSync(join(import.meta.dirname, "../reference/derivatives.json"), "utf8"),
) as { cases: { expression: string; points: Point[] }[] };

const A: Signal = { of: "net", net: "a" };
const B: Signal = { of: "net", net: "b" };

/** What a law says with this expression of the voltages of the nets a and b. */
function lawOf(expression: string, quantity = "volts"): Typed {
  const text = `knob k = 3
    ground -- V1 : voltage 1 V -- a
    ground -- V2 : voltage 1 V -- b
    R1 : resistor { left = a, right = b, value = 1 kΩ }
    L1 : law { plus = c, minus = ground, ${quantity} = ${expression} }
    show c.v`;
  const { design, diagnostics } = check(text);
  expect(diagnostics).toEqual([]);
  return design!.elements.find(({ name }) => name === "L1")!.law!.value;
}

function at(typed: Typed, { a, b }: { a: number; b: number }): number {
  return evaluate(typed, {
    knob: () => 3,
    let: () => Number.NaN,
    signal: (signal) => (signal.of === "net" && signal.net === "a" ? a : b),
    thermalVoltage: thermalVoltage(ROOM_TEMPERATURE),
  });
}

/** Within a few roundings, each of which a steep function may have magnified, and of the terms that `floor` stands for. */
function expectNear(actual: number, exact: string, floor = 1e-25): void {
  const wanted = Number(exact);
  expect(Math.abs(actual - wanted)).toBeLessThanOrEqual(2e-13 * Math.abs(wanted) + floor);
}

describe("slopes of expressions are those found at 50 digits", () => {
  test.each(cases)("$expression", ({ expression, points }) => {
    const law = lawOf(expression);
    const [byA, byB] = [differentiate(law, A), differentiate(law, B)];
    expect(sameDimension(byA.dimension, PURE)).toBe(true);
    const [byAA, byAB] = [differentiate(byA, A), differentiate(byA, B)];
    expect(sameDimension(byAA.dimension, divide(PURE, VOLT))).toBe(true);
    for (const point of points) {
      expectNear(at(law, point), point.value, 1e-16);
      expectNear(at(byA, point), point.by_a);
      expectNear(at(byB, point), point.by_b);
      expectNear(at(byAA, point), point.by_a_a, 2e-14);
      expectNear(at(byAB, point), point.by_a_b, 2e-14);
    }
  });

  test("every function and operator is among them", () => {
    const seen = new Set<string>();
    const visit = (typed: Typed): void => {
      seen.add(typed.op === "call" ? typed.callee : typed.op);
      if (typed.op === "call") typed.args.forEach(visit);
      else if (typed.op === "negate") visit(typed.operand);
      else if ("left" in typed) [typed.left, typed.right].forEach(visit);
    };
    for (const { expression } of cases) visit(lawOf(expression));
    for (const name of [...FUNCTION_NAMES, "+", "-", "*", "/", "^", "negate"]) expect(seen).toContain(name);
  });
});

describe("what does not depend on the signal leaves nothing", () => {
  test.each(["3 V", "b.v * k", "1 V * exp(b.v / V_T)", "max(b.v, 1 V)", "if(a.v > 1 V, b.v, b.v)"])(
    "%s",
    (expression) => {
      expect(differentiate(lawOf(expression), A)).toMatchObject({ op: "constant", value: 0 });
    },
  );

  test("the slope of a linear law is one constant", () => {
    expect(differentiate(lawOf("2 * a.v + 3 * b.v + 1 V"), A)).toMatchObject({ op: "constant", value: 2 });
    expect(differentiate(lawOf("2 mS * a.v", "amps"), A)).toMatchObject({ op: "constant", value: 0.002 });
  });
});

describe("at a kink the slope is that of the branch which is taken", () => {
  test.each([
    ["abs(a.v)", 0, 0, 1],
    ["min(a.v, 2 * b.v)", 2, 1, 1],
    ["max(a.v, 2 * b.v)", 2, 1, 1],
    ["min(3 * b.v, a.v)", 3, 1, 0],
    ["if(a.v < b.v, 5 * a.v, 7 * a.v)", 1, 1, 7],
  ])("%s at a = %d V, b = %d V", (expression, a, b, slope) => {
    expect(at(differentiate(lawOf(expression), A), { a, b })).toBe(slope);
  });
});

test("far out on a limiter the slope is zero and not a number beyond reach", () => {
  const slope = differentiate(lawOf("1 V * tanh(a.v / 1 mV)"), A);
  expect(at(slope, { a: 10, b: 0 })).toBe(0);
  expect(at(slope, { a: -10, b: 0 })).toBe(0);
});

test("the power of an element in a law is its voltage times its current", () => {
  const law = lawOf("R1.p / 1 V", "amps");
  expect(signalsOf(law)).toEqual([
    { of: "element", element: "R1", quantity: "v" },
    { of: "element", element: "R1", quantity: "i" },
  ]);
  const slope = differentiate(law, { of: "element", element: "R1", quantity: "v" });
  expect(sameDimension(slope.dimension, divide(AMPERE, VOLT))).toBe(true);
});
