import {
  AMPERE,
  type Dimension,
  divide,
  KELVIN,
  multiply,
  OHM,
  PURE,
  power,
  sameDimension,
  VOLT,
  WATT,
} from "./dimension";
import { ENGINEERING } from "./prefix";
import { PLAIN_UNITS, UNITS } from "./unit";

const NARROW = "\u202f";
const MINUS = "\u2212";
/** Atto is the smallest prefix that is shown: below, a power of ten says more than a prefix that nobody uses. */
const SMALLEST = -18;

/** Preferred names of the dimensions that circuits meet; the first that fits is used. */
const COHERENT: readonly (readonly [string, Dimension])[] = [
  ["1", PURE],
  ["V", VOLT],
  ["A", AMPERE],
  ["Ω", OHM],
  ["W", WATT],
  ["K", KELVIN],
  ...UNITS,
  ["V/K", divide(VOLT, KELVIN)],
  ["A/V²", divide(AMPERE, multiply(VOLT, VOLT))],
  ["1/K", power(KELVIN, -1)],
];

/**
 * The coherent SI symbol of a dimension: "V", "A", "Ω", "W", "K", "1" and their like, else a product of V, A, s and K such as
 * "V/K" or "V²·s". Every dimension that a netlist can reach is such a product; exponents that are not whole are written out.
 */
export function unitOf(dimension: Dimension): string {
  const named = COHERENT.find(([, known]) => sameDimension(known, dimension));
  if (named !== undefined) return named[0];
  const volts = dimension[1];
  const amperes = dimension[3] + volts;
  const seconds = dimension[2] + 3 * volts;
  const factors = [
    ["V", volts],
    ["A", amperes],
    ["s", seconds],
    ["K", dimension[4]],
  ] as const;
  const over = factors
    .filter(([, exponent]) => exponent > 1e-9)
    .map(([name, exponent]) => name + raised(exponent));
  const under = factors.filter(([, exponent]) => exponent < -1e-9).map(([name, e]) => name + raised(-e));
  return [over.join("·") || "1", ...under].join("/");
}

function raised(exponent: number): string {
  if (Math.abs(exponent - 1) < 1e-9) return "";
  const whole = Math.round(exponent);
  if (Math.abs(exponent - whole) < 1e-9 && whole >= 2 && whole <= 9) return "⁰¹²³⁴⁵⁶⁷⁸⁹"[whole]!;
  return `^${Number(exponent.toPrecision(6))}`;
}

/** Units that stand without a prefix where they are shown. */
function takesPrefix(unit: string): boolean {
  return (
    unit !== "1" &&
    unit !== "°C" &&
    !PLAIN_UNITS.has(unit) &&
    !/[⁰¹²³⁴⁵⁶⁷⁸⁹^]/u.test(unit) &&
    !unit.startsWith("1/") &&
    !unit.startsWith("ppm")
  );
}

/**
 * `value` (in `unit`, coherent) for people: engineering prefix, `digits` significant digits (4), a proper minus sign, narrow
 * no-break spaces before the unit and between groups of three digits: "59.16 mV", "−2 000". A pure number ("1") has no unit and
 * a power of ten where it is very large or small; K, °C and % take no prefix above 1. Not finite: "no value".
 */
export function formatQuantity(value: number, unit: string, digits = 4): string {
  return compose(value, unit, (x) => significant(x, digits), digits);
}

/** The short form for tick labels: as `formatQuantity` without trailing zeros: "10 nA", "−0.5 V". */
export function formatAxis(value: number, unit: string): string {
  return compose(value, unit, (x) => String(Number(x.toPrecision(6))), 6);
}

function compose(value: number, unit: string, spell: (x: number) => string, digits: number): string {
  if (!Number.isFinite(value)) return "no value";
  const tail = unit === "1" ? "" : NARROW + unit;
  if (value === 0) return `0${tail}`;
  if (!takesPrefix(unit)) return plain(value, spell) + tail;
  let step = clamp(3 * Math.floor(Math.log10(Math.abs(value)) / 3), unit === "K" ? 0 : 30);
  const rounded = Number(value.toPrecision(digits));
  if (Math.abs(shift(rounded, step)) >= 1000) step = clamp(step + 3, unit === "K" ? 0 : 30);
  if (Math.abs(shift(value, step)) >= 1e6 || Math.abs(shift(value, step)) < 1e-3)
    return plain(value, spell) + tail;
  return `${group(spell(shift(value, step)))}${NARROW}${ENGINEERING.get(step)}${unit}`;
}

function clamp(step: number, highest: number): number {
  return Math.min(highest, Math.max(SMALLEST, step));
}

function shift(x: number, step: number): number {
  return step < 0 ? x * 10 ** -step : x / 10 ** step;
}

/** Numbers without a prefix: positional within reach of the eye, else with a power of ten. */
function plain(value: number, spell: (x: number) => string): string {
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e6) return group(spell(value));
  const [digits, exponent] = value.toExponential(3).split("e");
  return `${group(String(Number(digits)))}·10${superscript(Number(exponent))}`;
}

function superscript(n: number): string {
  return [...String(n)].map((c) => (c === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(c)])).join("");
}

/** `digits` significant digits, positional, never with an exponent. */
function significant(x: number, digits: number): string {
  const whole = Math.floor(Math.log10(Math.abs(Number(x.toPrecision(digits))))) + 1;
  return x.toFixed(Math.min(20, Math.max(0, digits - whole)));
}

/** Groups of three digits on both sides of the point where there are more than four; a hyphen becomes a minus sign. */
function group(text: string): string {
  const [, sign, whole, fraction] = /^(-?)(\d+)(?:\.(\d+))?$/u.exec(text) ?? [];
  if (whole === undefined) return text.replace("-", MINUS);
  const left = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/gu, NARROW) : whole;
  const right =
    fraction !== undefined && fraction.length > 4
      ? fraction.replace(/(\d{3})(?=\d)/gu, `$1${NARROW}`)
      : fraction;
  return `${sign === "-" ? MINUS : ""}${left}${right === undefined ? "" : `.${right}`}`;
}
