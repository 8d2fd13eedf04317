import { type Diagnostic, removal } from "./diagnostic";
import type { Flat, Import } from "./expand";
import type { Report } from "./report";
import { Rewriter } from "./rewrite";
import { Scope } from "./scope";
import { lineStarts, placeOf, type Span } from "./span";
import type { Netlist, Statement } from "./syntax";

/** The text that a `use` statement names, null where there is none; without a revision the latest one. */
export type Library = (name: string, revision: number | null) => string | null;

type UseStatement = Extract<Statement, { kind: "use" }>;

/** What is asked of the checker, so that a shelf is checked as a file of its own; null once that would be too much. */
export type CheckShelf = (
  text: string,
  active: readonly string[],
) => { readonly netlist: Netlist; readonly diagnostics: readonly Diagnostic[] } | null;

/** Fetches what a file uses: models and blocks of other texts, with the values that those need. */
export class Shelves {
  private readonly rewriter = new Rewriter();
  /** False once something could not be fetched, so that names may be missing. */
  isComplete = true;

  constructor(
    private readonly library: Library | null,
    private readonly check: CheckShelf,
    private readonly report: Report,
  ) {}

  /** What the `use` statements bring in; `active` names the shelves that are being fetched around them. */
  imports(statements: readonly Statement[], active: readonly string[], prefix = ""): Import[] {
    const seen = new Set<string>();
    return statements.flatMap((statement) => {
      if (statement.kind !== "use" || !statement.whole) return [];
      if (seen.has(statement.shelf.text)) {
        this.report.error(
          "FRM9",
          statement,
          `"${statement.shelf.text}" is used twice; remove one of the two.`,
          removal(statement),
        );
        return [];
      }
      seen.add(statement.shelf.text);
      const netlist = this.bring(statement, active);
      if (netlist === null) this.isComplete = false;
      return netlist === null ? [] : [this.import(netlist.statements, statement, active, prefix)];
    });
  }

  private bring(statement: UseStatement, active: readonly string[]): Netlist | null {
    const { shelf } = statement;
    const fail = (code: "NAM13" | "NAM14", message: string): null => {
      this.report.error(code, shelf, message);
      return null;
    };
    const revision = this.revision(statement);
    if (revision === undefined) return null;
    const name = `"${shelf.text}"`;
    if (active.includes(shelf.text))
      return fail("NAM14", `${name} uses itself, so it would never end; take this line out.`);
    if (this.library === null) {
      return fail(
        "NAM13",
        `No shelf is at hand here, so ${name} cannot be used; put its models and blocks into this file.`,
      );
    }
    const text = this.library(shelf.text, revision);
    if (text === null) {
      const which = revision === null ? name : `revision ${revision} of ${name}`;
      return fail(
        "NAM13",
        `${which[0]!.toUpperCase()}${which.slice(1)} is not on the shelf; look at its name${revision === null ? "" : " and revision"}.`,
      );
    }
    const checked = this.check(text, [...active, shelf.text]);
    if (checked === null)
      return fail("NAM14", `${name} is one shelf too many for one file; use fewer of them.`);
    const { netlist, diagnostics } = checked;
    const first = diagnostics.find(({ severity }) => severity === "error");
    if (first === undefined) return netlist;
    const { line } = placeOf(lineStarts(text), first.from);
    return fail("NAM14", `${name} has a problem of its own in line ${line} (${first.code}); mend it there.`);
  }

  /** Null for none, undefined for one that cannot be, which is reported. */
  private revision({ revision }: UseStatement): number | null | undefined {
    if (revision === null) return null;
    const isWhole = revision.kind === "number" && revision.unit === null && Number.isInteger(revision.value);
    if (isWhole && revision.value > 0) return revision.value;
    this.report.error("PLN4", revision, "A revision is a whole number above 0, as in `revision 3`.");
    return undefined;
  }

  private import(
    foreign: readonly Statement[],
    use: UseStatement,
    active: readonly string[],
    around: string,
  ): Import {
    const here = { from: use.shelf.from, to: use.shelf.to };
    const prefix = `${around}"${use.shelf.text}".`;
    const statements = placed(foreign, here);
    const scope = new Scope(prefix, null);
    const inner = this.imports(statements, [...active, use.shelf.text], prefix);
    for (const { offered } of inner)
      for (const one of offered) scope.set(one.local, { ...one, isShared: true });
    const offered = statements.flatMap((statement): Import["offered"] => {
      if (statement.kind !== "model" && statement.kind !== "block") return [];
      const local = statement.name.text;
      const block = statement.kind === "block" ? { statement, scope, isImported: true } : null;
      return [
        { local, name: around + local, block, kind: statement.kind === "model" ? statement.of.text : null },
      ];
    });
    for (const one of offered) scope.set(one.local, { ...one, isShared: true });
    scope.fill(statements, true, () => undefined);
    const needed = inner.flatMap((one) => one.statements);
    return { statements: [...needed, ...statements.flatMap((one) => this.needed(one, scope))], offered };
  }

  /** A value, model or block of a shelf under the name that it has in the file. Its knobs are values here. */
  private needed(statement: Statement, scope: Scope): Flat[] {
    const { kind } = statement;
    if (kind === "block") return [{ ...statement, name: scope.flat(statement.name), statements: [] }];
    if (kind !== "let" && kind !== "knob" && kind !== "model") return [];
    const flat = this.rewriter.statement(statement, scope)!;
    if (flat.kind === "model") return [{ ...flat, name: scope.flat(statement.name) }];
    return flat.kind === "knob" ? [{ ...flat, kind: "let" }] : [flat];
  }
}

/** The same with every place in the text set to one span: that of the statement which brings it in. */
function placed<T>(value: T, span: Span): T {
  if (Array.isArray(value)) return value.map((item) => placed(item, span)) as T;
  if (typeof value !== "object" || value === null) return value;
  const copy: Record<string, unknown> = {};
  for (const [key, inner] of Object.entries(value)) copy[key] = placed(inner, span);
  if ("from" in value) Object.assign(copy, span);
  return copy as T;
}
