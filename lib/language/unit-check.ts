import { AMPERE, type Dimension, OHM, sameDimension, VOLT } from "@/lib/units/dimension";
import { PREFIXES } from "@/lib/units/prefix";
import { unitOf } from "@/lib/units/quantity";
import { PLAIN_UNITS, parseUnit, UNITS, type Unit } from "@/lib/units/unit";
import type { Names } from "./names";
import { nearest } from "./nearest";
import type { Report } from "./report";
import type { Expression, Word } from "./syntax";
import { quote } from "./token";

/** What stands for a unit in other places: spelled-out names and habits, without prefix. */
const SPELLED_OUT: readonly (readonly [RegExp, string])[] = [
  [/^mega?(?=.)/iu, "M"],
  [/ohms?$/iu, "Ω"],
  [/^r$/iu, "Ω"],
  [/volts?$/iu, "V"],
  [/amp(?:ere)?s?$/iu, "A"],
  [/watts?$/iu, "W"],
  [/kelvins?$/iu, "K"],
  [/^(?:deg|celsius|℃|°)$/iu, "°C"],
  [/^percent$/iu, "%"],
  [/siemens$/iu, "S"],
  [/farads?$/iu, "F"],
  [/(?:seconds?|sec)$/iu, "s"],
];

const ALL_UNITS: readonly string[] = [
  ...UNITS.keys(),
  ...[...PREFIXES.keys()].flatMap((prefix) => [...UNITS.keys()].map((unit) => prefix + unit)),
  ...PLAIN_UNITS.keys(),
  "°C",
];

/** The unit of a literal; where there is none, a diagnostic that proposes one that fits `wanted` (a unit symbol), and null. */
export function unitOfLiteral(
  literal: Extract<Expression, { kind: "number" }>,
  wanted: string | null,
  names: Names,
  report: Report,
): Unit | null {
  const word = literal.unit!;
  const unit = parseUnit(word.text);
  if (unit !== null) return unit;
  const differences = word.text.replace(/°C|degC/gu, "K");
  if (differences !== word.text && parseUnit(differences) !== null) {
    const message = `${quote(word.text)} counts differences of temperature, which are in K; write ${quote(differences)}.`;
    report.error("UNI6", word, message, change(word, differences));
    return null;
  }
  if (/\p{L}\d+$/u.test(word.text) && pointByLetter(literal, wanted, report)) return null;
  if (/^mega?$/iu.test(word.text)) {
    const proposal = `${literal.value} M${wanted ?? "Ω"}`;
    const message = `${quote(word.text)} is no prefix, mega is ${quote("M")}; write ${quote(proposal)}.`;
    report.error("UNI2", literal, message, change(literal, proposal));
    return null;
  }
  const prefix = word.text === "u" ? "µ" : word.text;
  // A lone R is ohms to everyone but the table of prefixes.
  if (PREFIXES.has(prefix) && prefix !== "R") {
    const proposal = `${literal.value} ${prefix}${wanted ?? likelyUnit(prefix)}`;
    const message = `${quote(`${literal.value}${word.text}`)} has a prefix but no unit; write ${quote(proposal)}.`;
    report.error("UNI2", literal, message, change(literal, proposal));
    return null;
  }
  if (["knob", "let"].includes(names.meaningOf(word.text) ?? "")) {
    const proposal = `${literal.value} * ${word.text}`;
    const message = `${quote(word.text)} is no unit; to multiply write ${quote(proposal)}.`;
    report.error("UNI1", literal, message, change(literal, proposal));
    return null;
  }
  if (/^dB$/iu.test(word.text)) {
    const proposal = `${Number((10 ** (literal.value / 20)).toPrecision(4))}`;
    const message = `A ratio is given as a number, not in ${quote(word.text)}; for voltages and currents write ${quote(proposal)}.`;
    report.error("UNI1", literal, message, change(literal, proposal));
    return null;
  }
  reportUnknownUnit(word, report);
  return null;
}

/** `4k7`, `2R2`, `3V3`: a prefix or unit in the place of the decimal point. Says whether it is that. */
function pointByLetter(
  literal: Extract<Expression, { kind: "number" }>,
  wanted: string | null,
  report: Report,
): boolean {
  const parts = /^([\p{L}])(\d+)$/u.exec(literal.unit!.text);
  if (parts === null || !Number.isInteger(literal.value)) return false;
  const [, letter, digits] = parts as unknown as [string, string, string];
  const prefix = letter === "u" ? "µ" : letter === "K" ? "k" : letter;
  const number = `${literal.value}.${digits}`;
  const written = `${literal.value}${literal.unit!.text}`;
  const start = `${quote(written)} has a letter in the place of the decimal point`;
  const unit = /^[rR]$/u.test(letter) ? "Ω" : PREFIXES.has(prefix) ? null : letter;
  if (unit !== null && parseUnit(unit) === null) return false;
  if (unit === null && wanted === null) {
    const example = `${number} ${prefix}${likelyUnit(prefix)}`;
    const message = `${start}; write a point there, and behind the number the prefix with its unit, as in ${quote(example)}.`;
    report.error("UNI1", literal, message);
    return true;
  }
  const proposal = `${number} ${unit ?? `${prefix}${wanted}`}`;
  report.error("UNI1", literal, `${start}; write ${quote(proposal)}.`, change(literal, proposal));
  return true;
}

function reportUnknownUnit(word: Word, report: Report): void {
  const spelled = SPELLED_OUT.reduce((text, [pattern, symbol]) => text.replace(pattern, symbol), word.text);
  const search = () => (parseUnit(spelled) !== null ? spelled : nearest(spelled, ALL_UNITS));
  const examples = "use one such as V, mV, nA, kΩ, K, °C or %";
  report.propose("UNI1", word, `${quote(word.text)} is no unit`, search, examples);
}

function likelyUnit(prefix: string): string {
  const power = PREFIXES.get(prefix)!;
  if (power >= 3) return "Ω";
  return power >= -3 ? "V" : "A";
}

function change(at: { from: number; to: number }, text: string) {
  return { title: `Change to ${text}`, from: at.from, to: at.to, text };
}

/** "in V", "a pure number": how a dimension is called in a message. */
export function describeDimension(dimension: Dimension): string {
  const unit = unitOf(dimension);
  return unit === "1" ? "a pure number" : `in ${unit}`;
}

/** A unit that a literal of this dimension may be given, null where none is at hand. */
export function spellableUnit(dimension: Dimension): string | null {
  const unit = unitOf(dimension);
  return unit !== "1" && parseUnit(unit) !== null && !unit.startsWith("1/") ? unit : null;
}

/** The unit that was probably meant where a literal's unit is of another dimension: `10 K` for 10 kΩ, `25 C` for 25 °C. */
export function mistakenUnit(unit: string, wanted: Dimension): string | null {
  if (unit === "C" && unitOf(wanted) === "K") return "°C";
  if (unit === "K" && [OHM, VOLT, AMPERE].some((dimension) => sameDimension(dimension, wanted)))
    return `k${unitOf(wanted)}`;
  return null;
}
