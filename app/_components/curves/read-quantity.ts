import { sameDimension } from "@/lib/units/dimension";
import { formatAxis } from "@/lib/units/quantity";
import { parseUnit, toCoherent } from "@/lib/units/unit";
import { coherentValue, isAmbient, type KnobUnit, shownUnit } from "./figures-in-words";

export type Read = { readonly value: number } | { readonly problem: string };

const FORM = /^([+\-\u2212]?(?:\d[\d \u202f_]*(?:\.\d*)?|\.\d+)(?:e[+-]?\d+)?)\s*(.*)$/iu;

/**
 * The coherent value of a quantity typed for a knob: "10 nA", "4.7 µA", "25 °C". A number without its unit is refused, as in the
 * netlist; a pure number has none.
 */
export function readQuantity(text: string, axis: KnobUnit): Read {
  const example = formatAxis(shownUnit(axis) === "°C" ? 25 : axis.unit === "1" ? 0.1 : 1e-3, shownUnit(axis));
  const match = FORM.exec(text.trim());
  if (match === null) return { problem: `Write a number with its unit, such as ${example}.` };
  const number = Number(match[1]!.replace(/[ \u202f_]/gu, "").replace("\u2212", "-"));
  const spelt = match[2]!.trim();
  if (axis.unit === "1" && spelt === "") return { value: number };
  if (spelt === "") return { problem: `Write the unit too, such as ${example}.` };
  const unit = parseUnit(spelt);
  const wanted = parseUnit(axis.unit);
  if (unit === null || wanted === null) return { problem: `“${spelt}” is no unit. Write ${example}, say.` };
  if (!sameDimension(unit.dimension, wanted.dimension)) {
    return { problem: `${axis.knob} is in ${shownUnit(axis)}, not ${unit.symbol}.` };
  }
  if (isAmbient(axis) && unit.scale === "celsius") return { value: coherentValue(axis, number) };
  return { value: toCoherent(number, unit) };
}
