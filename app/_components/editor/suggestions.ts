import { lineStarts } from "@/lib/language/span";
import type { Completion } from "@/lib/language/symbols/completion";
import { type EditorRange, rangeOf } from "./markers";

/** A completion as the editor takes it; `insertText` is in the editor's own notation of places to fill. */
export interface Suggestion {
  readonly label: string;
  /** What it is, in a word. */
  readonly detail: string;
  readonly about: string;
  readonly insertText: string;
  readonly filterText: string;
  readonly sortText: string;
  readonly range: EditorRange;
  /** Whether a list is wanted again when it has been put in. */
  readonly goesOn: boolean;
}

const WORDS: Partial<Record<Completion["what"], string>> = {
  port: "net of the block",
  let: "value",
  instance: "instance of a block",
  group: "group",
};

/** Completions of `text` in the order in which they were found, which the editor keeps among what matches as well. */
export function suggestionsOf(text: string, completions: readonly Completion[]): Suggestion[] {
  const starts = lineStarts(text);
  return completions.map((one, index) => {
    const put = one.snippet ?? one.text;
    return {
      label: one.text,
      detail: WORDS[one.what] ?? one.what,
      about: one.about.replaceAll("`", ""),
      insertText: editorSnippet(put),
      filterText:
        one.spelled === undefined || one.spelled === one.text ? one.text : `${one.text} ${one.spelled}`,
      sortText: String(index).padStart(4, "0"),
      range: rangeOf(text, one, starts),
      goesOn: /(= |for |at |to |within |between |in )$/.test(put),
    };
  });
}

/** `‹text›` as the editor spells its numbered places; one that is empty and last is where the cursor comes to rest. */
export function editorSnippet(put: string): string {
  const places = put.match(/‹[^›]*›/gu) ?? [];
  let number = 0;
  return put.replace(/‹([^›]*)›|[$\\}]/gu, (found, inner: string | undefined) => {
    if (inner === undefined) return `\\${found}`;
    number += 1;
    if (inner === "") return number === places.length ? "$0" : `$${number}`;
    return `\${${number}:${inner.replace(/[$\\}]/gu, "\\$&")}}`;
  });
}

const OPENING: ReadonlySet<string> = new Set([":", "{", ",", "=", "--"]);
const ASKING: ReadonlySet<string> = new Set(["sweep", "for", "at", "track", "over"]);

/** Whether a blank that was just typed at the end of `line` asks for a list: where a kind, a pin, a net or a knob must follow. */
export function blankAsks(line: string): boolean {
  const before = line.trimEnd();
  if (before === line || before.includes("#") || before === "") return false;
  const last = /(--|[:{,=]|\p{L}+)$/u.exec(before)?.[1] ?? "";
  return OPENING.has(last) || ASKING.has(last);
}
