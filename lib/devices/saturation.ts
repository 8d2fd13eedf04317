import { thermalVoltage } from "@/lib/units/constants";
import { log, power } from "@/lib/units/elementary";
import { exp } from "@/lib/units/exponential";
import { UNIT } from "./rounding";

/** How a saturation current follows temperature. A term whose figure is null is dropped. */
export interface SaturationTerms {
  /** Saturation current at T0, A. */
  readonly Is: number;
  /** Ideality factor, a pure number. */
  readonly n: number;
  /** Band gap, V. */
  readonly Eg: number | null;
  /** Exponent of T/T0, a pure number. */
  readonly x: number | null;
  /** Temperature at which the figures hold, K. */
  readonly T0: number;
}

/**
 * Is(T) = Is·(T/T0)^(x/n)·exp(Eg/(n·k/q)·(1/T0 − 1/T)) in A at `kelvin` K; exactly Is at T0. Source: Sze and Ng, Physics of
 * Semiconductor Devices, 3rd ed. (2007), section 2.3 (from memory); the exponent is written Eg/(n·V_T(T0))·(T − T0)/T, which
 * keeps its digits near T0. Relative error below 1e-14 where the exponent stays within ±40.
 */
export function saturationCurrent({ Is, n, Eg, x, T0 }: SaturationTerms, kelvin: number): number {
  if (kelvin === T0) return Is;
  let current = Is;
  if (x !== null) current *= power(kelvin / T0, x / n);
  if (Eg !== null) current *= exp((Eg / (n * thermalVoltage(T0))) * ((kelvin - T0) / kelvin));
  return current;
}

/** Relative error of `saturationCurrent`, by the roundings in its base, exponents and product. */
export function saturationDoubt({ n, Eg, x, T0 }: SaturationTerms, kelvin: number): number {
  if (kelvin === T0) return 0;
  const power = x === null ? 0 : Math.abs(x / n) * (1 + Math.abs(log(kelvin / T0)));
  const exponent = Eg === null ? 0 : Math.abs((Eg / (n * thermalVoltage(T0))) * ((kelvin - T0) / kelvin));
  return UNIT * (4 * power + 12 * exponent + 12);
}
