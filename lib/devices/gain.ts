/**
 * A linear block holds v_out = ratio·(v_plus − v_minus) and takes no current at its inputs. `difference` is v_plus − v_minus in V. Gives
 * the mismatch in V; its slopes are 1 for v_out, −ratio for v_plus and +ratio for v_minus. Temperature does not enter.
 */
export function gainMismatch(vout: number, difference: number, ratio: number): number {
  return vout - ratio * difference;
}
