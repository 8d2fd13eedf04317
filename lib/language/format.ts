import { alignRuns, type Line, plainLine, statementLine } from "./alignment";
import { Cursor } from "./cursor";
import { ExpressionParser } from "./expression-parser";
import { tokenize } from "./lexer";
import { SHARED } from "./limits";
import { LineOwners } from "./line-owners";
import { parseTokens } from "./parser";
import { Report } from "./report";
import { composeLine } from "./spacing-rules";
import type { Token } from "./token";

const INDENT = "  ";

/**
 * The canonical form of a netlist: canonical spelling and spacing, at most one blank line between statements, `=`, `:` and `{`
 * aligned in runs of neighbouring lines, comments kept. Line breaks inside a statement stay where they are. A statement that
 * could not be read keeps its lines as they are, apart from blanks at their ends, and so does a text of more than `most` UTF-16
 * units. Idempotent; the meaning is unchanged.
 */
export function format(text: string, most = SHARED.text): string {
  const source = text.split("\n");
  if (text.length > most) return finish(source.map((line) => line.trimEnd()));
  const report = new Report();
  const tokens = tokenize(text, report);
  const { netlist, tight } = parseTokens(tokens, text.length, report);
  const owners = new LineOwners(netlist.statements);
  let from = 0;
  let depth = 0;
  const lines = rowsOf(tokens).map((row, i): Line => {
    const raw = source[i]!.trimEnd();
    const to = from + source[i]!.length;
    const { statement, end, begins, isAlone, level } = owners.of(row, from, to);
    from = to + 1;
    if (begins) depth = 0;
    if (row.length === 0 || (statement !== null && !statement.whole)) return plainLine(raw);
    const margin = INDENT.repeat(level);
    if (statement === null) return plainLine(margin + composeLine(row, tight));
    if (isAlone && end <= to) return statementLine(statement, row, tight, margin);
    const closers = closersAhead(row);
    const indent = closers > 0 ? depth - closers : Math.max(1, depth);
    depth = depthAfter(row, depth);
    return plainLine(margin + (begins ? "" : INDENT.repeat(Math.max(0, indent))) + composeLine(row, tight));
  });
  return finish(alignRuns(lines));
}

/** One expression, on one line. */
export function formatExpression(source: string): string {
  const report = new Report();
  const tokens = tokenize(source, report).filter(
    (token) => token.kind !== "comment" && token.kind !== "newline",
  );
  const end: Token = { kind: "end", from: source.length, to: source.length, text: "" };
  const cursor = new Cursor([...tokens, end], report);
  new ExpressionParser(cursor).expression();
  return composeLine(tokens, cursor.tight);
}

/** The tokens of each line. */
function rowsOf(tokens: readonly Token[]): Token[][] {
  const rows: Token[][] = [[]];
  for (const token of tokens) {
    if (token.kind === "newline") rows.push([]);
    else rows[rows.length - 1]!.push(token);
  }
  return rows;
}

function closersAhead(row: readonly Token[]): number {
  const inside = row.findIndex((token) => token.text !== ")" && token.text !== "}");
  return inside === -1 ? row.length : inside;
}

function depthAfter(row: readonly Token[], before: number): number {
  let depth = before;
  for (const token of row) {
    if (token.kind !== "symbol") continue;
    if (token.text === "(" || token.text === "{") depth += 1;
    if (token.text === ")" || token.text === "}") depth -= 1;
  }
  return depth;
}

/** Drops blank lines at both ends and all but one between lines; ends with one newline. */
function finish(lines: readonly string[]): string {
  const kept = lines.filter((line, i) => line !== "" || (i > 0 && lines[i - 1] !== ""));
  const last = kept[kept.length - 1] === "" ? kept.slice(0, -1) : kept;
  const first = last[0] === "" ? last.slice(1) : last;
  return first.length === 0 ? "" : `${first.join("\n")}\n`;
}
