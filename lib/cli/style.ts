import type { Sink, World } from "./world";

/** What colour says: a verdict good, bad or open; a heading; what matters less. */
export type Ink = "good" | "bad" | "open" | "strong" | "faint";

const CODES: Readonly<Record<Ink, string>> = { good: "32", bad: "31", open: "33", strong: "1", faint: "2" };

export type Paint = (ink: Ink, text: string) => string;

/** Colours for a terminal; plain text for anything else, for a dumb terminal, and where NO_COLOR is set and not empty. */
export function paintFor(sink: Sink, { environment }: World): Paint {
  const isPlain = !sink.isTerminal || (environment.NO_COLOR ?? "") !== "" || environment.TERM === "dumb";
  return isPlain ? (_, text) => text : (ink, text) => `\u001b[${CODES[ink]}m${text}\u001b[0m`;
}

/** `text` with blanks behind it to a width. */
export function padded(text: string, width: number): string {
  return text + " ".repeat(Math.max(0, width - [...text].length));
}

/** Rows as lines of a table, two blanks between columns, none at the ends. */
export function tabulate(rows: readonly (readonly string[])[]): string[] {
  const widths: number[] = [];
  for (const row of rows) {
    row.forEach((cell, k) => {
      widths[k] = Math.max(widths[k] ?? 0, [...cell].length);
    });
  }
  return rows.map((row) =>
    row
      .map((cell, k) => padded(cell, widths[k]!))
      .join("  ")
      .trimEnd(),
  );
}
