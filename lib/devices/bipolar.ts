import { thermalVoltage } from "@/lib/units/constants";
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
}

/** A transistor at one temperature. Both junctions share Is and n·V_T and have no resistance of their own. */
export interface BipolarAt extends DiodeAt {
  /** Is/beta_f and Is/beta_r, A; 0 without base current. */
  readonly forwardBase: number;
  readonly reverseBase: number;
  /** 1/Va_f and 1/Va_r, 1/V; 0 without Early effect. */
  readonly forwardEarly: number;
  readonly reverseEarly: number;
}

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
  const hasRise = beta_power !== null && kelvin !== T0;
  const rise = hasRise ? (kelvin / T0) ** beta_power : 1;
  const riseDoubt = hasRise ? Math.abs(beta_power) * (1 + Math.abs(Math.log(kelvin / T0))) : 0;
  return {
    Is,
    eta: n * thermalVoltage(kelvin),
    Rs: 0,
    doubt: saturationDoubt(terms, kelvin) + UNIT * (4 * riseDoubt + 8),
    forwardBase: beta_f === null ? 0 : Is / (beta_f * rise),
    reverseBase: beta_r === null ? 0 : Is / (beta_r * rise),
    forwardEarly: Va_f === null ? 0 : 1 / Va_f,
    reverseEarly: Va_r === null ? 0 : 1 / Va_r,
  };
}

/**
 * Transport form of Ebers and Moll (Proc. IRE 42, 1954) with the Early effect (Early, Proc. IRE 40, 1952) as its linear factor:
 * I_c = Is·(e^(v_be/η) − e^(v_bc/η))·(1 − v_bc/Va_f − v_be/Va_r) − Is/beta_r·(e^(v_bc/η) − 1),
 * I_b = Is/beta_f·(e^(v_be/η) − 1) + Is/beta_r·(e^(v_bc/η) − 1). Voltages in V of an NPN; a PNP reverses every sign.
 * `vce` = v_be − v_bc is given apart, since deep in saturation the difference of the two would have no digits left.
 */
export function bipolarLaw(at: BipolarAt, vbe: number, vbc: number, vce: number, out: BipolarCurrents): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly } = at;
  const yf = vbe / eta;
  const yr = vbc / eta;
  const ef = Math.expm1(yf);
  const er = yr < -40 ? -1 : Math.expm1(yr);
  const tf = yf < -1 ? Math.exp(yf) : ef + 1;
  const tr = yr < -1 ? Math.exp(yr) : er + 1;
  const transport = Is * difference(tf, tr, vce / eta);
  const early = 1 - vbc * forwardEarly - vbe * reverseEarly;
  const slopeF = (Is * tf) / eta;
  const slopeR = (Is * tr) / eta;
  out.ic = transport * early - reverseBase * er;
  out.ib = forwardBase * ef + reverseBase * er;
  out.icF = slopeF * early - transport * reverseEarly;
  out.ibF = (forwardBase * tf) / eta;
  out.ibR = (reverseBase * tr) / eta;
  out.icR = -slopeR * early - transport * forwardEarly - out.ibR;
}

/** tf − tr where tf/tr = e^y, from y where the two are close. */
function difference(tf: number, tr: number, y: number): number {
  if (Math.abs(y) > 1) return tf - tr;
  return y > 0 ? -tf * Math.expm1(-y) : tr * Math.expm1(y);
}
