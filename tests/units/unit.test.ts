import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  AMPERE,
  divide,
  KELVIN,
  multiply,
  OHM,
  PER_KELVIN,
  PURE,
  power,
  sameDimension,
  VOLT,
  WATT,
} from "@/lib/units/dimension";
import { PREFIXES } from "@/lib/units/prefix";
import { unitOf } from "@/lib/units/quantity";
import { PLAIN_UNITS, parseUnit, scaleByTen, toCoherent, UNITS } from "@/lib/units/unit";

function inCoherent(x: number, unit: string): number {
  return toCoherent(x, parseUnit(unit)!);
}

describe("a unit is read with its prefix", () => {
  test.each([
    [10, "kΩ", 1e4, OHM],
    [4.7, "µA", 4.7e-6, AMPERE],
    [-2, "mV/K", -2e-3, divide(VOLT, KELVIN)],
    [50, "ppm/K", 5e-5, PER_KELVIN],
    [0.5, "%", 0.005, PURE],
    [3, "A/V²", 3, divide(AMPERE, power(VOLT, 2))],
    [2, "V·A", 2, WATT],
    [1, "K⁻¹", 1, PER_KELVIN],
    [5, "1/K", 5, PER_KELVIN],
    [2.2, "mV²", 2.2e-6, power(VOLT, 2)],
    [1, "MΩ", 1e6, OHM],
    [1, "mΩ", 1e-3, OHM],
    [1, "daA", 10, AMPERE],
    [0.4, "fA", 4e-16, AMPERE],
  ])("%d %s", (x, unit, coherent, dimension) => {
    expect(inCoherent(x, unit)).toBe(coherent);
    expect(sameDimension(parseUnit(unit)!.dimension, dimension)).toBe(true);
  });

  test.each([
    ["ohm", "Ω"],
    ["kohm", "kΩ"],
    ["uA", "µA"],
    ["uohm", "µΩ"],
    ["\u2126", "Ω"],
    ["\u03bcV", "µV"],
    ["degC", "°C"],
    ["℃", "°C"],
    ["uV/K", "µV/K"],
  ])("ASCII %s is %s", (written, symbol) => {
    expect(parseUnit(written)!.symbol).toBe(symbol);
  });

  test.each([
    "",
    "k",
    "µ",
    "u",
    "KΩ",
    "V/",
    "/V",
    "V//A",
    "°C/K",
    "mV/°C",
    "V^2",
    "xyz",
    "mm",
    "k%",
    "V⁰",
    "V⁻",
    "ohms",
    "A A",
    "constructor",
  ])("%j is no unit", (text) => {
    expect(parseUnit(text)).toBeNull();
  });

  test("a degree Celsius is a point on the scale", () => {
    expect(inCoherent(25, "°C")).toBe(298.15);
    expect(inCoherent(-40, "°C")).toBe(233.15);
    expect(inCoherent(0.1, "°C")).toBe(273.25);
  });

  test("an overlong text is refused without being searched", () => {
    expect(parseUnit("V·".repeat(1e6))).toBeNull();
  });
});

test("a scaled literal is the double nearest to its decimal digits", () => {
  fc.assert(
    fc.property(
      fc.integer({ min: -99999, max: 99999 }),
      fc.integer({ min: -4, max: 4 }),
      fc.constantFrom(...PREFIXES),
      (digits, places, [prefix, exponent]) => {
        const x = Number(`${digits}e${places}`);
        expect(inCoherent(x, `${prefix}V`)).toBe(Number(`${digits}e${places + exponent}`));
      },
    ),
  );
  expect(scaleByTen(Number.POSITIVE_INFINITY, -3)).toBe(Number.POSITIVE_INFINITY);
});

test("every unit with every prefix is read as that unit and that prefix", () => {
  for (const [unit, dimension] of UNITS) {
    for (const [prefix, exponent] of PREFIXES) {
      const read = parseUnit(prefix + unit)!;
      expect(read).toMatchObject({ symbol: prefix + unit, exponent, scale: "ratio" });
      expect(sameDimension(read.dimension, dimension)).toBe(true);
    }
  }
  for (const unit of PLAIN_UNITS.keys()) expect(parseUnit(unit)!.symbol).toBe(unit);
});

describe("the coherent symbol of a dimension", () => {
  test.each([
    ["V", VOLT],
    ["A", AMPERE],
    ["Ω", OHM],
    ["W", WATT],
    ["K", KELVIN],
    ["1", PURE],
    ["V/K", divide(VOLT, KELVIN)],
    ["1/K", PER_KELVIN],
    ["S", divide(AMPERE, VOLT)],
    ["V²", power(VOLT, 2)],
    ["A/V²", divide(AMPERE, power(VOLT, 2))],
    ["V^0.5", power(VOLT, 0.5)],
    ["Ω", multiply(power(VOLT, 2), divide(PURE, WATT))],
  ])("%s", (symbol, dimension) => {
    expect(unitOf(dimension)).toBe(symbol);
  });

  test("with whole exponents it reads back as the same dimension", () => {
    const exponent = fc.integer({ min: -4, max: 4 });
    fc.assert(
      fc.property(exponent, exponent, exponent, exponent, (v, a, k, s) => {
        const dimension = multiply(
          multiply(power(VOLT, v), power(AMPERE, a)),
          multiply(power(KELVIN, k), power([0, 0, 1, 0, 0], s)),
        );
        const unit = parseUnit(unitOf(dimension));
        if (unitOf(dimension) === "1") return;
        expect(unit).not.toBeNull();
        expect(sameDimension(unit!.dimension, dimension)).toBe(true);
        expect(unit!.exponent).toBe(0);
      }),
    );
  });
});
