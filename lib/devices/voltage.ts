/**
 * A voltage element raises the potential from left to right: v_right − v_left − V = 0. `across` is v_left − v_right in V, `volts`
 * is V. Gives the mismatch in V; its slopes are −1 for v_left and +1 for v_right. Temperature does not enter.
 */
export function voltageMismatch(across: number, volts: number): number {
  return -across - volts;
}
