import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import { solveRange } from "@/lib/analyses/sweep";
import { FUNCTION_NAMES } from "@/lib/language/functions";
import { REDUCTIONS } from "@/lib/language/reductions";

/** y is the swept voltage itself: 1 V, 10 V, 100 V, 1000 V. */
const HEAD = `knob V = 1 V
ground -- V1 : voltage V -- y -- R1 : resistor 1 kΩ -- ground
sweep V from 1 V to 1000 V, 1 per decade
`;

function solved(text: string) {
  const { job, diagnostics } = compile(HEAD + text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return { job, columns: solveRange(job, 0, job.plan.points) };
}

/** By hand from the four points. A line over the logarithm of V goes through y = lg V; reach goes along that logarithm between points. */
const READINGS: readonly (readonly [text: string, values: readonly number[]])[] = [
  ["highest(y.v)", [1000]],
  ["lowest(y.v)", [1]],
  ["mean(y.v)", [1111 / 4]],
  ["span(y.v)", [999]],
  ["per_decade(log10(y.v / 1 V))", [1]],
  ["per_unit(3 * y.v)", [3]],
  ["intercept(2 * log10(y.v / 1 V) + 5)", [5]],
  ["deviation(log10(y.v / 1 V))", [0, 0, 0, 0]],
  ["error_from(y.v, y.v - 1 V)", [1, 1, 1, 1]],
  ["reach(y.v, 50 V)", [10 * 10 ** (40 / 90)]],
  ["decades_where(y.v >= 10 V)", [2]],
  ["at(y.v, V = 100 V)", [100]],
];

describe("every reduction, from text to number", () => {
  test.each(READINGS)("%s", (text, values) => {
    const { job, columns } = solved(`read r = ${text}\n`);
    const { readings } = judge(job, columns);
    expect(readings).toHaveLength(1);
    expect(readings[0]!.values).toHaveLength(values.length);
    values.forEach((value, k) => {
      expect(Math.abs(readings[0]!.values[k]! - value)).toBeLessThanOrEqual(
        1e-12 * Math.max(1, Math.abs(value)),
      );
    });
  });

  test("none is left out", () => {
    const tried = READINGS.map(([text]) => text.slice(0, text.indexOf("(")));
    expect(tried.toSorted()).toEqual(Object.keys(REDUCTIONS).toSorted());
  });
});

/** At y = 10 V and 25 °C. Constants are exact in the SI; the rest is arithmetic of tables: e, lg 2, ln 10, tanh 1, atan 1. */
const FIGURES: readonly (readonly [text: string, value: string])[] = [
  ["exp(y.v / 10 V)", "2.718281828459045"],
  ["ln(y.v / 1 V)", "2.302585092994046"],
  ["log10(y.v / 5 V)", "0.3010299956639812"],
  ["sqrt(y.v / 5 V)", "1.4142135623730951"],
  ["abs(-y.v) / 1 V", "10"],
  ["min(y.v, 3 V, 7 V) / 1 V", "3"],
  ["max(y.v, 3 V) / 1 V", "10"],
  ["tanh(y.v / 10 V)", "0.7615941559557649"],
  ["atan(y.v / 10 V)", "0.7853981633974483"],
  ["if(y.v > 9 V, 2, 3)", "2"],
  ["if(y.v < 9 V, 2, 3)", "3"],
  ["(y.v / 1 V)^2 - 2 * 3 / 4", "98.5"],
  ["pi", "3.141592653589793"],
  ["k_B * 1 K / 1 J", "1.380649e-23"],
  ["q_e / 1 C", "1.602176634e-19"],
  // 1.380649e-23 · 298.15 / 1.602176634e-19
  ["V_T / 1 V", "0.025692579121085846518"],
  ["R1.i / 1 mA", "10"],
  ["R1.v / 1 V", "10"],
  ["R1.p / 1 W", "0.1"],
  ["R1.left.i / 1 mA", "10"],
  ["R1.right.i / 1 mA", "-10"],
];

describe("every function, constant and signal, from text to number", () => {
  test.each(FIGURES)("%s", (text, value) => {
    const { columns } = solved(`show f = ${text}\n`);
    expect(Math.abs(columns.traces[0]![1]! / Number(value) - 1)).toBeLessThanOrEqual(1e-14);
  });

  test("no function is left out", () => {
    const text = FIGURES.map(([one]) => one).join(" ");
    expect([...FUNCTION_NAMES].filter((name) => !text.includes(`${name}(`))).toEqual([]);
  });
});
