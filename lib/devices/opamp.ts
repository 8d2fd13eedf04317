/**
 * Operational amplifier, vout = A·(v_plus + offset − v_minus) − R_out·i_out with bias currents into the inputs. The law is kept
 * divided by A, v_plus − v_minus + offset − (vout + R_out·i_out)/A = 0, so that the ideal amplifier, a nullor (Carlin, Proc. IEEE
 * 52, 1964, from memory), is the same law without its last term and not a gain of 1e9. `inverseGain` is 1/A, or 0 for an ideal one.
 * `difference` is v_plus − v_minus in V, `behind` the voltage behind the output resistance, vout + R_out·i_out, where i_out leaves the
 * output. Gives the mismatch in V; slopes are +1, −1, −1/A and, by i_out, −R_out/A.
 */
export function opampMismatch(
  difference: number,
  offset: number,
  behind: number,
  inverseGain: number,
): number {
  return difference + offset - behind * inverseGain;
}

/** The offset in V at `kelvin` K: `volts` at `T0` K and `drift` V/K from there, null for none. */
export function offsetAt(volts: number, drift: number | null, T0: number, kelvin: number): number {
  return drift === null ? volts : volts + drift * (kelvin - T0);
}

/** The bias current into the plus input (`side` 1) or the minus input (−1), A: half of `difference` is plus's share more. */
export function biasInto(side: 1 | -1, mean: number, difference: number): number {
  return mean + (side * difference) / 2;
}
