import { highlight, type TokenClass } from "@/lib/language/highlight";
import { layOut } from "@/lib/language/layout";
import { tokenize } from "@/lib/language/lexer";
import { Report } from "@/lib/language/report";

/** A token of one line: where it starts (UTF-16 units from the line's start), and what it is; null for blanks. */
export interface LineToken {
  readonly at: number;
  readonly class: TokenClass | null;
}

/** Longest statement, in UTF-16 units, whose beginning is remembered; beyond it a line is read on its own. */
const MOST_OPEN = 1024;

/**
 * The tokens of one line, read as the continuation of `open`: the statement that the lines before it ended with, which may go on.
 * Gives the statement to hand to the next line. So an editor colours only the lines it shows or that changed.
 */
export function tokenizeLine(line: string, open: string): { tokens: LineToken[]; open: string } {
  const text = open === "" ? line : `${open}\n${line}`;
  const start = text.length - line.length;
  const tokens: LineToken[] = [];
  let end = 0;
  for (const range of highlight(text)) {
    if (range.from < start) continue;
    const at = range.from - start;
    if (at > end) tokens.push({ at: end, class: null });
    tokens.push({ at, class: range.class });
    end = range.to - start;
  }
  if (end < line.length) tokens.push({ at: end, class: null });
  return { tokens, open: lastStatement(text) };
}

/** The text of the last statement that begins in `text`, up to its last token; comments after it are left out. */
function lastStatement(text: string): string {
  const laid = layOut(tokenize(text, new Report()), text.length);
  let last = laid.length - 1;
  while (last >= 0 && laid[last]!.kind === "end") last -= 1;
  if (last < 0) return "";
  let first = last;
  while (first > 0 && laid[first - 1]!.kind !== "end") first -= 1;
  const { from } = laid[first]!;
  const { to } = laid[last]!;
  return to - from > MOST_OPEN ? "" : text.slice(from, to);
}
