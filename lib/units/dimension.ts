/**
 * Exponents of the SI base units metre, kilogram, second, ampere, kelvin (SI Brochure, 9th ed., 2019, section 2.3.3).
 * Exponents may be fractions, since a square root halves them.
 */
export type Dimension = readonly [
  metre: number,
  kilogram: number,
  second: number,
  ampere: number,
  kelvin: number,
];

export const PURE: Dimension = [0, 0, 0, 0, 0];
export const VOLT: Dimension = [2, 1, -3, -1, 0];
export const AMPERE: Dimension = [0, 0, 0, 1, 0];
export const OHM: Dimension = [2, 1, -3, -2, 0];
export const WATT: Dimension = [2, 1, -3, 0, 0];
export const KELVIN: Dimension = [0, 0, 0, 0, 1];
export const PER_KELVIN: Dimension = [0, 0, 0, 0, -1];

export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a.every((exponent, i) => Math.abs(exponent - b[i]!) < 1e-9);
}

export function multiply(a: Dimension, b: Dimension): Dimension {
  return combine(a, b, 1);
}

export function divide(a: Dimension, b: Dimension): Dimension {
  return combine(a, b, -1);
}

export function power(a: Dimension, exponent: number): Dimension {
  return [a[0] * exponent, a[1] * exponent, a[2] * exponent, a[3] * exponent, a[4] * exponent];
}

function combine(a: Dimension, b: Dimension, sign: 1 | -1): Dimension {
  return [a[0] + sign * b[0], a[1] + sign * b[1], a[2] + sign * b[2], a[3] + sign * b[3], a[4] + sign * b[4]];
}
