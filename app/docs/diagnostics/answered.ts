import { compile } from "@/lib/analyses/compile";
import type { Code } from "@/lib/language/catalogue";
import { SAMPLES } from "./samples";

/** The line of a sample that is at fault, and what the checker says of it. */
export interface Answered {
  readonly severity: "error" | "warning";
  readonly message: string;
  /** The line, cut in three: before the fault, the fault, behind it. Long stretches are shortened. */
  readonly line: readonly [string, string, string];
  readonly fix: { readonly title: string; readonly line: string } | null;
}

/** A shelf of the samples, which has a mistake. */
const SHELVES: Readonly<Record<string, string>> = { "with a mistake": "model array : npn { }\n" };
/** Characters that a stretch of a line shows at most. */
const MOST_SHOWN = 72;

const answers = new Map<Code, Answered>();

/** What the checker answers to the sample of a code, found by asking it. Throws where the sample is not answered with the code. */
export function answered(code: Code): Answered {
  let answer = answers.get(code);
  if (answer === undefined) {
    answer = ask(code);
    answers.set(code, answer);
  }
  return answer;
}

function ask(code: Code): Answered {
  const text = SAMPLES[code];
  const options = code === "NAM14" ? { library: (name: string) => SHELVES[name] ?? null } : {};
  const found = compile(text, options).diagnostics.find((one) => one.code === code);
  if (found === undefined) throw new Error(`The sample of ${code} is not answered with it.`);
  const { from, to, severity, message, fix } = found;
  const start = text.lastIndexOf("\n", from - 1) + 1;
  const end = endOfLine(text, from);
  const behind = Math.min(to, end);
  return {
    severity,
    message,
    line: [short(text.slice(start, from)), short(text.slice(from, behind)), short(text.slice(behind, end))],
    fix: fix === undefined ? null : { title: fix.title, line: mended(text, fix) },
  };
}

function mended(
  text: string,
  fix: { readonly from: number; readonly to: number; readonly text: string },
): string {
  const after = text.slice(0, fix.from) + fix.text + text.slice(fix.to);
  const start = after.lastIndexOf("\n", fix.from - 1) + 1;
  return short(after.slice(start, endOfLine(after, fix.from)));
}

function endOfLine(text: string, from: number): number {
  const end = text.indexOf("\n", from);
  return end === -1 ? text.length : end;
}

function short(text: string): string {
  if (text.length <= MOST_SHOWN) return text;
  return `${text.slice(0, MOST_SHOWN / 2)}…${text.slice(-8)}`;
}
