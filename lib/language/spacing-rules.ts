import type { Token } from "./token";

/**
 * The tokens of one line in canonical spelling and spacing. `tight` holds the offsets of unary operators and of the names of
 * called functions, which nothing may part from what follows.
 */
export function composeLine(row: readonly Token[], tight: ReadonlySet<number>): string {
  let text = "";
  row.forEach((token, i) => {
    text += (i === 0 ? "" : gap(row[i - 1]!, token, tight)) + token.text;
  });
  return text;
}

function gap(left: Token, right: Token, tight: ReadonlySet<number>): string {
  if (right.kind === "comment") return "  ";
  const before = left.kind === "symbol" ? left.text : "";
  const after = right.kind === "symbol" ? right.text : "";
  // Two signs in a row would read as `--` or `±`.
  if (tight.has(left.from)) return before !== "" && (after === "-" || after === "+") ? " " : "";
  if (before === "(" || before === "." || before === "^") return "";
  if (after === ")" || after === "," || after === "." || after === "^") return "";
  return " ";
}
