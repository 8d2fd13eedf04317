import type { Span } from "./span";

/**
 * `text` is the canonical spelling (Ω, µ, °C, ±, a lower-case e), the span is that of the source. "unknown" is what the lexer has
 * already reported; "end" closes a statement and is made by the layout.
 */
export interface Token extends Span {
  readonly kind: "word" | "number" | "unit" | "string" | "symbol" | "comment" | "newline" | "unknown" | "end";
  readonly text: string;
}

/** Words that begin a statement. They cannot be names, so that the parser always finds its feet at a line that begins so. */
export const STATEMENT_WORDS: ReadonlySet<string> = new Set([
  "title",
  "use",
  "let",
  "knob",
  "model",
  "block",
  "sweep",
  "draws",
  "seek",
  "show",
  "read",
  "require",
]);

/** Statements that stand in a file and not in a block. */
export const FILE_STATEMENTS: ReadonlySet<string> = new Set([
  "title",
  "use",
  "sweep",
  "draws",
  "seek",
  "show",
  "read",
  "require",
]);

/** Words that mean something inside a statement; after a number they are never a unit. */
export const CLAUSE_WORDS: ReadonlySet<string> = new Set([
  "from",
  "to",
  "over",
  "per",
  "decade",
  "points",
  "step",
  "in",
  "uniform",
  "normal",
  "sigma",
  "track",
  "within",
  "for",
  "at",
  "of",
  "as",
  "and",
  "between",
  "rising",
  "falling",
  "seed",
  "revision",
]);

export const CONSTANTS: ReadonlySet<string> = new Set(["pi", "k_B", "q_e", "V_T"]);

/** Binary operators with their precedence; a higher one binds tighter. Only `^` groups from the right. */
export const PRECEDENCE: ReadonlyMap<string, number> = new Map([
  ["<=", 1],
  [">=", 1],
  ["<", 1],
  [">", 1],
  ["+", 2],
  ["-", 2],
  ["*", 3],
  ["/", 3],
  ["^", 4],
]);

/** Every symbol with its canonical spelling, the longest first. */
export const SYMBOLS: readonly (readonly [string, string])[] = [
  ["--", "--"],
  ["+-", "±"],
  ["<=", "<="],
  [">=", ">="],
  ["..", ".."],
  ...[..."+-*/^=<>(){},:."].map((symbol) => [symbol, symbol] as const),
  ["±", "±"],
  ["≤", "<="],
  ["≥", ">="],
  ["−", "-"],
  ["×", "*"],
  ["·", "*"],
];

/** Symbols after which a statement goes on in the next line. */
export const CONTINUING: ReadonlySet<string> = new Set([
  ...["--", "±", "<=", ">=", "<", ">", "..", "+", "-", "*", "/", "^", "=", ",", ":", ".", "(", "{"],
]);

/** `text` in backticks, shortened so that a message stays a sentence. */
export function quote(text: string): string {
  return `\`${text.length > 40 ? `${text.slice(0, 37)}…` : text}\``;
}
