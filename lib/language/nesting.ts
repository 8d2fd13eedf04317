import { MOST_BLOCK_DEPTH } from "./limits";
import type { Report } from "./report";
import type { Statement } from "./syntax";
import { FILE_STATEMENTS, quote } from "./token";

type BlockStatement = Extract<Statement, { kind: "block" }>;

interface Frame {
  readonly head: Statement;
  readonly around: Statement[];
}

/** Puts the statements between a block's braces into the block. Blocks are kept on a stack, so that depth costs no recursion. */
export class Nesting {
  private readonly frames: Frame[] = [];
  private statements: Statement[] = [];

  constructor(private readonly report: Report) {}

  get isInside(): boolean {
    return this.frames.length > 0;
  }

  /** Adds a statement; `opens` says that a brace was opened at its end, in which what follows stands. */
  add(statement: Statement, opens: boolean): void {
    if (!opens) {
      const { kind, from, to, whole } = statement;
      this.statements.push(
        kind === "block" ? { kind: "broken", declares: statement.name, from, to, whole } : statement,
      );
      return;
    }
    if (this.frames.length === MOST_BLOCK_DEPTH) {
      const message = `Blocks are nested more than ${MOST_BLOCK_DEPTH} deep; declare them beside each other.`;
      this.report.error("CAP2", statement, message);
    }
    this.frames.push({ head: statement, around: this.statements });
    this.statements = [];
  }

  /** The closing brace of the innermost block, which ends at `to`. */
  close(to: number): void {
    for (const inner of this.statements) {
      if (!FILE_STATEMENTS.has(inner.kind)) continue;
      const message = `${quote(inner.kind)} belongs to the file and not into a block; move it out.`;
      this.report.error("FRM13", inner, message);
    }
    this.leave(to, true);
  }

  /** All statements of the file; blocks that are still open are reported and closed before what belongs to the file. */
  finish(): Statement[] {
    while (this.isInside) {
      const out = this.statements.findIndex((inner) => FILE_STATEMENTS.has(inner.kind));
      const kept = out === -1 ? this.statements : this.statements.slice(0, out);
      const rest = out === -1 ? [] : this.statements.slice(out);
      const { head } = this.frames[this.frames.length - 1]!;
      const to = kept[kept.length - 1]?.to ?? head.to;
      const fix = { title: "Close it with }", from: to, to, text: "\n}" };
      if (this.frames.length === 1) {
        this.report.error("FRM5", head, "This block is not closed; put a `}` at its end.", fix);
      }
      this.statements = kept;
      this.leave(to, false);
      this.statements.push(...rest);
    }
    return this.statements;
  }

  private leave(to: number, isClosed: boolean): void {
    const { head, around } = this.frames.pop()!;
    const inner = this.statements;
    this.statements = around;
    if (this.frames.length >= MOST_BLOCK_DEPTH) return;
    const block: BlockStatement | null = head.kind === "block" ? head : null;
    this.statements.push(
      block === null ? head : { ...block, statements: inner, headTo: head.to, isClosed, to },
    );
  }
}
