import { AMPERE, type Dimension, divide, KELVIN, multiply, OHM, PURE, power, VOLT, WATT } from "./dimension";
import { PREFIXES } from "./prefix";

/**
 * A unit as written: the coherent SI value of `x unit` is x·10^`exponent`, or x + 273.15 where `scale` is "celsius".
 * `symbol` is the canonical spelling (Ω, µ, °C).
 */
export interface Unit {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly exponent: number;
  readonly scale: "ratio" | "celsius";
}

const SECOND: Dimension = [0, 0, 1, 0, 0];
const COULOMB = multiply(AMPERE, SECOND);

/** Units that take prefixes. */
export const UNITS: ReadonlyMap<string, Dimension> = new Map<string, Dimension>([
  ["V", VOLT],
  ["A", AMPERE],
  ["Ω", OHM],
  ["S", divide(AMPERE, VOLT)],
  ["W", WATT],
  ["K", KELVIN],
  ["s", SECOND],
  ["Hz", power(SECOND, -1)],
  ["C", COULOMB],
  ["F", divide(COULOMB, VOLT)],
  ["H", multiply(OHM, SECOND)],
  ["J", multiply(WATT, SECOND)],
]);

/** Units that take none, with the power of ten they stand for. */
export const PLAIN_UNITS: ReadonlyMap<string, number> = new Map([
  ["%", -2],
  ["ppm", -6],
]);

/** Spellings met so far; a long netlist has few of them, many times each. */
const parsed = new Map<string, Unit | null>();
const MOST_PARSED = 500;

const SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹";
const FACTOR = /^([^⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+)(⁻?)([⁰¹²³⁴⁵⁶⁷⁸⁹]?)$/u;

/**
 * The unit that `text` spells, or null. One symbol, or several joined by `·` and `/` without spaces, each with an optional
 * superscript digit: `mV/K`, `ppm/K`, `A/V²`, `1/K`. ASCII spellings `ohm`, `u` and `degC` are read as Ω, µ and °C. A degree
 * Celsius stands alone, since it is a point on a scale.
 */
export function parseUnit(text: string): Unit | null {
  if (text.length > 64) return null;
  let unit = parsed.get(text);
  if (unit === undefined) {
    if (parsed.size >= MOST_PARSED) parsed.clear();
    unit = parseAnew(text);
    parsed.set(text, unit);
  }
  return unit;
}

function parseAnew(text: string): Unit | null {
  const canonical = canonicalSpelling(text);
  if (canonical === "°C") return { symbol: "°C", dimension: KELVIN, exponent: 0, scale: "celsius" };
  let dimension = PURE;
  let exponent = 0;
  let symbol = "";
  for (const [, operator, factor] of canonical.matchAll(/(^|[·/])([^·/]*)/gu)) {
    const unit =
      factor === "1" && symbol === "" ? { symbol: "1", dimension: PURE, exponent: 0 } : parseFactor(factor!);
    if (unit === null) return null;
    dimension = operator === "/" ? divide(dimension, unit.dimension) : multiply(dimension, unit.dimension);
    exponent += operator === "/" ? -unit.exponent : unit.exponent;
    symbol += operator + unit.symbol;
  }
  return symbol === "" ? null : { symbol, dimension, exponent, scale: "ratio" };
}

function parseFactor(text: string): { symbol: string; dimension: Dimension; exponent: number } | null {
  const match = FACTOR.exec(text);
  if (match === null) return null;
  const base = spellOut(match[1]!);
  if (base === null) return null;
  const digit = match[3] === "" ? 1 : SUPERSCRIPTS.indexOf(match[3]!);
  const times = match[2] === "" ? digit : -digit;
  if (times === 0 || (match[2] !== "" && match[3] === "")) return null;
  const marks = match[2]! + match[3]!;
  return {
    symbol: base.symbol + marks,
    dimension: power(base.dimension, times),
    exponent: base.exponent * times,
  };
}

function spellOut(text: string): { symbol: string; dimension: Dimension; exponent: number } | null {
  const plain = PLAIN_UNITS.get(text);
  if (plain !== undefined) return { symbol: text, dimension: PURE, exponent: plain };
  for (const length of [0, 1, 2]) {
    const symbol = text.slice(length);
    const dimension = UNITS.get(symbol);
    const prefix = length === 0 ? 0 : PREFIXES.get(text.slice(0, length));
    if (dimension !== undefined && prefix !== undefined) return { symbol: text, dimension, exponent: prefix };
  }
  return null;
}

/** `text` with Ω for the ohm sign and `ohm`, µ for the Greek letter and a leading `u`, °C for `degC` and ℃. */
export function canonicalSpelling(text: string): string {
  if (text === "degC" || text === "℃") return "°C";
  const letters = text.replaceAll("\u2126", "Ω").replaceAll("\u03bc", "µ");
  return letters.replace(/(^|[·/])u(?=\p{L})/gu, "$1µ").replace(/ohm(?![\p{L}\p{N}_])/gu, "Ω");
}

/**
 * x·10^power, rounded once: the digits of x are read again with the exponent moved, so that `4.7 µA` is the double nearest to
 * 4.7e-6 and not the product of two roundings.
 */
export function scaleByTen(x: number, power: number): number {
  if (power === 0 || !Number.isFinite(x)) return x;
  const [digits, exponent] = x.toString().split("e");
  return Number(`${digits}e${Number(exponent ?? 0) + power}`);
}

/** The coherent SI value of `x` in `unit`; degrees Celsius become kelvin, to 15 significant digits. */
export function toCoherent(x: number, unit: Unit): number {
  if (unit.scale === "celsius") return Number((x + 273.15).toPrecision(15));
  return scaleByTen(x, unit.exponent);
}
