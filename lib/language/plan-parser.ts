import type { Cursor } from "./cursor";
import type { ExpressionParser } from "./expression-parser";
import type { Span } from "./span";
import type { StatementForm, SweepRange } from "./syntax";

/** Reads what is to be solved: sweeps, draws and the search for several operating points. */
export class PlanParser {
  constructor(
    private readonly cursor: Cursor,
    private readonly expressions: ExpressionParser,
  ) {}

  /** `sweep KNOB from a to b, …` or `sweep KNOB over a, b`, after the word `sweep`. */
  sweep(span: Span): StatementForm {
    const knob = this.cursor.wantWord("The name of a knob after `sweep`");
    return { kind: "sweep", knob, range: this.range(), ...span };
  }

  private range(): SweepRange {
    const { cursor, expressions } = this;
    if (cursor.acceptWord("over")) {
      const one = () => expressions.among(() => expressions.sum());
      const values = [one()];
      while (cursor.acceptSymbol(",")) values.push(one());
      return { kind: "list", values };
    }
    if (!cursor.acceptWord("from")) {
      cursor.failHere("FRM2", "`from … to …` or `over …` is wanted after the knob");
      return { kind: "list", values: [] };
    }
    const start = expressions.sum();
    if (!cursor.acceptWord("to")) cursor.failHere("FRM2", "`to` and the end of the range are wanted here");
    // A count may follow close behind: `to 1,20 per decade`.
    const stop = expressions.among(() => expressions.sum());
    const spacings = "`, 20 per decade`, `, 51 points` or `, step 1 V`";
    if (!cursor.acceptSymbol(",")) cursor.failHere("FRM2", `The spacing is wanted here: ${spacings}`);
    if (cursor.acceptWord("step"))
      return { kind: "range", start, stop, spacing: "step", amount: expressions.sum() };
    const amount = expressions.sum();
    if (cursor.acceptWord("points")) return { kind: "range", start, stop, spacing: "points", amount };
    if (!cursor.acceptWord("per") || !cursor.acceptWord("decade")) {
      cursor.failHere("FRM2", `The spacing reads ${spacings}`);
    }
    return { kind: "range", start, stop, spacing: "per decade", amount };
  }

  /** `draws N seed S`, after the word `draws`. */
  draws(span: Span): StatementForm {
    const { cursor, expressions } = this;
    const count = expressions.sum();
    if (!cursor.acceptWord("seed")) {
      cursor.failHere("FRM2", "`seed` and a whole number are wanted here, as in `draws 400 seed 7`");
    }
    return { kind: "draws", count, seed: expressions.sum(), ...span };
  }

  /** `seek N`, after the word `seek`. */
  seek(span: Span): StatementForm {
    return { kind: "seek", count: this.expressions.sum(), ...span };
  }
}
