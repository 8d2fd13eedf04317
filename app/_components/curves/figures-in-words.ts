import { formatAxis, formatQuantity } from "@/lib/units/quantity";

/** A knob as axes and labels need it. */
export interface KnobUnit {
  readonly knob: string;
  readonly unit: string;
}

const ZERO_CELSIUS = 273.15;

/** The ambient temperature is written in degrees Celsius, as in the netlist; every other quantity in its coherent unit. */
export function isAmbient({ knob, unit }: KnobUnit): boolean {
  return knob === "temperature" && unit === "K";
}

/** The unit a knob's values are written in. */
export function shownUnit(axis: KnobUnit): string {
  return isAmbient(axis) ? "°C" : axis.unit;
}

/** A knob's value as the number that is written, without the crumbs of 298.15 − 273.15. */
export function shownValue(axis: KnobUnit, value: number): number {
  return isAmbient(axis) ? Number((value - ZERO_CELSIUS).toPrecision(12)) : value;
}

/** The inverse of `shownValue`. */
export function coherentValue(axis: KnobUnit, shown: number): number {
  return isAmbient(axis) ? Number((shown + ZERO_CELSIUS).toPrecision(12)) : shown;
}

/** A knob's value in short, as on a label, with `digits` significant digits at most: "25 °C", "10 nA". */
export function formatKnob(axis: KnobUnit, value: number, digits = 6): string {
  return formatAxis(Number(shownValue(axis, value).toPrecision(digits)), shownUnit(axis));
}

/** A value of a trace, six significant digits; "no value" where unsolved. */
export function formatValue(value: number | null, unit: string): string {
  return value === null ? "no value" : formatQuantity(value, unit, 6);
}
