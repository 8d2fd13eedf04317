import { thermalVoltage } from "@/lib/units/constants";
import { log, power } from "@/lib/units/elementary";
import { exp, expm1 } from "@/lib/units/exponential";
import type { DiodeAt } from "./diode";
import { UNIT } from "./rounding";
import { type SaturationTerms, saturationCurrent, saturationDoubt } from "./saturation";

/** A transistor as its model gives it; a term whose figure is null is dropped exactly. */
export interface BipolarTerms extends SaturationTerms {
  readonly beta_f: number | null;
  readonly beta_r: number | null;
  /** Early voltages, V. */
  readonly Va_f: number | null;
  readonly Va_r: number | null;
  /** Exponent of T/T0 in both gains. */
  readonly beta_power: number | null;
  /** Leakage of the base to emitter and collector: saturation current at T0, A, and ideality. */
  readonly I_leak_e: number | null;
  readonly n_leak_e: number;
  readonly I_leak_c: number | null;
  readonly n_leak_c: number;
  /** Currents at which high injection sets in, A. */
  readonly I_knee_f: number | null;
  readonly I_knee_r: number | null;
}

/** A transistor at one temperature. Both junctions share Is and n·V_T and have no resistance of their own. */
export interface BipolarAt extends DiodeAt {
  /** Is/beta_f and Is/beta_r, A; 0 without base current. */
  readonly forwardBase: number;
  readonly reverseBase: number;
  /** 1/Va_f and 1/Va_r, 1/V; 0 without Early effect. */
  readonly forwardEarly: number;
  readonly reverseEarly: number;
  /** Saturation current in A and n·V_T in V of the leakage to emitter and collector; 0 A without. */
  readonly leakE: number;
  readonly etaE: number;
  readonly leakC: number;
  readonly etaC: number;
  /** 1/I_knee_f and 1/I_knee_r, 1/A; 0 without high injection. */
  readonly forwardKnee: number;
  readonly reverseKnee: number;
}

/** A transistor of which nothing is known yet. */
export const NO_BIPOLAR: BipolarAt = {
  ...{ Is: 0, eta: 1, Rs: 0, doubt: 0, forwardBase: 0, reverseBase: 0, forwardEarly: 0, reverseEarly: 0 },
  ...{ leakE: 0, etaE: 1, leakC: 0, etaC: 1, forwardKnee: 0, reverseKnee: 0 },
};

/** Currents into collector and base (A) of an NPN and their slopes (S) by v_be (`F`) and v_bc (`R`). */
export interface BipolarCurrents {
  ic: number;
  ib: number;
  icF: number;
  icR: number;
  ibF: number;
  ibR: number;
}

export function bipolarAt(terms: BipolarTerms, kelvin: number): BipolarAt {
  const Is = saturationCurrent(terms, kelvin);
  const { beta_f, beta_r, Va_f, Va_r, beta_power, T0, n } = terms;
  const { I_leak_e, n_leak_e, I_leak_c, n_leak_c, I_knee_f, I_knee_r } = terms;
  const volts = thermalVoltage(kelvin);
  const leakE = { ...terms, Is: I_leak_e ?? 0, n: n_leak_e };
  const leakC = { ...terms, Is: I_leak_c ?? 0, n: n_leak_c };
  const doubts = [terms, leakE, leakC].map((junction) => saturationDoubt(junction, kelvin));
  const hasRise = beta_power !== null && kelvin !== T0;
  const rise = hasRise ? power(kelvin / T0, beta_power) : 1;
  const riseDoubt = hasRise ? Math.abs(beta_power) * (1 + Math.abs(log(kelvin / T0))) : 0;
  return {
    Is,
    eta: n * volts,
    Rs: 0,
    doubt: Math.max(...doubts) + UNIT * (4 * riseDoubt + 8),
    forwardBase: beta_f === null ? 0 : Is / (beta_f * rise),
    reverseBase: beta_r === null ? 0 : Is / (beta_r * rise),
    forwardEarly: Va_f === null ? 0 : 1 / Va_f,
    reverseEarly: Va_r === null ? 0 : 1 / Va_r,
    leakE: saturationCurrent(leakE, kelvin),
    etaE: n_leak_e * volts,
    leakC: saturationCurrent(leakC, kelvin),
    etaC: n_leak_c * volts,
    forwardKnee: I_knee_f === null ? 0 : 1 / I_knee_f,
    reverseKnee: I_knee_r === null ? 0 : 1 / I_knee_r,
  };
}

