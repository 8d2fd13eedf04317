import type { Code } from "./catalogue";
import type { Diagnostic, Fix } from "./diagnostic";
import type { Span } from "./span";

/** More problems than this are counted, not listed: nobody reads them, and mending the first ones mends most of the rest. */
const MOST_LISTED = 200;

/** Collects what the phases find. */
export class Report {
  private readonly listed: Diagnostic[] = [];
  private unlisted = 0;
  private errors = 0;
  /** What was found where: a block is checked once for every instance, and its problems are told once. */
  private readonly told = new Set<string>();

  error(code: Code, span: Span, message: string, fix?: Fix): void {
    this.errors += 1;
    this.add(code, "error", span, message, fix);
  }

  warning(code: Code, span: Span, message: string, fix?: Fix): void {
    this.add(code, "warning", span, message, fix);
  }

  /**
   * An error at a word, with the word that was probably meant, or else with what could stand there. The search for that word is
   * left out where the error will not be listed.
   */
  propose(code: Code, word: Span, start: string, search: () => string | null, otherwise: string): void {
    const near = this.listed.length < MOST_LISTED ? search() : null;
    if (near === null) this.error(code, word, `${start}; ${otherwise}.`);
    else {
      const fix = { title: `Change to ${near}`, from: word.from, to: word.to, text: near };
      this.error(code, word, `${start}; did you mean \`${near}\`?`, fix);
    }
  }

  get hasErrors(): boolean {
    return this.errors > 0;
  }

  /** How many have been found so far. */
  get count(): number {
    return this.listed.length + this.unlisted;
  }

  /** Everything found, by place; at the end of it, where there is more than a page of problems, one that says so. */
  sorted(): Diagnostic[] {
    const all = [...this.listed].sort((a, b) => a.from - b.from || a.to - b.to);
    if (this.unlisted > 0) {
      const last = all[all.length - 1]!;
      const message = `${this.unlisted} further problems are not listed; mend these first.`;
      all.push({ code: "CAP6", severity: "error", from: last.from, to: last.to, message });
    }
    return all;
  }

  private add(code: Code, severity: "error" | "warning", span: Span, message: string, fix?: Fix): void {
    const key = `${code} ${span.from} ${span.to}`;
    if (this.told.has(key)) return;
    this.told.add(key);
    if (this.listed.length >= MOST_LISTED) {
      this.unlisted += 1;
      return;
    }
    const found = { code, severity, from: span.from, to: span.to, message };
    this.listed.push(fix === undefined ? found : { ...found, fix });
  }
}
