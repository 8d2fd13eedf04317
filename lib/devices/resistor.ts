import { ROOM_TEMPERATURE } from "@/lib/units/constants";

/**
 * Ohm's law i = v/R with R(T) = R·(1 + drift·(T − 298.15 K)); `ohms` is R at 25 °C, `drift` in 1/K or null for none, `kelvin` the
 * temperature in K. Gives the conductance 1/R(T) in S, which is both the law and its slope; not finite where R(T) is 0.
 */
export function conductance(ohms: number, drift: number | null, kelvin: number): number {
  return 1 / (drift === null ? ohms : ohms * (1 + drift * (kelvin - ROOM_TEMPERATURE)));
}
