import type { Statement } from "./syntax";
import type { Token } from "./token";

/** What a line of the text belongs to. */
export interface LineOwner {
  /** The statement of the line that could not be read, or else its first one; the head of a block counts as a statement. */
  readonly statement: Statement | null;
  /** Where that statement ends, for a block its head. */
  readonly end: number;
  /** Whether the statement begins on this line and is alone on it. */
  readonly begins: boolean;
  readonly isAlone: boolean;
  /** How many blocks the line stands in; that of a closing brace is outside. */
  readonly level: number;
}

interface Entry {
  readonly statement: Statement;
  readonly from: number;
  readonly to: number;
  readonly level: number;
}

/** Finds the statement that a line belongs to; lines are asked for in order. */
export class LineOwners {
  private readonly entries: Entry[] = [];
  /** Where blocks begin and end, in order: +1 after a head, −1 before a closing brace. */
  private readonly turns: { readonly at: number; readonly by: 1 | -1 }[] = [];
  private next = 0;
  private turn = 0;
  private level = 0;

  constructor(statements: readonly Statement[]) {
    this.gather(statements, 0);
  }

  private gather(statements: readonly Statement[], level: number): void {
    for (const statement of statements) {
      if (statement.kind !== "block") {
        this.entries.push({ statement, from: statement.from, to: statement.to, level });
        continue;
      }
      this.entries.push({ statement, from: statement.from, to: statement.headTo, level });
      this.turns.push({ at: statement.headTo, by: 1 });
      this.gather(statement.statements, level + 1);
      this.turns.push({ at: statement.isClosed ? statement.to - 1 : statement.to, by: -1 });
    }
  }

  of(row: readonly Token[], from: number, to: number): LineOwner {
    // A brace that closes a block at the head of its line stands outside.
    const first = row[0]?.text === "}" ? row[0].from : from - 1;
    while (this.turn < this.turns.length && this.turns[this.turn]!.at <= first) {
      this.level += this.turns[this.turn]!.by;
      this.turn += 1;
    }
    const { level } = this;
    while (this.next < this.entries.length && this.entries[this.next]!.to < from) this.next += 1;
    let owner: Entry | null = null;
    let count = 0;
    for (let at = this.next; at < this.entries.length && this.entries[at]!.from <= to; at++) {
      const entry = this.entries[at]!;
      count += 1;
      if (owner === null || (owner.statement.whole && !entry.statement.whole)) owner = entry;
    }
    if (owner === null) return { statement: null, end: to, begins: false, isAlone: false, level };
    const { statement } = owner;
    const begins = owner.from >= from;
    if (begins && !row.some((token) => token.from === owner.from)) {
      return { statement: null, end: to, begins: false, isAlone: false, level };
    }
    const last = row.findLast((token) => token.kind !== "comment");
    const isAlone =
      begins && count === 1 && last !== undefined && last.to <= owner.to && row[0]!.from === owner.from;
    return { statement, end: owner.to, begins, isAlone, level };
  }
}
