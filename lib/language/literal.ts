import { ZERO_CELSIUS } from "@/lib/units/constants";
import { ENGINEERING } from "@/lib/units/prefix";
import { UNITS } from "@/lib/units/unit";

/**
 * A quantity as the language writes it, to 15 significant digits: `value` coherent SI, `unit` "°C" or a coherent unit. Units that
 * take prefixes get the one that leaves 1 to 999 before the point.
 */
export function spellQuantity(value: number, unit: string): string {
  if (unit === "°C") return `${Number((value - ZERO_CELSIUS).toPrecision(12))} °C`;
  if (unit === "1") return String(Number(value.toPrecision(15)));
  const step = value === 0 || unit === "K" ? 0 : 3 * Math.floor(Math.log10(Math.abs(value)) / 3 + 1e-12);
  const prefix = UNITS.has(unit) ? ENGINEERING.get(step) : undefined;
  if (prefix === undefined) return `${Number(value.toPrecision(15))} ${unit}`;
  const shifted = step < 0 ? value * 10 ** -step : value / 10 ** step;
  return `${Number(shifted.toPrecision(15))} ${prefix}${unit}`;
}
