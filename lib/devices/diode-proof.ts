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
  const argument = Math.abs(v) + eta * (a + Math.abs(Math.log(a)) + 8);
  return 16 * UNIT * g * argument + size * (doubt + 32 * UNIT);
}

/**
 * The most by which the slope can differ from `g` within `delta` V of `v`, S, the rounding of `g` included: |d ln g/dv| ≤ 1/(n·V_T), also
 * with series resistance, where it is 1/(n·V_T·(1 + w)²).
 */
export function diodeSpread({ eta, doubt }: DiodeAt, v: number, g: number, delta: number): number {
  return g * (Math.expm1(delta / eta) + doubt + 4 * exponentialDoubt(v / eta));
}
