import { CONTINUING, STATEMENT_WORDS, type Token } from "./token";

/**
 * Turns newlines into the ends of statements and drops comments. A statement goes on in the next line inside brackets, after
 * a trailing operator, comma or `--`, and where that line begins with `--`; but not where it begins with the word of a
 * statement, so that one forgotten bracket costs one statement, not the rest of the file. The brace that opens a block ends a
 * statement, and such an end has the text "{"; the one that closes it is a statement of its own. The last token is an end.
 */
export function layOut(tokens: readonly Token[], length: number): Token[] {
  const significant = tokens.filter((token) => token.kind !== "comment");
  const laid: Token[] = [];
  let depth = 0;
  let blocks = 0;
  let isHead = false;
  let last: Token | null = null;
  const end = (at: number, text = ""): void => {
    laid.push({ kind: "end", from: at, to: at, text });
    depth = 0;
    last = null;
  };
  significant.forEach((token, i) => {
    const next = significant[i + 1];
    if (token.kind !== "newline") {
      if (last === null) isHead = isBlockHead(token, next);
      if (isHead && isSymbol(token, "{")) {
        laid.push(token);
        blocks += 1;
        end(token.to, "{");
      } else if (blocks > 0 && depth === 0 && isSymbol(token, "}")) {
        if (last !== null) end(token.from);
        laid.push(token);
        blocks -= 1;
        isHead = false;
        last = token;
      } else {
        laid.push(token);
        last = token;
        depth = Math.max(0, depth + bracket(token));
      }
      return;
    }
    if (last === null) return;
    const open = depth > 0 || (last.kind === "symbol" && CONTINUING.has(last.text));
    if (next?.kind === "newline" || isSymbol(next, "--") || (isHead && isSymbol(next, "{"))) return;
    if (open && !beginsStatement(next, significant[i + 2], depth > 0)) return;
    end(token.from);
  });
  laid.push({ kind: "end", from: length, to: length, text: "" });
  return laid;
}

function isBlockHead(first: Token, second: Token | undefined): boolean {
  return first.kind === "word" && first.text === "block" && !isSymbol(second, ":") && !isSymbol(second, "--");
}

/** Inside brackets a line such as `Q1 : …` or `a -- …` begins a statement too: nothing there has that form. */
function beginsStatement(first: Token | undefined, second: Token | undefined, inBrackets: boolean): boolean {
  if (first?.kind !== "word") return false;
  if (STATEMENT_WORDS.has(first.text)) return !isSymbol(second, "=");
  return inBrackets && (isSymbol(second, ":") || isSymbol(second, "--"));
}

/** How a token changes the depth of brackets. */
function bracket(token: Token): number {
  if (isSymbol(token, "(") || isSymbol(token, "{")) return 1;
  return isSymbol(token, ")") || isSymbol(token, "}") ? -1 : 0;
}

function isSymbol(token: Token | undefined, text: string): boolean {
  return token?.kind === "symbol" && token.text === text;
}
