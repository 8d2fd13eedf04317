import { BlockParser } from "./block-parser";
import { ContractParser } from "./contract-parser";
import { Cursor } from "./cursor";
import type { Diagnostic } from "./diagnostic";
import { ExpressionParser } from "./expression-parser";
import { layOut } from "./layout";
import { tokenize } from "./lexer";
import { Nesting } from "./nesting";
import { PartParser } from "./part-parser";
import { PlanParser } from "./plan-parser";
import { Report } from "./report";
import type { Netlist, StatementForm, Word } from "./syntax";
import { quote, STATEMENT_WORDS, type Token } from "./token";

/** What was read, and where no space may stand (see Cursor.tight), for the formatter. */
export interface Parsed {
  readonly netlist: Netlist;
  readonly tight: ReadonlySet<number>;
}

/** Reads the whole text; never throws, never stops at a mistake. Diagnostics are those of the lexer and of the form. */
export function parse(text: string): { netlist: Netlist; diagnostics: Diagnostic[] } {
  const report = new Report();
  const { netlist } = parseTokens(tokenize(text, report), text.length, report);
  return { netlist, diagnostics: report.sorted() };
}

/** As `parse`, for tokens at hand and a report that other phases share. */
export function parseTokens(tokens: readonly Token[], length: number, report: Report): Parsed {
  const cursor = new Cursor(layOut(tokens, length), report);
  const parser = new StatementParser(cursor);
  const nesting = new Nesting(report);
  while (!cursor.done) {
    cursor.begin();
    const { from } = cursor.token;
    const closes = nesting.isInside && cursor.acceptSymbol("}");
    const form = closes ? null : parser.statement(from);
    const to = Math.max(cursor.behind, form?.to ?? 0);
    const rest = cursor.token;
    if (!cursor.atEnd) {
      const message = `The statement is complete before ${quote(cursor.token.text)}; begin a new line there or remove it.`;
      cursor.fail("FRM4", cursor.token, message);
    }
    const end = cursor.token.from;
    const whole = cursor.leave();
    if (form === null) {
      nesting.close(to);
      if (!whole) nesting.add({ kind: "broken", declares: null, from: rest.from, to: end, whole }, false);
    } else nesting.add({ ...form, from, to: whole ? to : end, whole }, cursor.justOpened);
  }
  return { netlist: { statements: nesting.finish() }, tight: cursor.tight };
}

class StatementParser {
  private readonly expressions: ExpressionParser;
  private readonly parts: PartParser;
  private readonly plan: PlanParser;
  private readonly blocks: BlockParser;
  private readonly contract: ContractParser;

  constructor(private readonly cursor: Cursor) {
    this.expressions = new ExpressionParser(cursor);
    this.parts = new PartParser(cursor, this.expressions);
    this.plan = new PlanParser(cursor, this.expressions);
    this.blocks = new BlockParser(cursor, this.expressions);
    this.contract = new ContractParser(cursor, this.expressions);
  }

  statement(from: number): StatementForm {
    const { cursor } = this;
    const first = cursor.token;
    const span = { from, to: first.to };
    if (first.kind === "word") {
      if (cursor.isSymbol("--", 1)) return this.parts.path(span);
      if (cursor.isSymbol("-", 1) && cursor.peek(2).kind === "word" && cursor.isSymbol(":", 3))
        return this.parts.path(span);
      if (cursor.isSymbol(":", 1)) return this.parts.device(span);
      if (STATEMENT_WORDS.has(first.text)) return this.known(cursor.take().text, span);
    }
    if (first.kind === "number" && cursor.isSymbol("--", 1)) return this.parts.path(span);
    return this.unknown(first, span);
  }

  /** A line that begins with nothing known. `NAME = VALUE` names a value all the same, so that the uses of it stay quiet. */
  private unknown(first: Token, span: { from: number; to: number }): StatementForm {
    const { cursor } = this;
    const message = `No statement begins with ${quote(first.text)}; ${meant(cursor)}.`;
    const isNamed = first.kind === "word" && cursor.isSymbol("=", 1);
    if (!isNamed) {
      cursor.fail("FRM1", first, message);
      return { kind: "broken", declares: null, ...span };
    }
    const name = cursor.takeWord();
    const fix = { title: "Write let before it", from: first.from, to: first.from, text: "let " };
    cursor.fail("FRM1", first, message, fix);
    return { kind: "broken", declares: name, ...span };
  }

  private known(word: string, span: { from: number; to: number }): StatementForm {
    switch (word) {
      case "title":
        return this.title(span);
      case "model":
        return this.parts.model(span);
      case "use":
        return this.blocks.use(span);
      case "block":
        return this.blocks.head(span);
      case "sweep":
        return this.plan.sweep(span);
      case "draws":
        return this.plan.draws(span);
      case "seek":
        return this.plan.seek(span);
      case "show":
        return this.show(span);
      case "read":
        return this.contract.read(span);
      case "require":
        return this.contract.require(span);
      default:
        return this.value(word === "let" ? "let" : "knob", span);
    }
  }

  private title(span: { from: number; to: number }): StatementForm {
    const { cursor } = this;
    if (cursor.token.kind !== "string") {
      cursor.failHere("FRM2", 'A text such as `"Log converter"` is wanted after `title`');
      return { kind: "broken", declares: null, ...span };
    }
    const token = cursor.take();
    const text = token.text.slice(1, -1).replace(/\\(["\\])/gu, "$1");
    return { kind: "title", text: { from: token.from, to: token.to, text }, ...span };
  }

  private value(kind: "let" | "knob", span: { from: number; to: number }): StatementForm {
    const { cursor } = this;
    const name = cursor.wantWord(`A name after ${quote(kind)}`);
    cursor.wantSymbol("=", "the name");
    const value = this.expressions.expression();
    const tolerance = this.parts.tolerance();
    let range = null;
    if (kind === "knob" && cursor.acceptWord("in")) {
      const low = this.expressions.sum();
      cursor.wantSymbol("..", "the lower end of the range");
      range = { low, high: this.expressions.sum() };
    }
    return { kind, name, value, tolerance, range, ...span };
  }

  private show(span: { from: number; to: number }): StatementForm {
    const { cursor } = this;
    const items = [];
    do {
      const from = cursor.token.from;
      const name: Word | null =
        cursor.token.kind === "word" && cursor.isSymbol("=", 1) ? cursor.takeWord() : null;
      if (name !== null) cursor.take();
      const value = this.expressions.among(() => this.expressions.expression());
      items.push({ name, value, from, to: value.to });
    } while (cursor.acceptSymbol(","));
    return { kind: "show", items, ...span };
  }
}

/** A guess at what a line was to be, from its first tokens. */
function meant(cursor: Cursor): string {
  if (cursor.token.kind === "word" && cursor.isSymbol("=", 1)) return "to name a value write `let` before it";
  if (["for", "at", "in", "as"].includes(cursor.token.text))
    return `a requirement stands on one line: join ${quote(cursor.token.text)} to the line before`;
  return "a line begins with a word such as `let`, `model`, `sweep` or `show`, with `net -- …` or with `name : kind`";
}
