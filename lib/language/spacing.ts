import { log10, power } from "@/lib/units/elementary";

/**
 * Values of sweeps. Both ends are always among them. Values are rounded to 15 significant digits, so that a grid point that
 * is a round number is the same double as its literal (10 nA is 1e-8, not 1.0000000000000002e-8).
 */

/** The number of values that a range of `total` spacings has; what rounding leaves over is no spacing of its own. */
export function countOf(total: number): number {
  return Math.max(0, Math.ceil(total - 1e-9 * Math.max(1, total))) + 1;
}

/** a, then N values a decade from a on, then b; a and b of one sign and different, N whole and above 0. */
export function decades(a: number, b: number, perDecade: number): number[] {
  const total = Math.abs(log10(b / a)) * perDecade;
  const sign = Math.abs(b) > Math.abs(a) ? 1 : -1;
  const values: number[] = [];
  const last = countOf(total) - 1;
  for (let k = 0; k < last; k++) {
    const whole = Math.floor(k / perDecade);
    values.push(round(a * power(10, sign * whole) * power(10, (sign * (k - whole * perDecade)) / perDecade)));
  }
  values.push(b);
  return values;
}

/** `n` evenly spaced values from a to b; n is at least 2. */
export function evenly(a: number, b: number, n: number): number[] {
  const values = Array.from({ length: n }, (_, k) => snap(a + ((b - a) * k) / (n - 1), a, b));
  values[0] = a;
  values[n - 1] = b;
  return values;
}

/** a, a + step, … and b; the step leads towards b. */
export function stepwise(a: number, b: number, step: number): number[] {
  const last = countOf((b - a) / step) - 1;
  const values: number[] = [];
  for (let k = 0; k < last; k++) values.push(snap(a + k * step, a, b));
  values.push(b);
  return values;
}

/** Rounds, and takes what is nothing but rounding error beside the ends for zero. */
function snap(x: number, a: number, b: number): number {
  return Math.abs(x) < 1e-13 * Math.max(Math.abs(a), Math.abs(b)) ? 0 : round(x);
}

function round(x: number): number {
  return Number(x.toPrecision(15));
}
