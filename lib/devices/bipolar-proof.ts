import type { BipolarAt, BipolarCurrents } from "./bipolar";
import { exponentialDoubt } from "./rounding";

/** Bounds on collector and base current or on their slopes by v_be (`F`) and v_bc (`R`); a BipolarCurrents used for magnitudes. */
type Bounds = BipolarCurrents;

/**
 * The most by which `bipolarLaw` may be off at (v_be, v_bc) by rounding: `ic` and `ib` of `out`, A. Each exponential has its own relative
 * error, and the Early factor is a sum of three terms.
 */
export function bipolarDoubt(at: BipolarAt, vbe: number, vbc: number, out: Bounds): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly, doubt } = at;
  const forward = (Math.exp(vbe / eta) + 1) * (doubt + exponentialDoubt(vbe / eta));
  const reverse = (Math.exp(vbc / eta) + 1) * (doubt + exponentialDoubt(vbc / eta));
  const early = 1 + Math.abs(vbc) * forwardEarly + Math.abs(vbe) * reverseEarly;
  out.ic = Is * (forward + reverse) * early + reverseBase * reverse;
  out.ib = forwardBase * forward + reverseBase * reverse;
}

/**
 * The most by which the slopes can differ from those computed while v_be and v_bc each stay within `delta` V: `icF`, `icR`, `ibF`, `ibR` of
 * `out`, S. An exponential changes by its e^(delta/η) − 1 at most, the Early factor by delta·(1/Va_f + 1/Va_r).
 */
export function bipolarSpread(at: BipolarAt, vbe: number, vbc: number, delta: number, out: Bounds): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly, doubt } = at;
  const rise = Math.expm1(delta / eta);
  const tf = Math.exp(vbe / eta);
  const tr = Math.exp(vbc / eta);
  const changeF = tf * (rise + doubt + 4 * exponentialDoubt(vbe / eta));
  const changeR = tr * (rise + doubt + 4 * exponentialDoubt(vbc / eta));
  const tilt = delta * (forwardEarly + reverseEarly);
  const early = 1 + Math.abs(vbc) * forwardEarly + Math.abs(vbe) * reverseEarly + tilt;
  const transport = Is * (changeF + changeR);
  out.ibF = (forwardBase * changeF) / eta;
  out.ibR = (reverseBase * changeR) / eta;
  out.icF = (Is * (changeF * early + tf * tilt)) / eta + transport * reverseEarly;
  out.icR = (Is * (changeR * early + tr * tilt)) / eta + transport * forwardEarly + out.ibR;
}
