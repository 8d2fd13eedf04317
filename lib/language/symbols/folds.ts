import { lineStarts, placeOf } from "../span";
import type { Netlist, Statement } from "../syntax";

/** Lines, counted from 1, of which all but the first can be put out of sight. */
export interface Fold {
  readonly first: number;
  readonly last: number;
  readonly what: "statement" | "comment";
}

/** What can be folded: statements that span lines, blocks and what stands in them among them, and runs of comment lines. */
export function foldsOf({ statements }: Netlist, text: string): Fold[] {
  const lines = text.split("\n");
  const starts = lineStarts(text);
  const lineAt = (offset: number) => placeOf(starts, offset).line;
  const folds: Fold[] = [];
  const add = (first: number, last: number, what: Fold["what"]) => {
    if (last > first) folds.push({ first, last, what });
  };
  const visit = (all: readonly Statement[]) => {
    for (const statement of all) {
      add(lineAt(statement.from), lineAt(statement.to), "statement");
      if (statement.kind === "block") visit(statement.statements);
    }
  };
  visit(statements);
  let first = 0;
  lines.forEach((line, index) => {
    if (/^\s*#/.test(line)) first ||= index + 1;
    else {
      if (first > 0) add(first, index, "comment");
      first = 0;
    }
  });
  if (first > 0) add(first, lines.length, "comment");
  return folds.sort((a, b) => a.first - b.first || b.last - a.last);
}
