import { PURE } from "@/lib/units/dimension";
import type { Design } from "./ast";
import { removal } from "./diagnostic";
import type { Flat } from "./expand";
import { count, MOST_BRANCHES, MOST_POINTS } from "./limits";
import type { Quantities } from "./quantities";
import type { Report } from "./report";
import type { Expression, Statement } from "./syntax";

/** Checks `draws` and `seek`: whole numbers, each statement once. */
export class DrawsCheck {
  constructor(
    private readonly quantities: Quantities,
    private readonly report: Report,
  ) {}

  draws(statements: readonly Flat[]): Design["draws"] {
    const statement = this.single(statements, "draws");
    if (statement === null) return null;
    const number = this.whole(statement.count, "The number of draws", 1, MOST_POINTS - 1);
    const seed = this.whole(statement.seed, "The seed", 0, Number.MAX_SAFE_INTEGER);
    return number === null || seed === null ? null : { count: number, seed };
  }

  seek(statements: readonly Flat[]): number | null {
    const statement = this.single(statements, "seek");
    if (statement === null) return null;
    return this.whole(statement.count, "The number of operating points to look for", 1, MOST_BRANCHES);
  }

  /** The first statement of a kind; more of them are reported. */
  private single<K extends "draws" | "seek">(
    statements: readonly Flat[],
    kind: K,
  ): Extract<Statement, { kind: K }> | null {
    const found = statements.filter((one): one is Extract<Statement, { kind: K }> => one.kind === kind);
    for (const more of found.slice(1)) {
      const message = `A netlist has one \`${kind}\`; remove this one or the other.`;
      this.report.error("FRM9", more, message, removal(more));
    }
    return found[0] ?? null;
  }

  private whole(expression: Expression, what: string, least: number, most: number): number | null {
    const value = this.quantities.fixed(expression, { dimension: PURE, unit: "1", what });
    if (value === null) return null;
    if (Number.isInteger(value) && value >= least && value <= most) return value;
    const message = `${what} must be a whole number from ${least} to ${count(most)}.`;
    this.report.error("PLN4", expression, message);
    return null;
  }
}
