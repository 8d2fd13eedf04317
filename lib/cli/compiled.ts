import { compile, type Job } from "@/lib/analyses/compile";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { OWN } from "@/lib/language/limits";
import { lineStarts, placeOf } from "@/lib/language/span";
import type { Remark } from "./annotations";
import type { Case } from "./junit";
import { FolderShelf, type Shelf, type Source } from "./sources";

/** A source with what its text came to. `job` is null where a diagnostic is an error. */
export interface Compiled {
  readonly source: Source;
  readonly job: Job | null;
  readonly diagnostics: readonly Diagnostic[];
  readonly shelf: Shelf;
}

export function compileSource(source: Source): Compiled {
  const shelf = new FolderShelf(source.folder);
  const library = (name: string) => shelf.find(name);
  return { source, ...compile(source.text, { library, size: OWN }), shelf: shelf.texts };
}

/** The diagnostics of a source, each with its place. */
export function remarksOf({ source, diagnostics }: Compiled): Remark[] {
  const starts = lineStarts(source.text);
  return diagnostics.map(({ from, severity, code, message }) => {
    return { file: source.name, ...placeOf(starts, from), severity, code, message };
  });
}

/** The diagnostics as a person reads them: the sentence, then the line with what it is about underlined. */
export function explain({ source, diagnostics }: Compiled): string {
  const starts = lineStarts(source.text);
  const lines = source.text.split("\n");
  return diagnostics
    .map(({ from, to, severity, code, message, fix }) => {
      const { line, column } = placeOf(starts, from);
      const text = (lines[line - 1] ?? "").replace(/\t/g, " ").trimEnd();
      const width = Math.max(1, Math.min(to - from, text.length - column + 1));
      const gutter = String(line).padStart(4);
      return [
        `${source.name}:${line}:${column}: ${severity} ${code}: ${message}`,
        `${gutter} | ${text}`,
        `     | ${" ".repeat(column - 1)}${"^".repeat(width)}${fix === undefined ? "" : `  ${fix.title}`}`,
        "",
      ].join("\n");
    })
    .join("");
}

/** The case of the netlist itself in a report: its first error, with all of them in the details. */
export function netlistCase(compiled: Compiled): Case {
  const errors = remarksOf(compiled).filter(({ severity }) => severity === "error");
  const first = errors[0];
  const name = "the netlist can be solved";
  if (first === undefined) return { name, problem: null };
  const details = errors
    .map((one) => `${one.file}:${one.line}:${one.column}: ${one.code}: ${one.message}`)
    .join("\n");
  return { name, problem: { kind: "error", type: first.code, message: first.message, details } };
}
