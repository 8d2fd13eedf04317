import type { Cursor } from "./cursor";
import type { ExpressionParser } from "./expression-parser";
import type { Span } from "./span";
import type { StatementForm, Word } from "./syntax";
import { quote } from "./token";

/** Reads what brings parts in: the head of a block, and `use`. */
export class BlockParser {
  constructor(
    private readonly cursor: Cursor,
    private readonly expressions: ExpressionParser,
  ) {}

  /** `block NAME(net, …) {`, after the word `block`; the statements inside follow as statements of their own. */
  head(span: Span): StatementForm {
    const { cursor } = this;
    const name = cursor.wantWord("A name after `block`");
    cursor.tight.add(name.from);
    const ports: Word[] = [];
    if (cursor.wantSymbol("(", "the name of the block; its nets stand in brackets")) {
      while (!cursor.isSymbol(")") && !cursor.atEnd) {
        ports.push(cursor.wantWord("The name of a net"));
        if (!cursor.acceptSymbol(",")) break;
      }
      cursor.wantSymbol(")", "the nets of the block");
      cursor.wantSymbol("{", "the nets of the block");
    }
    return { kind: "block", name, ports, statements: [], headTo: cursor.behind, isClosed: true, ...span };
  }

  /** `use "NAME" [revision N]`, after the word `use`. */
  use(span: Span): StatementForm {
    const { cursor } = this;
    if (cursor.token.kind !== "string") {
      cursor.failHere("FRM2", 'A name in quotation marks such as `"matched-arrays"` is wanted after `use`');
      return { kind: "broken", declares: null, ...span };
    }
    const { text, from, to } = cursor.take();
    const shelf = { text: text.slice(1, -1), from, to };
    const revision = cursor.acceptWord("revision") ? this.expressions.sum() : null;
    if (!cursor.atEnd && revision === null) {
      cursor.failHere("FRM2", `${quote("revision")} and its number, or nothing more, is wanted here`);
    }
    return { kind: "use", shelf, revision, ...span };
  }
}
