import { PREFIXES } from "@/lib/units/prefix";
import { unitOf } from "@/lib/units/quantity";
import { PLAIN_UNITS, UNITS } from "@/lib/units/unit";

/** Units of circuits, before the others. */
const FIRST = ["V", "A", "Ω", "W", "K"];
const USUAL_PREFIXES = ["f", "p", "n", "µ", "m", "", "k", "M", "G"];

/** Units that begin as what is written, with the usual prefixes; other prefixes once one is begun. */
export function unitsLike(begun: string): { text: string; about: string; spelled: string }[] {
  const rest = [...UNITS.keys()].filter((unit) => !FIRST.includes(unit));
  const prefixes = [...PREFIXES.keys()].filter((prefix) => begun !== "" && begun.startsWith(prefix));
  const all = [
    ...FIRST.flatMap((unit) => USUAL_PREFIXES.map((prefix) => prefix + unit)),
    "°C",
    ...PLAIN_UNITS.keys(),
    ...rest,
    ...prefixes.flatMap((prefix) => [...UNITS.keys()].map((unit) => prefix + unit)),
  ];
  return [...new Set(all)]
    .map((text) => ({ text, about: aboutUnit(text), spelled: inAscii(text) }))
    .filter(({ text, spelled }) => text.startsWith(begun) || (begun !== "" && spelled.startsWith(begun)));
}

/** As one writes it on a keyboard without Ω, µ and °. */
function inAscii(unit: string): string {
  return unit.replace("Ω", "ohm").replace(/^µ/u, "u").replace("°C", "degC");
}

function aboutUnit(text: string): string {
  if (text === "°C") return "degree Celsius, a point on the scale";
  if (PLAIN_UNITS.has(text)) return `10^${PLAIN_UNITS.get(text)}`;
  if (UNITS.has(text)) return `the unit ${unitOf(UNITS.get(text)!)}`;
  const prefix = [...PREFIXES.keys()].find(
    (one) => text.startsWith(one) && UNITS.has(text.slice(one.length)),
  )!;
  return `10^${PREFIXES.get(prefix)} ${text.slice(prefix.length)}`;
}
