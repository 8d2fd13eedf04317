import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { atan, log, log1p, log10, power, tanh } from "@/lib/units/elementary";
import { worst } from "../devices/closeness";

type Row = readonly [number, string];

/** Reference: mpmath at 120 digits, tests/reference/elementary.py. */
const ROWS: Readonly<Record<"log" | "log10" | "log1p" | "tanh" | "atan", readonly Row[]>> & {
  readonly power: readonly (readonly [number, number, string])[];
} = JSON.parse(readFileSync("tests/reference/elementary.json", "utf8"));

/** The error of a double in units in its last place, the digits beyond a double counted by half of one. */
function unitsOff(actual: number, wanted: string): number {
  const near = Number(wanted);
  if (near === 0) return actual === 0 ? 0 : Number.POSITIVE_INFINITY;
  return Math.abs(actual - near) / 2 ** (Math.floor(Math.log2(Math.abs(near))) - 52) + 0.5;
}

describe("elementary functions agree with mpmath", () => {
  test.each([
    ["log", log, 1.5],
    ["log10", log10, 1.5],
    ["log1p", log1p, 1.5],
    ["tanh", tanh, 3.5],
    ["atan", atan, 4.5],
  ] as const)("%s", (name, f, most) => {
    const { error, row } = worst(ROWS[name], ([x, wanted]) => unitsOff(f(x), wanted));
    expect(error, `at ${row[0]}`).toBeLessThanOrEqual(most);
  });

  test("power", () => {
    const { error, row } = worst(ROWS.power, ([x, y, wanted]) => unitsOff(power(x, y), wanted));
    expect(error, `${row[0]} ^ ${row[1]}`).toBeLessThanOrEqual(6);
  });
});

test("powers of ten have whole decadic logarithms, and whole powers are multiplied out", () => {
  for (let k = -300; k <= 300; k++) expect(log10(Number(`1e${k}`))).toBe(k);
  expect([power(3, 4), power(-2, 3), power(2, -2), power(7, 0), power(10, -9)]).toEqual([
    81, -8, 0.25, 1, 1e-9,
  ]);
  expect(power(2, 0.5)).toBe(Math.SQRT2);
});

test("the ends are those of the engine's own", () => {
  const ends = [0, -0, -1, 1, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NaN, -2, 1e-310];
  const near = (actual: number, wanted: number) =>
    Object.is(actual, wanted) || Math.abs(actual - wanted) <= 1e-12 * Math.abs(wanted);
  for (const [own, engine] of [
    [log, Math.log],
    [log10, Math.log10],
    [log1p, Math.log1p],
    [tanh, Math.tanh],
    [atan, Math.atan],
  ] as const) {
    expect(ends.filter((x) => !near(own(x), engine(x)))).toEqual([]);
  }
  for (const x of ends) expect(ends.filter((y) => !near(power(x, y), x ** y))).toEqual([]);
});

/** Where the engine's own functions serve: words and counts that have slack, and draws and yields, which no preview has. */
const OWN_SERVE = [
  "lib/units/quantity.ts",
  "lib/language/literal.ts",
  "lib/language/window.ts",
  "lib/language/changes/written.ts",
  "lib/analyses/draws.ts",
  "lib/analyses/yield.ts",
];

test("no result rests on functions that engines work out differently", () => {
  const files = ["units", "language", "devices", "circuit", "solver", "analyses"].flatMap((part) =>
    readdirSync(`lib/${part}`, { recursive: true, encoding: "utf8" }).map((name) => `lib/${part}/${name}`),
  );
  const code = (path: string) => readFileSync(path, "utf8").replace(/^\s*(?:\/?\*|\/\/).*$/gmu, "");
  const using = files.filter(
    (path) =>
      path.endsWith(".ts") &&
      /Math\.(?:exp|log|log10|log2|log1p|expm1|pow|sin|cos|tan|sinh|cosh|tanh|asin|acos|atan|atan2|asinh|cbrt|hypot)\b/u.test(
        code(path),
      ),
  );
  expect(using.filter((path) => !OWN_SERVE.includes(path))).toEqual([]);
});
