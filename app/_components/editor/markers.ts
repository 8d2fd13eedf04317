import type { editor } from "monaco-editor/editor";
import type { Diagnostic, Fix } from "@/lib/language/diagnostic";
import { lineStarts, placeOf, type Span } from "@/lib/language/span";

/** A range as the editor counts: lines and columns from 1. */
export interface EditorRange {
  readonly startLineNumber: number;
  readonly startColumn: number;
  readonly endLineNumber: number;
  readonly endColumn: number;
}

/** Where a span of `text` stands. An offset beyond the text stands at its end. */
export function rangeOf(text: string, span: Span, starts = lineStarts(text)): EditorRange {
  const from = placeOf(starts, Math.min(span.from, text.length));
  const to = placeOf(starts, Math.min(Math.max(span.from, span.to), text.length));
  return {
    startLineNumber: from.line,
    startColumn: from.column,
    endLineNumber: to.line,
    endColumn: to.column,
  };
}

/** A code as one reads it aloud: "NAM 3". */
export function spellCode(code: Diagnostic["code"]): string {
  return code.replace(/(\d+)$/, " $1");
}

/** The editor's own severities: 8 is an error, 4 a warning. */
const SEVERITIES = { error: 8, warning: 4 } as const;

/** The diagnostics of `text` as marks in the editor. An empty span is widened by one character, so that it can be seen. */
export function markersOf(text: string, diagnostics: readonly Diagnostic[]): editor.IMarkerData[] {
  const starts = lineStarts(text);
  return diagnostics.map((diagnostic) => {
    const range = rangeOf(text, visible(text, diagnostic), starts);
    return {
      ...range,
      severity: SEVERITIES[diagnostic.severity],
      message: diagnostic.message.replaceAll("`", ""),
      code: spellCode(diagnostic.code),
    };
  });
}

/** An empty span grown over the character before it, or after it at the start of a line. */
function visible(text: string, { from, to }: Span): Span {
  if (to > from) return { from, to };
  const at = Math.min(from, text.length);
  if (at > 0 && text[at - 1] !== "\n") return { from: at - 1, to: at };
  return { from: at, to: Math.min(at + 1, text.length) };
}

/** `text` with the fix put in. */
export function mend(text: string, fix: Fix): string {
  return text.slice(0, fix.from) + fix.text + text.slice(fix.to);
}
