import type { RequirementDocument, RunDocument } from "@/lib/analyses/result";
import { lineStarts, placeOf } from "@/lib/language/span";
import { formatAxis, formatQuantity } from "@/lib/units/quantity";
import type { Remark } from "./annotations";
import type { Compiled } from "./compiled";
import type { Case } from "./junit";

/** A value of a knob for people: the temperature in °C. */
export function knobValue(knob: string, value: number, unit: string): string {
  return knob === "temperature" ? formatAxis(value - 273.15, "°C") : formatAxis(value, unit);
}

/** Where a requirement is at its worst, in words; "" where nothing is known of it. */
export function worstPlace({ worst }: RequirementDocument): string {
  if (worst === null) return "";
  const at = worst.at.map(({ knob, unit, value }) => `${knob} = ${knobValue(knob, value, unit)}`);
  const draw = worst.draw === 0 ? [] : [`draw ${worst.draw}`];
  const branch = worst.branch === undefined ? [] : [`branch ${worst.branch + 1}`];
  return [...at, ...draw, ...branch].join(", ");
}

/** The yield with its interval of 95 % confidence; "" without draws. */
export function yieldText({ yield: found }: RequirementDocument): string {
  if (found === undefined) return "";
  const percent = (share: number) => (100 * share).toFixed(1);
  return `${found.holds} of ${found.of} draws (${percent(found.low)} % to ${percent(found.high)} %)`;
}

/** One sentence about a requirement that does not hold. */
function complaint(line: RequirementDocument): string {
  if (line.verdict === "no data")
    return withRemark(line, `${line.label}: no data; a point or reading that it needs is not solved.`);
  const margin = line.margin === null ? "" : ` by ${formatQuantity(Math.abs(line.margin), line.unit)}`;
  const place = worstPlace(line);
  const share = yieldText(line);
  const more = `${place === "" ? "" : ` at ${place}`}${share === "" ? "" : `; holds in ${share}`}`;
  return withRemark(line, `${line.label}: broken${margin}${more}.`);
}

function withRemark({ remark }: RequirementDocument, sentence: string): string {
  return remark === undefined ? sentence : `${sentence} ${remark}`;
}

/** The requirements of a run that do not hold, each at its place in the text. */
export function brokenRemarks({ source, job }: Compiled, document: RunDocument): Remark[] {
  const starts = lineStarts(source.text);
  return document.requirements.flatMap((line, k) => {
    if (line.verdict === "holds") return [];
    const place = placeOf(starts, job?.design.requirements[k]?.from ?? 0);
    const code = line.verdict === "broken" ? "requirement" : "requirement-without-data";
    return [{ file: source.name, ...place, severity: "error" as const, code, message: complaint(line) }];
  });
}

/** One case a requirement. */
export function requirementCases(document: RunDocument): Case[] {
  return document.requirements.map((line) => {
    if (line.verdict === "holds") return { name: line.label, problem: null };
    const message = complaint(line);
    return { name: line.label, problem: { kind: "failure", type: line.verdict, message, details: message } };
  });
}
