/** Unit roundoff of binary64, the largest relative error of one operation. */
export const UNIT = 2 ** -53;

/**
 * Relative error of e^y as the laws compute it at y = v/(n·kT/q), per unit of the true value: y carries at most twelve roundings (voltage
 * 3, k·T/q with rounded constants 5, ideality and quotient 4), each worth |y| roundings of the exponential. exp, expm1, log
 * and pow are taken to be within two units in the last place, as the engines' tests of their fdlibm routines hold them.
 */
export function exponentialDoubt(y: number): number {
  return UNIT * (12 * Math.abs(y) + 16);
}
