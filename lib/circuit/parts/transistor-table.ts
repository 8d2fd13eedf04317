import { expm1 } from "@/lib/units/exponential";
import { FREE, type JunctionPart } from "../part";
import type { State } from "../state";
import type { Table } from "../table";

/** A row's numbers: collector, base, emitter, +1 for an npn or −1 for a pnp, and the places of rows c, b, e by columns c, b, e. */
export const TRANSISTOR_NUMBERS = 13;

/**
 * A row's figures: Is (A), n·V_T (V) and its inverse, Is/beta_f, Is/beta_r (A), 1/Va_f, 1/Va_r (1/V); the voltages at which it is
 * linearised (V), and e^(v_be/η) − e^(v_bc/η) there.
 */
export const TRANSISTOR_FIGURES = 11;
export const [IS, ETA, PER_VOLT, BASE_F, BASE_R, EARLY_F, EARLY_R] = [0, 1, 2, 3, 4, 5, 6] as const;
export const [VBE, VBC, VCE, RISE] = [7, 8, 9, 10] as const;

/** The exponents of plain transistors into `ys` from `first`, v_be/η and v_bc/η of each. */
export function askTransistors({ figures, count }: Table, ys: Float64Array, first: number): void {
  for (let k = 0, at = 0, e = first; k < count; k++, at += TRANSISTOR_FIGURES, e += 2) {
    const eta = figures[at + ETA]!;
    ys[e] = figures[at + VBE]! / eta;
    ys[e + 1] = figures[at + VBC]! / eta;
  }
}

/** The differences of the two exponentials; deep in saturation, where they have no digits in common, from v_ce. */
export function riseTransistors({ figures, count }: Table, whole: Float64Array, first: number): void {
  for (let k = 0, at = 0, e = first; k < count; k++, at += TRANSISTOR_FIGURES, e += 2) {
    const eta = figures[at + ETA]!;
    const vce = figures[at + VCE]!;
    const tf = whole[e]!;
    const tr = whole[e + 1]!;
    if (Math.abs(vce) > eta) figures[at + RISE] = tf - tr;
    else figures[at + RISE] = vce > 0 ? -tf * expm1(-(vce / eta)) : tr * expm1(vce / eta);
  }
}

/**
 * Adds the plain transistors [from, to): the law of `bipolarLaw` without leakage and high injection, with e^y − 1 and e^y of their
 * exponents, which begin at `first`. With `isSettled` every one is linearised at its actual voltages.
 */
