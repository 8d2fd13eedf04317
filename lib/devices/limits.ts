import { log1p } from "@/lib/units/elementary";
import { exp, expm1 } from "@/lib/units/exponential";

/** The limits of an amplifier's output, V; one that is null is dropped exactly. */
export interface LimitsAt {
  readonly low: number | null;
  readonly high: number | null;
}

/** κ, the width of the knee, V: wide for Newton's method, narrow beside ±12 V. */
export const KNEE = 0.05;

/** Where the law writes the limited output (V) and its slope by s (pure). */
export interface Limited {
  v: number;
  slope: number;
}

/**
 * Smooth limits, behavioural (our own choice): L(s) = s − κ·ln(1 + e^((s − high)/κ)) + κ·ln(1 + e^((low − s)/κ)), where s in V is what the
 * output would be without limits. L is s well inside (2 µV off at 10 κ from a limit, 1e-10 V at 20 κ) and the limit well beyond; the
 * slope falls from 1 to 0, is half way at a limit and never negative: the product of two logistic functions.
 */
export function limited({ low, high }: LimitsAt, s: number, out: Limited): void {
  const over = high === null ? 0 : softplus((s - high) / KNEE);
  const under = low === null ? 0 : softplus((low - s) / KNEE);
  // Beyond a limit s would take its digits away, so that side is counted from the limit.
  if (high !== null && s > high) out.v = high - KNEE * softplus((high - s) / KNEE) + KNEE * under;
  else if (low !== null && s < low) out.v = low + KNEE * softplus((s - low) / KNEE) - KNEE * over;
  else out.v = s - KNEE * over + KNEE * under;
  out.slope = 1;
  if (high !== null) out.slope *= logistic((high - s) / KNEE);
  if (low !== null) out.slope *= logistic((s - low) / KNEE);
  if (high !== null && low !== null) out.slope *= -expm1((low - high) / KNEE);
}

/**
 * Where to take the limits as a straight line next: at `target`, but no step leads over a knee without resting on it, since from the far
 * side of a knee nothing tells how soon to turn back. A step from beyond one limit to beyond the other is taken whole where `mayJump`: so
 * positive feedback reaches the limit at which it stays.
 */
export function limitStep({ low, high }: LimitsAt, s: number, target: number, mayJump: boolean): number {
  const isBetween = (knee: number | null): knee is number =>
    knee !== null && (s < knee ? target > knee : s > knee && target < knee);
  if (isBetween(high) && isBetween(low)) return mayJump ? target : target > s ? low : high;
  if (isBetween(high)) return high;
  return isBetween(low) ? low : target;
}

function softplus(y: number): number {
  return y > 0 ? y + log1p(exp(-y)) : log1p(exp(y));
}

function logistic(y: number): number {
  if (y > 0) return 1 / (1 + exp(-y));
  const e = exp(y);
  return e / (1 + e);
}
