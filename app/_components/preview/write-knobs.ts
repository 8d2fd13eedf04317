import { isAmbient, type KnobUnit, shownValue } from "@/app/_components/curves/figures-in-words";
import { format } from "@/lib/language/format";
import { tokenize } from "@/lib/language/lexer";
import { parseTokens } from "@/lib/language/parser";
import { Report } from "@/lib/language/report";
import type { Span } from "@/lib/language/span";
import type { Statement } from "@/lib/language/syntax";
import { ENGINEERING } from "@/lib/units/prefix";
import { PLAIN_UNITS, parseUnit, scaleByTen } from "@/lib/units/unit";

/** A knob with the value that it is to have in the text, coherent SI. */
export interface WrittenKnob extends KnobUnit {
  readonly value: number;
}

/** One change of a text. */
export interface Change extends Span {
  readonly text: string;
}

/** The value of a knob, of up to 15 digits, as the language writes it: read again it is the same double. Null for a unit that cannot be spelt. */
export function spellKnob(knob: WrittenKnob): string | null {
  if (isAmbient(knob)) return `${shownValue(knob, knob.value)} °C`;
  const { unit, value } = knob;
  if (unit === "1") return String(value);
  if (parseUnit(unit) === null) return null;
  // No unit of the text begins with a number.
  if (unit.startsWith("1/")) return unit.lastIndexOf("/") > 1 ? null : `${value} / 1 ${unit.slice(2)}`;
  const takesPrefix = /^\p{L}/u.test(unit) && !/[⁰¹²³⁴⁵⁶⁷⁸⁹]/u.test(unit) && !PLAIN_UNITS.has(unit);
  const power = takesPrefix && value !== 0 ? 3 * Math.floor(Math.log10(Math.abs(value)) / 3 + 1e-12) : 0;
  const prefix = ENGINEERING.get(power);
  return prefix === undefined ? `${value} ${unit}` : `${scaleByTen(value, -power)} ${prefix}${unit}`;
}

/**
 * The one change that gives knobs other values in a text; in canonical form where the text was. A temperature that no knob sets gets
 * a statement of its own. Null where a value cannot be spelt or a knob is not declared.
 */
export function writeKnobs(text: string, knobs: readonly WrittenKnob[]): Change | null {
  const report = new Report();
  const { netlist } = parseTokens(tokenize(text, report), text.length, report);
  const changes: Change[] = [];
  for (const knob of knobs) {
    const spelt = spellKnob(knob);
    if (spelt === null) return null;
    const found = netlist.statements.find(
      (one) => one.kind === "knob" && one.whole && one.name.text === knob.knob,
    );
    if (found?.kind === "knob") changes.push({ from: found.value.from, to: found.value.to, text: spelt });
    else if (isAmbient(knob)) {
      const at = lineAfterKnobs(text, netlist.statements);
      const before = at > 0 && text[at - 1] !== "\n" ? "\n" : "";
      changes.push({ from: at, to: at, text: `${before}knob temperature = ${spelt}\n` });
    } else return null;
  }
  changes.sort((a, b) => b.from - a.from);
  const next = changes.reduce((all, one) => all.slice(0, one.from) + one.text + all.slice(one.to), text);
  return difference(text, format(text) === text ? format(next) : next);
}

/** Where a line for another knob begins: after the last one, else after the title, else at the start. */
function lineAfterKnobs(text: string, statements: readonly Statement[]): number {
  const last =
    statements.findLast(({ kind }) => kind === "knob") ?? statements.find(({ kind }) => kind === "title");
  if (last === undefined) return 0;
  const end = text.indexOf("\n", last.to);
  return end === -1 ? text.length : end + 1;
}

/** What lies between the beginnings and the ends that two texts share. */
function difference(before: string, after: string): Change {
  let from = 0;
  const most = Math.min(before.length, after.length);
  while (from < most && before[from] === after[from]) from += 1;
  let shared = 0;
  while (shared < most - from && before.at(-1 - shared) === after.at(-1 - shared)) shared += 1;
  return { from, to: before.length - shared, text: after.slice(from, after.length - shared) };
}