export function addTransistors(
  { numbers, figures }: Table,
  from: number,
  to: number,
  state: State,
  less: Float64Array,
  whole: Float64Array,
  first: number,
  isSettled: boolean,
): void {
  const { x, low, residual, scale, jacobian } = state;
  let n = from * TRANSISTOR_NUMBERS;
  let at = from * TRANSISTOR_FIGURES;
  let e = first + 2 * from;
  for (let k = from; k < to; k++, n += TRANSISTOR_NUMBERS, at += TRANSISTOR_FIGURES, e += 2) {
    const Is = figures[at + IS]!;
    const perVolt = figures[at + PER_VOLT]!;
    const tf = whole[e]!;
    const tr = whole[e + 1]!;
    const vbe = figures[at + VBE]!;
    const vbc = figures[at + VBC]!;
    const forwardEarly = figures[at + EARLY_F]!;
    const reverseEarly = figures[at + EARLY_R]!;
    const transport = Is * figures[at + RISE]!;
    const early = 1 - vbc * forwardEarly - vbe * reverseEarly;
    const ibF = figures[at + BASE_F]! * tf * perVolt;
    const ibR = figures[at + BASE_R]! * tr * perVolt;
    const reverse = figures[at + BASE_R]! * less[e + 1]!;
    const icF = Is * tf * perVolt * early - transport * reverseEarly;
    const icR = -(Is * tr * perVolt) * early - transport * forwardEarly - ibR;
    let ic = transport * early - reverse;
    let ib = figures[at + BASE_F]! * less[e]! + reverse;
    const pinC = numbers[n]!;
    const pinB = numbers[n + 1]!;
    const pinE = numbers[n + 2]!;
    const sign = numbers[n + 3]!;
    if (!isSettled) {
      const be = sign * (x[pinB]! - x[pinE]! + (low[pinB]! - low[pinE]!)) - vbe;
      const bc = sign * (x[pinB]! - x[pinC]! + (low[pinB]! - low[pinC]!)) - vbc;
      ic = ic + icF * be + icR * bc;
      ib = ib + ibF * be + ibR * bc;
    }
    ic *= sign;
    ib *= sign;
    const ie = -ic - ib;
    // In saturation a pin's current is what two much larger ones leave over; the slopes tell how large these are.
    const intoC = figures[at + ETA]! * (Math.abs(icF) + Math.abs(icR));
    const intoB = figures[at + ETA]! * (ibF + ibR);
    residual[pinC]! += ic;
    residual[pinB]! += ib;
    residual[pinE]! += ie;
    scale[pinC]! += Math.abs(ic) + intoC;
    scale[pinB]! += Math.abs(ib) + intoB;
    scale[pinE]! += Math.abs(ie) + (intoC + intoB);
    const place = n + 4;
    const byB = icF + icR;
    const baseByB = ibF + ibR;
    jacobian[numbers[place]!]! -= icR;
    jacobian[numbers[place + 1]!]! += byB;
    jacobian[numbers[place + 2]!]! -= icF;
    jacobian[numbers[place + 3]!]! -= ibR;
    jacobian[numbers[place + 4]!]! += baseByB;
    jacobian[numbers[place + 5]!]! -= ibF;
    jacobian[numbers[place + 6]!]! += icR + ibR;
    jacobian[numbers[place + 7]!]! -= byB + baseByB;
    jacobian[numbers[place + 8]!]! += icF + ibF;
  }
}

/** As `settle` of every part. */
export function settleTransistors({ numbers, figures, count }: Table, { x, low }: State): void {
  let n = 0;
  let at = 0;
  for (let k = 0; k < count; k++, n += TRANSISTOR_NUMBERS, at += TRANSISTOR_FIGURES) {
    const c = numbers[n]!;
    const b = numbers[n + 1]!;
    const e = numbers[n + 2]!;
    const sign = numbers[n + 3]!;
    figures[at + VBE] = sign * (x[b]! - x[e]! + (low[b]! - low[e]!));
    figures[at + VBC] = sign * (x[b]! - x[c]! + (low[b]! - low[c]!));
    figures[at + VCE] = sign * (x[c]! - x[e]! + (low[c]! - low[e]!));
  }
}

/** As `follow` of every part; a part is asked only where a voltage of its moves far. */
export function followTransistors(table: Table<JunctionPart>, state: State): boolean {
  const { numbers, figures, count, owners } = table;
  const { x, low } = state;
  let isExact = true;
  let n = 0;
  let at = 0;
  for (let k = 0; k < count; k++, n += TRANSISTOR_NUMBERS, at += TRANSISTOR_FIGURES) {
    const c = numbers[n]!;
    const b = numbers[n + 1]!;
    const e = numbers[n + 2]!;
    const sign = numbers[n + 3]!;
    const vbe = sign * (x[b]! - x[e]! + (low[b]! - low[e]!));
    const vbc = sign * (x[b]! - x[c]! + (low[b]! - low[c]!));
    const free = FREE * figures[at + ETA]!;
    if (Math.abs(vbe - figures[at + VBE]!) <= free && Math.abs(vbc - figures[at + VBC]!) <= free) {
      figures[at + VBE] = vbe;
      figures[at + VBC] = vbc;
      figures[at + VCE] = sign * (x[c]! - x[e]! + (low[c]! - low[e]!));
    } else if (!owners[k]!.follow(state)) isExact = false;
  }
  return isExact;
}
