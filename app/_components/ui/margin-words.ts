import { formatKnob } from "@/app/_components/curves/figures-in-words";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatAxis, formatQuantity } from "@/lib/units/quantity";
import { spanInWords } from "./one-prefix";

/** Significant digits of a value that stands beside its limits. */
const DIGITS = 3;

/** "at most 0.5 mV", "within ±0.5 mV", "0.99 to 1.01"; empty where no limit is known. */
export function limitsInWords({ allowed, unit }: RequirementDocument): string {
  const { low, high } = allowed;
  const show = (value: number) => formatAxis(Number(value.toPrecision(6)), unit);
  if (low === null) return high === null ? "" : `at most ${show(high)}`;
  if (high === null) return `at least ${show(low)}`;
  return low === -high ? `within ±${show(high)}` : spanInWords(low, high, unit, 6);
}

/** The worst value in short: as many digits as tell it from the limit that it is nearest to, and how far from it. */
export function worstInWords({ value: { worst }, margin, unit }: RequirementDocument): string {
  if (worst === null) return "no value";
  if (worst === 0 || margin === null || margin === 0) return formatQuantity(worst, unit, DIGITS);
  const beyond = Math.ceil(Math.log10(Math.abs(worst) / Math.abs(margin)));
  return formatQuantity(worst, unit, Math.min(9, Math.max(DIGITS, beyond + 2)));
}

/** As many digits as tell the ends of a span apart, with two of what lies between them. */
function digitsApart(low: number, high: number): number {
  const parts = Math.max(Math.abs(low), Math.abs(high)) / (high - low);
  return Math.min(9, Math.max(DIGITS, Math.ceil(Math.log10(parts)) + 2));
}

/** "temperature 40 °C, draw 211"; empty where it is the same everywhere. Branches are counted from 1, as their list counts them. */
export function placeInWords({ worst }: RequirementDocument): string {
  if (worst === null) return "";
  const at = worst.at.map((knob) => `${knob.knob} ${formatKnob(knob, knob.value, 4)}`);
  if (worst.draw > 0) at.push(`draw ${worst.draw}`);
  if (worst.branch !== undefined) at.push(`operating points of branch ${worst.branch + 1}`);
  return at.join(", ");
}

/** What a margin bar shows, as a sentence for those who do not see it. */
export function marginSentence(requirement: RequirementDocument): string {
  const { label, verdict, unit, margin, value } = requirement;
  const verb = { holds: "holds", broken: "is broken", "no data": "has no data" }[verdict];
  const parts = [`${label} ${verb}`];
  const limits = limitsInWords(requirement);
  const place = placeInWords(requirement);
  if (value.worst !== null) {
    const asked = limits === "" ? "" : `; allowed ${limits}`;
    parts.push(`worst value ${worstInWords(requirement)}${place && ` at ${place}`}${asked}`);
  }
  if (margin !== null) {
    const size = formatQuantity(Math.abs(margin), unit, DIGITS);
    parts.push(margin < 0 ? `missed by ${size}` : `margin ${size}`);
  }
  if (value.low !== null && value.high !== null && value.low !== value.high) {
    const all = spanInWords(value.low, value.high, unit, digitsApart(value.low, value.high));
    const nominal = value.nominal === null ? "not known" : formatQuantity(value.nominal, unit, DIGITS);
    parts.push(`all values ${all}, nominal ${nominal}`);
  }
  return `${parts.join("; ")}.`;
}
