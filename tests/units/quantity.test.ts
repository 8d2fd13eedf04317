import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { formatAxis, formatQuantity } from "@/lib/units/quantity";
import { parseUnit, toCoherent } from "@/lib/units/unit";

const N = "\u202f";

describe("a quantity for people", () => {
  test.each([
    [0.05916, "V", `59.16${N}mV`],
    [-0.0025, "V", `−2.500${N}mV`],
    [1e-6, "A", `1.000${N}µA`],
    [0, "V", `0${N}V`],
    [-0, "V", `0${N}V`],
    [10_000, "Ω", `10.00${N}kΩ`],
    [298.15, "K", `298.1${N}K`],
    [12345.678, "K", `12${N}346${N}K`],
    [0.002, "K", `2.000${N}mK`],
    [25, "°C", `25.00${N}°C`],
    [0.5, "%", `0.5000${N}%`],
    [0.123456, "1", "0.1235"],
    [123456, "1", `123${N}456`],
    [1.5e-9, "1", "1.5·10⁻⁹"],
    [-2.25e12, "1", "−2.25·10¹²"],
    [0.9999999, "V", `1.000${N}V`],
    [999.99999, "V", `1.000${N}kV`],
    [4e-16, "A", `400.0${N}aA`],
    [2.7e-19, "A", `0.2700${N}aA`],
    [-5.655732e-25, "V", `−5.656·10⁻²⁵${N}V`],
    [0.00235, "V/K", `2.350${N}mV/K`],
    [5e-5, "1/K", `5·10⁻⁵${N}1/K`],
    [Number.NaN, "V", "no value"],
    [Number.POSITIVE_INFINITY, "V", "no value"],
  ])("%d %s", (value, unit, text) => {
    expect(formatQuantity(value, unit)).toBe(text);
  });

  test("as many digits as asked for", () => {
    expect(formatQuantity(Math.PI, "V", 8)).toBe(`3.141${N}592${N}7${N}V`);
    expect(formatQuantity(1234.5, "V", 2)).toBe(`1.2${N}kV`);
    expect(formatQuantity(123456, "1", 2)).toBe(`123${N}456`);
  });

  test("reads back as the value, to the digits shown", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-20, max: 1e29, noNaN: true }), fc.boolean(), (size, negative) => {
        const value = negative ? -size : size;
        const [number, unit] = formatQuantity(value, "V", 6).split(/(?<=\d)\u202f(?=[^\d])/u) as [
          string,
          string,
        ];
        const read = toCoherent(Number(number.replaceAll(N, "").replace("−", "-")), parseUnit(unit)!);
        expect(Math.abs(read / value - 1)).toBeLessThanOrEqual(5.0001e-6);
      }),
    );
  });
});

describe("a tick label", () => {
  test.each([
    [1e-8, "A", `10${N}nA`],
    [-0.5, "V", `−500${N}mV`],
    [0, "V", `0${N}V`],
    [1, "V", `1${N}V`],
    [0.3, "1", "0.3"],
    [0.1 + 0.2, "V", `300${N}mV`],
  ])("%d %s", (value, unit, text) => {
    expect(formatAxis(value, unit)).toBe(text);
  });
});
