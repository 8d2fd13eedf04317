import type { Code } from "./catalogue";
import type { Fix } from "./diagnostic";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Word } from "./syntax";
import { quote, type Token } from "./token";

/**
 * Walks over laid-out tokens. The first failure inside a statement is reported and the cursor jumps to the statement's end, where
 * every further wish fails in silence; so one mistake is one diagnostic, and the parser never stops.
 */
export class Cursor {
  private at = 0;
  private failed = false;
  private opened = false;
  /** Offsets of tokens that nothing may be put after: unary operators and the names of called functions. */
  readonly tight = new Set<number>();

  constructor(
    private readonly tokens: readonly Token[],
    private readonly report: Report,
  ) {}

  get token(): Token {
    return this.tokens[this.at]!;
  }

  /** The token `ahead` places further on; the last one beyond the end. */
  peek(ahead: number): Token {
    return this.tokens[Math.min(this.at + ahead, this.tokens.length - 1)]!;
  }

  get atEnd(): boolean {
    return this.token.kind === "end";
  }

  get done(): boolean {
    return this.atEnd && this.at === this.tokens.length - 1;
  }

  /** Where the last token taken ends. */
  get behind(): number {
    return this.tokens[this.at - 1]?.to ?? 0;
  }

  /** Begins a statement. */
  begin(): void {
    this.failed = false;
  }

  /** Whether the statement left last ended in the opening brace of a block. */
  get justOpened(): boolean {
    return this.opened;
  }

  /** Leaves a statement: jumps over its end. Says whether all of it could be read. */
  leave(): boolean {
    this.toEnd();
    this.opened = this.token.text === "{";
    if (!this.done) this.at += 1;
    return !this.failed;
  }

  take(): Token {
    const token = this.token;
    if (!this.atEnd) this.at += 1;
    return token;
  }

  /** The text and place of the next token, whatever it is. */
  takeWord(): Word {
    const { text, from, to } = this.take();
    return { text, from, to };
  }

  isSymbol(text: string, ahead = 0): boolean {
    const token = this.peek(ahead);
    return token.kind === "symbol" && token.text === text;
  }

  isWord(text: string): boolean {
    return this.token.kind === "word" && this.token.text === text;
  }

  acceptSymbol(text: string): boolean {
    if (!this.isSymbol(text)) return false;
    this.take();
    return true;
  }

  acceptWord(text: string): boolean {
    if (!this.isWord(text)) return false;
    this.take();
    return true;
  }

  /** A symbol that must stand here; `after` says behind what. */
  wantSymbol(text: string, after: string): boolean {
    if (this.acceptSymbol(text)) return true;
    this.failHere("FRM2", `${quote(text)} is wanted after ${after}`);
    return false;
  }

  /** A name that must stand here, empty where there is none. */
  wantWord(what: string): Word {
    if (this.token.kind === "word") return this.takeWord();
    this.failHere("FRM2", `${what} is wanted here`);
    return { text: "", from: this.behind, to: this.behind };
  }

  /** Fails at the present token, adding what stands there instead. */
  failHere(code: Code, wish: string): void {
    const token = this.token;
    const instead = token.kind === "end" ? "but the statement ends" : `not ${quote(token.text)}`;
    const span = token.kind === "end" ? { from: Math.max(0, this.behind - 1), to: this.behind } : token;
    this.fail(code, span, `${wish}, ${instead}.`);
  }

  /** One diagnostic a statement: the first. What the lexer reported is not reported again. */
  fail(code: Code, span: Span, message: string, fix?: Fix): void {
    if (!this.failed && this.token.kind !== "unknown") this.report.error(code, span, message, fix);
    this.failed = true;
    this.toEnd();
  }

  /** Marks the statement as not wholly read without leaving its tokens. */
  note(code: Code, span: Span, message: string, fix?: Fix): void {
    if (!this.failed) this.report.error(code, span, message, fix);
    this.failed = true;
  }

  private toEnd(): void {
    while (!this.atEnd) this.at += 1;
  }
}
