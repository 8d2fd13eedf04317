import { composeLine } from "./spacing-rules";
import type { Statement } from "./syntax";
import type { Token } from "./token";

/** A line of the result. Neighbouring lines with columns of the same `run` are set in columns. */
export interface Line {
  readonly text: string;
  readonly run: string | null;
  readonly columns: readonly string[];
}

/** A line that stands as it is. */
export function plainLine(text: string): Line {
  return { text, run: null, columns: [] };
}

/**
 * A statement on one line, cut where its neighbours of the same form align: before `=`, before `:` and `{`, before the windows and
 * the name of a requirement. `margin` stands before it: inside a block it is set in.
 */
export function statementLine(
  statement: Statement,
  row: readonly Token[],
  tight: ReadonlySet<number>,
  margin: string,
): Line {
  const text = margin + composeLine(row, tight);
  const cuts = cutsOf(statement, row);
  if (cuts === null) return plainLine(text);
  const edges = [0, ...cuts, row.length];
  const columns = edges.slice(1).map((to, i) => {
    const part = row.slice(edges[i]!, to);
    // Two spaces stand before a comment, one of them between the columns.
    return (i === 0 ? margin : "") + (part[0]?.kind === "comment" ? " " : "") + composeLine(part, tight);
  });
  return { text, run: `${margin}${statement.kind === "knob" ? "let" : statement.kind}`, columns };
}

/** Token indices at which columns begin. */
function cutsOf(statement: Statement, row: readonly Token[]): number[] | null {
  const brace = row.findIndex((token) => token.text === "{");
  switch (statement.kind) {
    case "let":
    case "knob":
      return [1, 2];
    case "show":
      return statement.items.length === 1 && statement.items[0]!.name !== null ? [1, 2] : null;
    case "model":
      return [1, 2, brace];
    case "device":
      return [1, brace];
    case "read":
      return [1, 2, ...placesOf(row, [statement.windows[0]?.from])];
    case "require": {
      const { windows, share, label } = statement;
      const before = (place: number | undefined) => row.findLast((token) => token.from < (place ?? 0))?.from;
      return placesOf(row, [windows[0]?.from ?? before(share?.from), before(label?.from)]);
    }
    default:
      return null;
  }
}

/** Indices of the tokens at these offsets; what is not there would stand where the next does, or at the end. */
function placesOf(row: readonly Token[], offsets: readonly (number | undefined)[]): number[] {
  const comment = row.findIndex((token) => token.kind === "comment");
  let next = comment === -1 ? row.length : comment;
  return offsets
    .toReversed()
    .map((offset) => {
      if (offset !== undefined) next = row.findIndex((token) => token.from >= offset);
      return next;
    })
    .toReversed();
}

/** Sets runs of neighbouring lines in columns. */
export function alignRuns(lines: readonly Line[]): string[] {
  const result: string[] = [];
  for (let at = 0; at < lines.length; ) {
    let end = at + 1;
    while (lines[at]!.run !== null && end < lines.length && lines[end]!.run === lines[at]!.run) end += 1;
    result.push(...setColumns(lines.slice(at, end)));
    at = end;
  }
  return result;
}

function setColumns(run: readonly Line[]): string[] {
  if (run.length === 1) return [run[0]!.text];
  const widths = run[0]!.columns.map((_, i) => Math.max(...run.map((line) => width(line.columns[i]!))));
  return run.map(({ columns }) =>
    columns
      .flatMap((column, i) => (widths[i] === 0 ? [] : [column + " ".repeat(widths[i]! - width(column))]))
      .join(" ")
      .trimEnd(),
  );
}

/** Names are made of letters of one column each; code points are counted, not UTF-16 units. */
function width(text: string): number {
  return [...text].length;
}
