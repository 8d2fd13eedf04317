import { lineStarts, placeOf, type Span } from "@/lib/language/span";
import type { OutlineEntry } from "@/lib/language/symbols/outline";

/** A line of a list to jump from: what it leads to, and the words of the text there. */
export interface JumpEntry {
  readonly key: string;
  readonly group: string;
  readonly name: string;
  /** The text there, on one line. */
  readonly says: string;
  /** Counted from 1. */
  readonly line: number;
  readonly span: Span;
  /** Blocks it stands in. */
  readonly depth: number;
}

const GROUPS: readonly (readonly [string, readonly OutlineEntry["what"][]])[] = [
  ["Knobs and values", ["knob", "let"]],
  ["Models and blocks", ["shelf", "model", "block"]],
  ["Elements", ["element"]],
  ["Plan", ["sweep", "draws"]],
  ["Traces and readings", ["trace", "reading"]],
  ["Requirements", ["requirement"]],
];

/** The outline of a text by groups, each in the order of the text; what stands in a block follows it. */
export function outlineJumps(text: string, outline: readonly OutlineEntry[]): JumpEntry[] {
  const starts = lineStarts(text);
  return GROUPS.flatMap(([group, whats]) => {
    const entries = (all: readonly OutlineEntry[], depth: number): JumpEntry[] =>
      all.flatMap((one) => {
        const { name, from, to } = one;
        const span = nameIn(text, one);
        const line = placeOf(starts, span.from).line;
        const behind = text.slice(span.to, to).split("\n")[0]!;
        const says = onOneLine(behind.replace(/^\s*[:=]/, ""));
        return [
          { key: `${from} ${name}`, group, name, says, line, span, depth },
          ...entries(one.inside, depth + 1),
        ];
      });
    return entries(
      outline.filter(({ what }) => whats.includes(what)),
      0,
    );
  });
}

/** The places of a name, each with its line of the text. */
export function placeJumps(text: string, name: string, places: readonly Span[]): JumpEntry[] {
  const starts = lineStarts(text);
  const lines = text.split("\n");
  return places.map((span) => {
    const { line } = placeOf(starts, span.from);
    const says = onOneLine(lines[line - 1]!);
    return { key: String(span.from), group: `Places of ${name}`, name, says, line, span, depth: 0 };
  });
}

/** Those whose name, words or line number hold what is looked for. */
export function matching(entries: readonly JumpEntry[], wanted: string): JumpEntry[] {
  const needle = wanted.trim().toLowerCase();
  if (needle === "") return [...entries];
  return entries.filter(
    ({ name, says, line }) => `${name}\n${says}`.toLowerCase().includes(needle) || String(line) === needle,
  );
}

/** Where a statement says its name; the statement itself where that is no word of it. */
function nameIn(text: string, { name, from, to }: OutlineEntry): Span {
  const at = text.indexOf(name, from);
  return at === -1 || at + name.length > to ? { from, to } : { from: at, to: at + name.length };
}

function onOneLine(text: string): string {
  return text.trim().replace(/\s+/gu, " ");
}
