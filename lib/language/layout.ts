import { CONTINUING, STATEMENT_WORDS, type Token } from "./token";

/**
 * Turns newlines into the ends of statements and drops comments. A statement goes on in the next line inside brackets, after
 * a trailing operator, comma or `--`, and where that line begins with `--`; but not where it begins with the word of a
 * statement, so that one forgotten bracket costs one statement, not the rest of the file. A block is one statement up to its
 * closing brace. The last token is an end.
 */
export function layOut(tokens: readonly Token[], length: number): Token[] {
  const laid: Token[] = [];
  const significant = tokens.filter((token) => token.kind !== "comment");
  let depth = 0;
  let inBlock = false;
  let last: Token | null = null;
  significant.forEach((token, i) => {
    if (token.kind !== "newline") {
      if (last === null) inBlock = token.text === "block";
      laid.push(token);
      last = token;
      if (token.kind === "symbol" && (token.text === "(" || token.text === "{")) depth += 1;
      if (token.kind === "symbol" && (token.text === ")" || token.text === "}"))
        depth = Math.max(0, depth - 1);
      return;
    }
    if (last === null) return;
    const open = depth > 0 || (last.kind === "symbol" && CONTINUING.has(last.text));
    const next = significant[i + 1];
    if (next?.kind === "newline" || isSymbol(next, "--")) return;
    if (open && (inBlock || !beginsStatement(next, significant[i + 2], depth > 0))) return;
    laid.push({ kind: "end", from: token.from, to: token.from, text: "" });
    depth = 0;
    last = null;
  });
  laid.push({ kind: "end", from: length, to: length, text: "" });
  return laid;
}

/** Inside brackets a line such as `Q1 : …` or `a -- …` begins a statement too: nothing there has that form. */
function beginsStatement(first: Token | undefined, second: Token | undefined, inBrackets: boolean): boolean {
  if (first?.kind !== "word") return false;
  if (STATEMENT_WORDS.has(first.text)) return !isSymbol(second, "=");
  return inBrackets && (isSymbol(second, ":") || isSymbol(second, "--"));
}

function isSymbol(token: Token | undefined, text: string): boolean {
  return token?.kind === "symbol" && token.text === text;
}
