import { CONTINUING, STATEMENT_WORDS, type Token } from "./token";

/**
 * Turns newlines into the ends of statements and drops comments. A statement goes on in the next line inside brackets and after
 * a trailing operator, comma or `--`, unless that line begins with the word of a statement: so one forgotten bracket
 * costs one statement, not the rest of the file. A block is one statement up to its closing brace. The last token is an end.
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
    if (open && (inBlock || !beginsStatement(significant, i + 1))) return;
    laid.push({ kind: "end", from: token.from, to: token.from, text: "" });
    depth = 0;
    last = null;
  });
  laid.push({ kind: "end", from: length, to: length, text: "" });
  return laid;
}

function beginsStatement(tokens: readonly Token[], at: number): boolean {
  const first = tokens[at];
  if (first?.kind === "newline") return false;
  return first?.kind === "word" && STATEMENT_WORDS.has(first.text) && tokens[at + 1]?.text !== "=";
}
