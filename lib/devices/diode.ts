import { thermalVoltage } from "@/lib/units/constants";
import { log, log1p } from "@/lib/units/elementary";
import { exp, expm1 } from "@/lib/units/exponential";
import { type SaturationTerms, saturationCurrent, saturationDoubt } from "./saturation";
import { wrightOmega } from "./wright-omega";

/** A diode at one temperature. */
export interface DiodeAt {
  /** Saturation current, A. */
  readonly Is: number;
  /** n·V_T, V. */
  readonly eta: number;
  /** Series resistance, Ω; 0 for none. */
  readonly Rs: number;
  /** Relative error of Is by rounding. */
  readonly doubt: number;
}

/** Where a law writes its current (A) and slope (S), so that the inner loop does not allocate. */
export interface CurrentAndSlope {
  i: number;
  g: number;
}

export function diodeAt(terms: SaturationTerms, Rs: number | null, kelvin: number): DiodeAt {
  return {
    Is: saturationCurrent(terms, kelvin),
    eta: terms.n * thermalVoltage(kelvin),
    Rs: Rs ?? 0,
    doubt: saturationDoubt(terms, kelvin),
  };
}

/**
 * Current and slope at `v` V from anode to cathode, I = Is·(exp(V/(n·V_T)) − 1) (Shockley, Bell Syst. Tech. J. 28, 1949). With a
 * series resistance the junction voltage is eliminated by the Wright omega function (Corless et al., Adv. Comput. Math. 5, 1996;
 * Banwell and Jayakumar, Electron. Lett. 36, 2000). Relative error of I below 1e-13 from reverse to V/(n·V_T) = 40,000.
 */
export function diodeLaw(at: DiodeAt, v: number, out: CurrentAndSlope): void {
  if (at.Rs !== 0) {
    withResistance(at, v, out);
    return;
  }
  const { Is, eta } = at;
  const y = v / eta;
  const e = expm1(y);
  out.i = Is * e;
  out.g = (Is / eta) * (y < -1 ? exp(y) : e + 1);
}

/**
 * With y the junction voltage and a = Is·Rs in units of n·V_T, y + a·(e^y − 1) = V/(n·V_T). Where the drop over Rs rules, w = a·e^y
 * carries the digits and I = n·V_T·w/Rs − Is; elsewhere y does, after a Newton step on the equation itself, and I = Is·(e^y − 1).
 */
function withResistance({ Is, eta, Rs }: DiodeAt, v: number, out: CurrentAndSlope): void {
  const u = v / eta;
  const a = (Is * Rs) / eta;
  const w = wrightOmega(u + a + log(a));
  if (w > 1 && w > 4 * a) {
    out.i = (eta * w) / Rs - Is;
    out.g = w / (1 + w) / Rs;
    return;
  }
  let y = u + a - w;
  for (let step = 0; step < 2; step++) {
    const e = expm1(y);
    y -= (y + a * e - u) / (1 + a * (e + 1));
  }
  const slope = (Is / eta) * exp(y);
  out.i = Is * expm1(y);
  out.g = slope / (1 + Rs * slope);
}

/** The junction voltage in V, V less the drop over Rs, good to a few roundings of V. */
export function junctionOf({ Is, eta, Rs }: DiodeAt, v: number): number {
  const a = (Is * Rs) / eta;
  return v + eta * (a - wrightOmega(v / eta + a + log(a)));
}

/** The voltage in V at which the diode carries `i` A: V = n·V_T·ln(1 + I/Is) + Rs·I. NaN below −Is. */
export function diodeVoltage({ Is, eta, Rs }: DiodeAt, i: number): number {
  return eta * log1p(i / Is) + Rs * i;
}
