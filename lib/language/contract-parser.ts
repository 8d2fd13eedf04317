import type { Cursor } from "./cursor";
import type { ExpressionParser } from "./expression-parser";
import type { Span } from "./span";
import type { RelationSyntax, StatementForm, WindowSyntax, Word } from "./syntax";
import { quote } from "./token";

type Comparison = "<=" | ">=" | "<" | ">";

/** Reads what must hold: readings and requirements, with their windows. */
export class ContractParser {
  constructor(
    private readonly cursor: Cursor,
    private readonly expressions: ExpressionParser,
  ) {}

  /** `read NAME = value [windows]`, after the word `read`. */
  read(span: Span): StatementForm {
    const { cursor } = this;
    const name = cursor.wantWord("A name after `read`");
    cursor.wantSymbol("=", "the name");
    const value = this.expressions.expression();
    const windows = this.windows();
    if (cursor.token.kind === "word" && ["as", "in"].includes(cursor.token.text)) {
      cursor.failHere("FRM2", "A reading takes windows alone; what must hold of it stands in a `require`");
    }
    return { kind: "read", name, value, windows, ...span };
  }

  /** `require value relation [windows] [in share of draws] [as "…"]`, after the word `require`. */
  require(span: Span): StatementForm {
    const value = this.expressions.sum();
    const relation = this.relation();
    const windows = this.windows();
    const share = this.share();
    return { kind: "require", value, relation, windows, share, label: this.label(), ...span };
  }

  private relation(): RelationSyntax {
    const { cursor, expressions } = this;
    const { text } = cursor.token;
    if (cursor.token.kind === "symbol" && isComparison(text)) {
      cursor.take();
      const bound = expressions.sum();
      if (cursor.token.kind === "symbol" && isComparison(cursor.token.text)) {
        const message = "Comparisons do not chain; write `between A and B`.";
        cursor.fail("FRM8", cursor.token, message);
      }
      return { kind: "compare", operator: text, bound };
    }
    if (cursor.acceptWord("within")) {
      const target = expressions.sum();
      cursor.wantSymbol("±", "the value to be met, as in `within 59.2 mV ± 1 %`");
      return { kind: "within", target, half: expressions.sum() };
    }
    if (cursor.acceptWord("between")) {
      const low = expressions.sum();
      if (!cursor.acceptWord("and")) cursor.failHere("FRM2", "`and` and the upper end are wanted here");
      return { kind: "between", low, high: expressions.sum() };
    }
    if (cursor.acceptWord("falling")) return { kind: "falling" };
    if (!cursor.acceptWord("rising")) {
      const wish =
        "What must hold is wanted here: `<= 1 mV`, `within 10 mV ± 1 %`, `between A and B`, `rising`";
      cursor.failHere("FRM2", wish);
    }
    return { kind: "rising" };
  }

  /** `for KNOB in A .. B` and `at KNOB = A`, as many as there are. */
  private windows(): WindowSyntax[] {
    const { cursor, expressions } = this;
    const windows: WindowSyntax[] = [];
    for (;;) {
      const from = cursor.token.from;
      if (cursor.acceptWord("for")) {
        const knob = this.knob("for");
        if (!cursor.acceptWord("in")) {
          cursor.failHere(
            "FRM2",
            `${quote("in")} is wanted after the knob, as in \`for ${knob.text} in 1 V .. 2 V\``,
          );
        }
        const low = expressions.sum();
        if (low.kind === "binary" && low.operator === "-" && !cursor.isSymbol("..", 0)) {
          const span = { from: low.left.to, to: low.right.from };
          const fix = { title: "Write ..", ...span, text: " .. " };
          cursor.fail("FRM2", span, "A window goes from one end to the other by `..`, not by `-`.", fix);
        }
        cursor.wantSymbol("..", "the lower end of the window");
        const high = expressions.sum();
        windows.push({ knob, low, high, from, to: cursor.behind });
      } else if (cursor.acceptWord("at")) {
        const knob = this.knob("at");
        cursor.wantSymbol("=", "the knob");
        const low = expressions.sum();
        windows.push({ knob, low, high: null, from, to: cursor.behind });
      } else return windows;
    }
  }

  private knob(after: string): Word {
    return this.cursor.wantWord(`The name of a knob after ${quote(after)}`);
  }

  /** `in 95 % of draws`. */
  private share() {
    const { cursor } = this;
    if (!cursor.acceptWord("in")) return null;
    const share = this.expressions.sum();
    if (!cursor.acceptWord("of") || !cursor.acceptWord("draws")) {
      cursor.failHere("FRM2", "A share of the draws reads `in 95 % of draws`");
    }
    return share;
  }

  /** `as "…"`, the text without its quotation marks. */
  private label(): Word | null {
    const { cursor } = this;
    if (!cursor.acceptWord("as")) return null;
    if (cursor.token.kind !== "string") {
      cursor.failHere("FRM2", 'A text such as `"scale factor"` is wanted after `as`');
      return null;
    }
    const { text, from, to } = cursor.take();
    return { text: text.slice(1, -1).replace(/\\(["\\])/gu, "$1"), from, to };
  }
}

function isComparison(text: string): text is Comparison {
  return text === "<=" || text === ">=" || text === "<" || text === ">";
}
