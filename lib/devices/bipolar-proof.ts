import { exp, expm1 } from "@/lib/units/exponential";
import type { BipolarAt, BipolarCurrents } from "./bipolar";
import { exponentialDoubt, UNIT } from "./rounding";

/** Bounds on collector and base current or on their slopes by v_be (`F`) and v_bc (`R`); a BipolarCurrents used for magnitudes. */
type Bounds = BipolarCurrents;

/**
 * The most by which `bipolarLaw` may be off at (v_be, v_bc) by rounding: `ic` and `ib` of `out`, A. Each exponential has its own relative
 * error, the Early factor is a sum of three terms, and the base charge passes both on by its slopes.
 */
export function bipolarDoubt(at: BipolarAt, vbe: number, vbc: number, out: Bounds): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly, doubt } = at;
  const forward = (exp(vbe / eta) + 1) * (doubt + exponentialDoubt(vbe / eta));
  const reverse = (exp(vbc / eta) + 1) * (doubt + exponentialDoubt(vbc / eta));
  const early = 1 + Math.abs(vbc) * forwardEarly + Math.abs(vbe) * reverseEarly;
  const leakE = leakDoubt(at.leakE, at.etaE, vbe, doubt);
  const leakC = leakDoubt(at.leakC, at.etaC, vbc, doubt);
  out.ic = Is * (forward + reverse) * early + reverseBase * reverse + leakC;
  out.ib = forwardBase * forward + reverseBase * reverse + leakE + leakC;
  if (at.forwardKnee === 0 && at.reverseKnee === 0) return;
  const { factor, byEarly, byCharge } = chargeWithin(at, vbe, vbc, 0);
  const charge = Is * (at.forwardKnee * forward + at.reverseKnee * reverse);
  const transport = Is * (exp(vbe / eta) + exp(vbc / eta));
  const change = 8 * UNIT * early * byEarly.high + charge * byCharge.high + 16 * UNIT * factor;
  out.ic = Is * (forward + reverse) * factor + transport * change + reverseBase * reverse + leakC;
}

/**
 * The most by which the slopes can differ from those computed while v_be and v_bc each stay within `delta` V: `icF`, `icR`, `ibF`, `ibR` of
 * `out`, S. An exponential changes by its e^(delta/η) − 1 at most, the Early factor by delta·(1/Va_f + 1/Va_r).
 */
export function bipolarSpread(at: BipolarAt, vbe: number, vbc: number, delta: number, out: Bounds): void {
  const { Is, eta, forwardBase, reverseBase, forwardEarly, reverseEarly, doubt } = at;
  const rise = expm1(delta / eta);
  const tf = exp(vbe / eta);
  const tr = exp(vbc / eta);
  const changeF = tf * (rise + doubt + 4 * exponentialDoubt(vbe / eta));
  const changeR = tr * (rise + doubt + 4 * exponentialDoubt(vbc / eta));
  const tilt = delta * (forwardEarly + reverseEarly);
  const early = 1 + Math.abs(vbc) * forwardEarly + Math.abs(vbe) * reverseEarly + tilt;
  const transport = Is * (changeF + changeR);
  out.ibF = (forwardBase * changeF) / eta + leakSpread(at.leakE, at.etaE, vbe, delta, doubt);
  out.ibR = (reverseBase * changeR) / eta + leakSpread(at.leakC, at.etaC, vbc, delta, doubt);
  out.icF = (Is * (changeF * early + tf * tilt)) / eta + transport * reverseEarly;
  out.icR = (Is * (changeR * early + tr * tilt)) / eta + transport * forwardEarly + out.ibR;
  if (at.forwardKnee === 0 && at.reverseKnee === 0) return;
  const charge = chargeWithin(at, vbe, vbc, delta);
  const most = Is * (tf + tr);
  const shift =
    charge.byEarly.high * tilt +
    charge.byCharge.high * Is * (at.forwardKnee * changeF + at.reverseKnee * changeR);
  const side = (t: number, change: number, knee: number, tilts: number): number =>
    (Is * (change * charge.factor + (t + change) * (shift + 16 * UNIT * charge.factor))) / eta +
    (transport * charge.byCharge.high + most * charge.byCharge.spread) * knee * (Is / eta) * (t + change) +
    most * charge.byCharge.high * knee * (Is / eta) * change +
    (transport * charge.byEarly.high + most * charge.byEarly.spread) * tilts;
  out.icF = side(tf, changeF, at.forwardKnee, reverseEarly);
  out.icR = side(tr, changeR, at.reverseKnee, forwardEarly) + out.ibR;
}

function leakDoubt(Is: number, eta: number, v: number, doubt: number): number {
  return Is === 0 ? 0 : Is * (exp(v / eta) + 1) * (doubt + exponentialDoubt(v / eta));
}

function leakSpread(Is: number, eta: number, v: number, delta: number, doubt: number): number {
  if (Is === 0) return 0;
  return (Is / eta) * exp(v / eta) * (expm1(delta / eta) + doubt + 4 * exponentialDoubt(v / eta));
}

/** The largest magnitude of a slope within a box, and the most by which it changes there. */
interface Range {
  readonly high: number;
  readonly spread: number;
}

/**
 * The factor h = 2a/(1 + r), r = √(1 + 4·a²·q_2), that takes the Early factor a's place under high injection, and its slopes by a and by
 * q_2, 2/(r·(1 + r)) and −a·h²/r, while v_be and v_bc stay within `delta`: all three fall with r and rise with |a|. Not finite where the box
 * reaches r near 0.
 */
function chargeWithin(
  { Is, eta, forwardEarly, reverseEarly, forwardKnee, reverseKnee }: BipolarAt,
  vbe: number,
  vbc: number,
  delta: number,
): { readonly factor: number; readonly byEarly: Range; readonly byCharge: Range } {
  const early = Math.abs(1 - vbc * forwardEarly - vbe * reverseEarly);
  const room = delta * (forwardEarly + reverseEarly) + 8 * UNIT * (1 + early);
  const [least, most] = [Math.max(0, early - room), early + room];
  const rise = exp(delta / eta) * (1 + 4 * exponentialDoubt(Math.max(Math.abs(vbe), Math.abs(vbc)) / eta));
  const up = Is * (forwardKnee * exp(vbe / eta) + reverseKnee * exp(vbc / eta));
  const off = Is * (forwardKnee + reverseKnee);
  const root = (a: number, q: number) => Math.sqrt(1 + 4 * a * a * q);
  // With q_2 below 0 a larger |a| makes r smaller, with q_2 above 0 larger.
  const low = up / rise - off;
  const high = up * rise - off;
  const near = root(low < 0 ? most : least, low) * (1 - 4 * UNIT);
  const far = root(high < 0 ? least : most, high) * (1 + 4 * UNIT);
  if (!(near > 0.1)) return { factor: Infinity, byEarly: NOWHERE, byCharge: NOWHERE };
  const factor = (2 * most) / (1 + near);
  const smallest = (2 * least) / (1 + far);
  const byEarly = 2 / (near * (1 + near));
  const byCharge = (most * factor * factor) / near;
  return {
    factor,
    byEarly: { high: byEarly, spread: byEarly - 2 / (far * (1 + far)) + 8 * UNIT * byEarly },
    byCharge: {
      high: byCharge,
      spread: byCharge - (least * smallest * smallest) / far + 8 * UNIT * byCharge,
    },
  };
}

const NOWHERE: Range = { high: Infinity, spread: Infinity };
