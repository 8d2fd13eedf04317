import { log } from "@/lib/units/elementary";
import { exp, expm1 } from "@/lib/units/exponential";
import { type CurrentAndSlope, type DiodeAt, diodeLaw, junctionOf } from "./diode";
import { junctionStep } from "./junction-step";
import { wrightOmega } from "./wright-omega";

/** How a diode breaks down at one temperature. */
export interface BreakdownAt {
  /** Reverse current in A at a reverse voltage of `volts` V. */
  readonly amperes: number;
  readonly volts: number;
  /** n·V_T of the breakdown, V. */
  readonly eta: number;
  /** For steps: the breakdown as a diode of its own, seen from `origin` V towards the reverse. */
  readonly mirror: DiodeAt;
  readonly origin: number;
}

/** Breakdown current at which its steps set out, A, as junctions start from 1 µA. */
const SETTING_OUT = 1e-6;

/** Newton steps for the junction voltage behind a series resistance; three or four serve. */
const MOST_STEPS = 60;

/** `amperes` at `volts` V; `eta` is n·V_T of the breakdown. */
export function breakdownAt({ Rs }: DiodeAt, amperes: number, volts: number, eta: number): BreakdownAt {
  const origin = Math.min(0, eta * log(amperes / SETTING_OUT) - volts);
  const Is = amperes * exp(-(origin + volts) / eta);
  return { amperes, volts, eta, mirror: { Is, eta, Rs, doubt: 0 }, origin };
}

/**
 * Current and slope at `v` V of a diode with reverse breakdown, I = Is·(e^(u/η) − 1) − I_b·(e^(−(u + V_b)/η_b) − e^(−V_b/η_b)) at the
 * junction voltage u = V − Rs·I. Source: the exponential form is the usual description of a sharp breakdown (common practice); its
 * last term lets no current flow at 0 V. Relative error of I below 1e-12 from V/η = −40,000 to 40,000.
 */
export function breakdownLaw(at: DiodeAt, reverse: BreakdownAt, v: number, out: CurrentAndSlope): void {
  if (at.Rs === 0) sumAt(at, reverse, v, out);
  else if (v < -reverse.volts / 2) beyond(at, reverse, v, out);
  else before(at, reverse, v, out);
}

/** Both exponentials at the junction voltage `u`, without resistance. */
function sumAt({ Is, eta }: DiodeAt, reverse: BreakdownAt, u: number, out: CurrentAndSlope): void {
  const { amperes, volts } = reverse;
  const y = u / eta;
  const e = expm1(y);
  const grown = exp(-(u + volts) / reverse.eta);
  out.i = Is * e - amperes * (grown - exp(-volts / reverse.eta));
  out.g = (Is / eta) * (y < -1 ? exp(y) : e + 1) + (amperes / reverse.eta) * grown;
}

/** Forward and below half the breakdown voltage: Newton from the junction voltage without breakdown, kept between 0 and V. */
function before(at: DiodeAt, reverse: BreakdownAt, v: number, out: CurrentAndSlope): void {
  const { Rs } = at;
  let u = junctionOf(at, v);
  let low = Math.min(0, v);
  let high = Math.max(0, v);
  for (let step = 0; step < MOST_STEPS; step++) {
    if (!(u >= low && u <= high)) u = (low + high) / 2;
    sumAt(at, reverse, u, out);
    const over = u + Rs * out.i - v;
    if (over > 0) high = u;
    else low = u;
    const change = over / (1 + Rs * out.g);
    u -= change;
    if (Math.abs(change) <= 1e-16 * Math.abs(u)) break;
  }
  sumAt(at, reverse, u, out);
  behind(at, v - u, out);
}

/** Near breakdown and beyond: the same in t = −u − V_b, which has the digits that u has lost, kept between −V_b and −V − V_b. */
function beyond(at: DiodeAt, reverse: BreakdownAt, v: number, out: CurrentAndSlope): void {
  const { Is, eta, Rs } = at;
  const { amperes, volts } = reverse;
  const past = -v - volts;
  const a = (amperes * Rs) / reverse.eta;
  let low = -volts;
  let high = past;
  let t = past - reverse.eta * wrightOmega(past / reverse.eta + log(a));
  for (let step = 0; step < MOST_STEPS; step++) {
    if (!(t >= low && t <= high)) t = (low + high) / 2;
    const grown = exp(t / reverse.eta);
    const forward = exp(-(t + volts) / eta);
    out.i = Is * (forward - 1) - amperes * (grown - exp(-volts / reverse.eta));
    out.g = (Is / eta) * forward + (amperes / reverse.eta) * grown;
    const over = t - Rs * out.i - past;
    if (over > 0) high = t;
    else low = t;
    const change = over / (1 + Rs * out.g);
    if (Math.abs(change) <= 1e-16 * Math.abs(t)) break;
    t -= change;
  }
  behind(at, t - past, out);
}

/** From the junction to the terminals: `drop` is the voltage over Rs, which has more digits than the exponential where it rules. */
function behind({ Rs }: DiodeAt, drop: number, out: CurrentAndSlope): void {
  const ratio = Rs * out.g;
  if (ratio > 1) out.i = drop / Rs;
  out.g /= 1 + ratio;
}

/** What the mirror carries; written by `breakdownStep` alone. */
const mirrored: CurrentAndSlope = { i: 0, g: 0 };

/**
 * The junction step of junction-step.ts where both ends of the characteristic rise. Beyond its origin the mirror is asked for its own
 * current, which is less than the diode's by what flows at the origin: with the diode's, steps near there would end before the target.
 */
export function breakdownStep(
  at: DiodeAt,
  { mirror, origin }: BreakdownAt,
  v: number,
  i: number,
  g: number,
  target: number,
): number {
  if (v < origin) {
    diodeLaw(mirror, origin - v, mirrored);
    const next = origin - junctionStep(mirror, origin - v, mirrored.i, mirrored.g, origin - target);
    return next > 0 ? fromRest(at, next) : next;
  }
  const next = junctionStep(at, v, i, g, target);
  return next < origin ? origin - fromRest(mirror, origin - next) : next;
}

/** A forward step of a junction at which no current flows yet. */
function fromRest(at: DiodeAt, target: number): number {
  return junctionStep(at, -1, 0, 0, target);
}
