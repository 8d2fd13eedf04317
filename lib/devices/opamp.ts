/**
 * Operational amplifier, vout = A·(v_plus + offset − v_minus) with a bias current flowing into each input. The law is kept
 * divided by A, v_plus − v_minus + offset − vout/A = 0, so that the ideal amplifier, a nullor (Carlin, Proc. IEEE 52, 1964, from
 * memory), is the same law without its last term and not a gain of 1e9. `inverseGain` is 1/A, or 0 for an ideal one.
 * `difference` is v_plus − v_minus in V. Gives the mismatch in V; slopes are +1, −1 and −1/A. Temperature does not enter.
 */
export function opampMismatch(difference: number, offset: number, vout: number, inverseGain: number): number {
  return difference + offset - vout * inverseGain;
}
