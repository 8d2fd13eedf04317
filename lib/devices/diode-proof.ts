import { log } from "@/lib/units/elementary";
import { exp, expm1 } from "@/lib/units/exponential";
import type { BreakdownAt } from "./breakdown";
import type { CurrentAndSlope, DiodeAt } from "./diode";
import { exponentialDoubt, UNIT } from "./rounding";

/**
 * The most by which `diodeLaw` may be off at `v` by rounding, A. Without series resistance that is the exponential's own relative error.
 * With it, an error of the argument reaches the current through the slope only, and the omega function adds a few roundings.
 */
export function diodeDoubt(at: DiodeAt, v: number, { i, g }: CurrentAndSlope): number {
  const { Is, eta, Rs, doubt } = at;
  const size = Math.abs(i) + Is;
  if (Rs === 0) return size * (doubt + exponentialDoubt(v / eta));
  const a = (Is * Rs) / eta;
  const argument = Math.abs(v) + eta * (a + Math.abs(log(a)) + 8);
  return 16 * UNIT * g * argument + size * (doubt + 32 * UNIT);
}

/**
 * The most by which the slope can differ from `g` within `delta` V of `v`, S, the rounding of `g` included: |d ln g/dv| ≤ 1/(n·V_T), also
 * with series resistance, where it is 1/(n·V_T·(1 + w)²).
 */
export function diodeSpread({ eta, doubt }: DiodeAt, v: number, g: number, delta: number): number {
  return g * (expm1(delta / eta) + doubt + 4 * exponentialDoubt(v / eta));
}

/** The most by which `breakdownLaw` may be off at `v` by rounding, A. */
export function breakdownDoubt(
  at: DiodeAt,
  reverse: BreakdownAt,
  v: number,
  { i, g }: CurrentAndSlope,
): number {
  const { Is, eta, Rs, doubt } = at;
  const size = Math.abs(i) + Is + reverse.amperes * exp(-reverse.volts / reverse.eta);
  const argument = (Math.abs(v) + reverse.volts) / Math.min(eta, reverse.eta);
  if (Rs === 0) {
    const past = Math.abs(v + reverse.volts) / reverse.eta;
    return size * (doubt + exponentialDoubt(v > 0 ? v / eta : past + reverse.volts * UNIT));
  }
  return 16 * UNIT * g * (Math.abs(v) + eta + reverse.eta * (1 + argument)) + size * (doubt + 64 * UNIT);
}

/** As `diodeSpread`, with the steeper of the two exponentials. */
export function breakdownSpread(
  at: DiodeAt,
  reverse: BreakdownAt,
  v: number,
  g: number,
  delta: number,
): number {
  const eta = Math.min(at.eta, reverse.eta);
  const argument = (Math.abs(v) + reverse.volts) / eta;
  return g * (expm1(delta / eta) + at.doubt + 4 * exponentialDoubt(argument));
}
