/**
 * Constants that the SI fixes exactly (SI Brochure, 9th ed., BIPM 2019, section 2.2). V_T = kT/q
 * follows from them with two roundings.
 */

/** Boltzmann constant k, J/K. */
export const BOLTZMANN = 1.380649e-23;

/** Elementary charge q, C. */
export const ELEMENTARY_CHARGE = 1.602176634e-19;

/** 0 °C on the kelvin scale, K (SI Brochure, section 2.3.1). */
export const ZERO_CELSIUS = 273.15;

/** Temperature that every netlist starts from, 25 °C, in K. */
export const ROOM_TEMPERATURE = 298.15;

/** Thermal voltage V_T = k·T/q in V at `kelvin` K. */
export function thermalVoltage(kelvin: number): number {
  return (BOLTZMANN * kelvin) / ELEMENTARY_CHARGE;
}
