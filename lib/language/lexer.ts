import { canonicalSpelling, parseUnit } from "@/lib/units/unit";
import type { Diagnostic } from "./diagnostic";
import { Report } from "./report";
import { CLAUSE_WORDS, quote, SYMBOLS, type Token } from "./token";

const BLANK = /[^\S\n]+/uy;
const COMMENT = /#[^\n]*/uy;
const SLASHED = /\/\/[^\n]*/uy;
const SEMICOLON = /^;+$/u;
/** Something behind semicolons in their line. */
const SOMETHING = /;+[^\S\n]*[^\s]/uy;
const NUMBER = /(?:\d+(?:\.\d+)?|\.\d+)(?:[eE][+-]?\d+)?/uy;
const WORD = /[\p{L}_][\p{L}0-9_]*/uy;
const STRING = /"(?:[^"\\\n]|\\[^\n]?)*("?)/uy;
const UNIT_FACTOR = /(?:[\p{L}_][\p{L}0-9_]*|°C|℃|%)(?:⁻?[⁰¹²³⁴⁵⁶⁷⁸⁹])?/uy;
const STRAY = /[^\s\p{L}0-9_#"+\-*/^=<>(){},:.±≤≥−×·]+/uy;

/** The symbols by the character that they begin with, the longest first. */
const SYMBOLS_FROM: ReadonlyMap<string, readonly (readonly [string, string])[]> = new Map(
  SYMBOLS.map(([first]) => [first[0]!, SYMBOLS.filter(([spelling]) => spelling[0] === first[0])]),
);

/** Characters that a keyboard or a word processor puts for one of ours. */
const LOOK_ALIKE: ReadonlyMap<string, string> = new Map([
  ["–", "-"],
  ["—", "--"],
  ["“", '"'],
  ["”", '"'],
  ["„", '"'],
  ["÷", "/"],
  ["∗", "*"],
  ["[", "("],
  ["]", ")"],
]);

/**
 * Cuts the text into tokens, comments and newlines included; blanks are dropped. Total and linear: a character of no use
 * becomes an "unknown" token and one diagnostic a run.
 */
export function lex(text: string): { tokens: Token[]; diagnostics: Diagnostic[] } {
  const report = new Report();
  return { tokens: tokenize(text, report), diagnostics: report.sorted() };
}

/** As `lex`, adding to a report that other phases share. */
export function tokenize(text: string, report: Report): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  const match = (pattern: RegExp): RegExpExecArray | null => {
    pattern.lastIndex = at;
    return pattern.exec(text);
  };
  const push = (kind: Token["kind"], length: number, spelling: string): void => {
    tokens.push({ kind, from: at, to: at + length, text: spelling });
    at += length;
  };
  while (at < text.length) {
    const first = text[at]!;
    if (first === " ") {
      at += 1;
      continue;
    }
    const blank = first > " " && first < "\u0080" ? null : match(BLANK);
    if (blank !== null) {
      at += blank[0].length;
      continue;
    }
    if (first === "\n") {
      push("newline", 1, "\n");
      continue;
    }
    const previous = tokens[tokens.length - 1];
    if (previous?.kind === "number") {
      const unit = unitAt(text, at);
      if (unit !== null) {
        push("unit", unit.length, canonicalUnit(unit));
        continue;
      }
    }
    const comment = first === "#" ? match(COMMENT) : null;
    if (comment !== null) {
      push("comment", comment[0].length, comment[0].trimEnd());
      continue;
    }
    const slashed = first === "/" ? match(SLASHED) : null;
    if (slashed !== null) {
      reportComment(report, at, "//");
      push("comment", slashed[0].length, slashed[0].trimEnd());
      continue;
    }
    const number = first === "." || (first >= "0" && first <= "9") ? match(NUMBER) : null;
    if (number !== null) {
      if (!Number.isFinite(Number(number[0]))) {
        const span = { from: at, to: at + number[0].length };
        report.error(
          "TXT3",
          span,
          `${quote(number[0])} is beyond the largest number that can be kept, about 1.8e308.`,
        );
      }
      const digits = number[0].toLowerCase();
      push("number", digits.length, first === "." ? `0${digits}` : digits);
      continue;
    }
    const plain = plainWordEnd(text, at);
    if (plain > at) {
      push("word", plain - at, text.slice(at, plain));
      continue;
    }
    const word = plain === at ? null : match(WORD);
    if (word !== null) {
      push("word", word[0].length, word[0].replaceAll("\u2126", "Ω").replaceAll("\u03bc", "µ"));
      continue;
    }
    const string = first === '"' ? match(STRING) : null;
    if (string !== null) {
      const closed = string[1] === '"';
      if (!closed) reportOpenText(report, at, string[0]);
      push(closed ? "string" : "unknown", string[0].length, string[0]);
      continue;
    }
    const symbol = SYMBOLS_FROM.get(first)?.find(([spelling]) => text.startsWith(spelling, at));
    if (symbol !== undefined) {
      push("symbol", symbol[0].length, symbol[1]);
      continue;
    }
    const stray = match(STRAY)?.[0] ?? String.fromCodePoint(text.codePointAt(at)!);
    if (SEMICOLON.test(stray) && match(SOMETHING) !== null) reportComment(report, at, stray);
    else reportStray(report, at, stray);
    push("unknown", stray.length, stray);
  }
  return tokens;
}

/**
 * Where the word of plain letters, digits and underscores that begins at `at` ends, as almost all words are: `at` where a plain character
 * begins none, −1 where a letter beyond ASCII has to be looked at.
 */
function plainWordEnd(text: string, at: number): number {
  let end = at;
  for (; end < text.length; end++) {
    const code = text.charCodeAt(end);
    if (code >= 128) return -1;
    const isLetter = (code >= 97 && code <= 122) || (code >= 65 && code <= 90) || code === 95;
    if (!isLetter && (end === at || code < 48 || code > 57)) break;
  }
  return end;
}

/** The unit that begins at `at`, just after a number: a symbol, then more of them joined by `/` or `·` without spaces. */
function unitAt(text: string, at: number): string | null {
  const factor = (from: number): string | null => {
    UNIT_FACTOR.lastIndex = from;
    return UNIT_FACTOR.exec(text)?.[0] ?? null;
  };
  const first = factor(at);
  if (first === null || CLAUSE_WORDS.has(first)) return null;
  let end = at + first.length;
  while (text[end] === "/" || text[end] === "·") {
    const next = factor(end + 1);
    if (next === null || parseUnit(next) === null) break;
    end += 1 + next.length;
  }
  return text.slice(at, end);
}

function canonicalUnit(unit: string): string {
  return parseUnit(unit)?.symbol ?? canonicalSpelling(unit);
}

function reportOpenText(report: Report, from: number, source: string): void {
  const trimmed = source.trimEnd();
  const to = from + trimmed.length;
  report.error("TXT2", { from, to }, 'This text is not closed; put a `"` at its end.', {
    title: 'Close the text with "',
    from: to,
    to,
    text: '"',
  });
}

function reportComment(report: Report, from: number, mark: string): void {
  const span = { from, to: from + mark.length };
  const fix = { ...span, title: "Write #", text: "#" };
  report.error("TXT1", span, `A comment begins with ${quote("#")}, not with ${quote(mark)}.`, fix);
}

function reportStray(report: Report, from: number, stray: string): void {
  const span = { from, to: from + stray.length };
  const meant = LOOK_ALIKE.get(stray);
  if (meant !== undefined) {
    const fix = { ...span, title: `Write ${meant}`, text: meant };
    report.error(
      "TXT1",
      span,
      `${quote(stray)} is no character of the language; write ${quote(meant)}.`,
      fix,
    );
  } else if (/^[°%℃]/u.test(stray)) {
    report.error("TXT1", span, `${quote(stray)} is a unit and wants a number before it.`);
  } else {
    report.error("TXT1", span, `${quote(stray)} is no character of the language; remove it.`, {
      ...span,
      title: "Remove it",
      text: "",
    });
  }
}