/**
 * Transport form of Ebers and Moll (Proc. IRE 42, 1954) with the Early effect (Early, Proc. IRE 40, 1952) as its linear factor:
 * I_c = I_t − Is/beta_r·(e^(v_bc/η) − 1), I_t = Is·(e^(v_be/η) − e^(v_bc/η))·a, a = 1 − v_bc/Va_f − v_be/Va_r,
 * I_b = Is/beta_f·(e^(v_be/η) − 1) + Is/beta_r·(e^(v_bc/η) − 1). Voltages in V of an NPN; a PNP reverses every sign.
 * `vce` = v_be − v_bc is given apart, since deep in saturation the difference of the two would have no digits left.
 *
 * Refinements of Gummel and Poon (Bell Syst. Tech. J. 49, 1970): leakage of its own ideality in each junction, part of I_b; and high
 * injection, by which I_t has a/(q_b·a) in place of a, where the base charge q_b solves q_b² = q_b/a + q_2 and
 * q_2 = Is/I_knee_f·(e^(v_be/η) − 1) + Is/I_knee_r·(e^(v_bc/η) − 1).
 */
export function bipolarLaw(at: BipolarAt, vbe: number, vbc: number, vce: number, out: BipolarCurrents): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly } = at;
  const perVolt = 1 / eta;
  const yf = vbe / eta;
  const yr = vbc / eta;
  const ef = expm1(yf);
  const er = yr < -40 ? -1 : expm1(yr);
  const tf = yf < -1 ? exp(yf) : ef + 1;
  const tr = yr < -1 ? exp(yr) : er + 1;
  const transport = Is * (Math.abs(vce) > eta ? tf - tr : difference(tf, tr, vce / eta));
  const early = 1 - vbc * forwardEarly - vbe * reverseEarly;
  const slopeF = Is * tf * perVolt;
  const slopeR = Is * tr * perVolt;
  out.ib = forwardBase * ef + reverseBase * er;
  out.ibF = forwardBase * tf * perVolt;
  out.ibR = reverseBase * tr * perVolt;
  let intoC = reverseBase * er;
  if (at.leakE !== 0) {
    out.ib += at.leakE * expm1(vbe / at.etaE);
    out.ibF += (at.leakE / at.etaE) * exp(vbe / at.etaE);
  }
  if (at.leakC !== 0) {
    const leak = at.leakC * expm1(vbc / at.etaC);
    out.ib += leak;
    intoC += leak;
    out.ibR += (at.leakC / at.etaC) * exp(vbc / at.etaC);
  }
  let factor = early;
  let byEarly = 1;
  let byCharge = 0;
  if (at.forwardKnee !== 0 || at.reverseKnee !== 0) {
    const root = Math.sqrt(1 + 4 * early * early * Is * (at.forwardKnee * ef + at.reverseKnee * er));
    factor = (2 * early) / (1 + root);
    byEarly = 2 / (root * (1 + root));
    byCharge = (-early * factor * factor) / root;
  }
  out.ic = transport * factor - intoC;
  out.icF = slopeF * factor + transport * (byCharge * at.forwardKnee * slopeF - byEarly * reverseEarly);
  out.icR =
    -slopeR * factor + transport * (byCharge * at.reverseKnee * slopeR - byEarly * forwardEarly) - out.ibR;
}

/** tf − tr where tf/tr = e^y and the two are close, from y. */
function difference(tf: number, tr: number, y: number): number {
  return y > 0 ? -tf * expm1(-y) : tr * expm1(y);
}
