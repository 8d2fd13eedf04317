import { FUNCTION_NAMES } from "./functions";
import { layOut } from "./layout";
import { tokenize } from "./lexer";
import { isReductionName } from "./reductions";
import { Report } from "./report";
import type { Span } from "./span";
import { CLAUSE_WORDS, STATEMENT_WORDS, type Token } from "./token";

/** What a stretch of text is, for the eye. "pin" is a pin, a parameter or the part of a signal after its dot. */
export type TokenClass =
  | "keyword"
  | "kind"
  | "number"
  | "unit"
  | "name"
  | "string"
  | "comment"
  | "operator"
  | "pin";

export interface Highlight extends Span {
  readonly class: TokenClass;
}

/** Where a token stands in its statement. */
interface Standing {
  readonly statement: string;
  readonly index: number;
  readonly braces: number;
  readonly previous: Token | null;
  readonly next: Token | null;
}

/** Classes of every token, in the order of the text, blanks left out. Works on any text; linear. */
export function highlight(text: string): Highlight[] {
  const tokens = tokenize(text, new Report());
  const found: Highlight[] = [];
  for (const token of tokens) {
    if (token.kind === "comment") found.push({ from: token.from, to: token.to, class: "comment" });
  }
  const laid = layOut(tokens, text.length);
  let statement = "";
  let index = 0;
  let braces = 0;
  laid.forEach((token, i) => {
    if (token.kind === "end") {
      index = 0;
      braces = 0;
      return;
    }
    if (index === 0) statement = token.text;
    if (token.text === "{") braces += 1;
    const previous = index === 0 ? null : laid[i - 1]!;
    const kind = classOf(token, { statement, index, braces, previous, next: laid[i + 1] ?? null });
    if (token.text === "}") braces -= 1;
    index += 1;
    if (kind !== null) found.push({ from: token.from, to: token.to, class: kind });
  });
  return found.sort((a, b) => a.from - b.from);
}

function classOf(token: Token, standing: Standing): TokenClass | null {
  switch (token.kind) {
    case "number":
    case "unit":
    case "string":
      return token.kind;
    case "symbol":
      return "operator";
    case "unknown":
      return token.text.startsWith('"') ? "string" : null;
    case "word":
      return classOfWord(token, standing);
    default:
      return null;
  }
}

function classOfWord(token: Token, { statement, index, braces, previous, next }: Standing): TokenClass {
  const follows = next?.kind === "symbol" ? next.text : "";
  if (index === 0 && STATEMENT_WORDS.has(token.text) && follows !== ":" && follows !== "--") return "keyword";
  const before = previous?.kind === "symbol" ? previous.text : "";
  if (before === ":") return "kind";
  if (before === ".") return "pin";
  if (braces > 0 && follows === "=") return "pin";
  if (follows === "(" && (FUNCTION_NAMES.has(token.text) || isReductionName(token.text))) return "operator";
  return isClause(token.text, statement, index, before) ? "keyword" : "name";
}

/** A clause word is a keyword where a value has just ended, and a name where a value is wanted. */
function isClause(word: string, statement: string, index: number, before: string): boolean {
  if (!CLAUSE_WORDS.has(word) || !STATEMENT_WORDS.has(statement) || index < 2) return false;
  return before === "" || before === ")" || before === "}" || (before === "," && word === "step");
}
