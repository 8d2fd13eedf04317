import type { Cursor } from "./cursor";
import { MOST_DEPTH } from "./limits";
import type { Span } from "./span";
import type { BinaryOperator, Binding, Expression, UnaryOperator, Word } from "./syntax";
import { PRECEDENCE, quote, type Token } from "./token";

const COMPARISON = 1;
const ADDITION = 2;
const POWER = 4;

/**
 * Reads expressions by climbing precedences. Neither its own recursion nor the height of the tree it makes goes beyond
 * MOST_DEPTH, so that every later phase may recurse over the tree.
 */
export class ExpressionParser {
  private depth = 0;
  /** Height of the tree made last. */
  private height = 0;
  /** Whether commas part values here, so that `4,7` may be two of them. */
  private listed = false;

  constructor(private readonly cursor: Cursor) {}

  /** Any expression, comparisons included. */
  expression(): Expression {
    return this.binary(COMPARISON);
  }

  /** Reads what stands between commas. */
  among<T>(parse: () => T): T {
    const outside = this.listed;
    this.listed = true;
    const result = parse();
    this.listed = outside;
    return result;
  }

  /** An expression without a comparison, as in a tolerance. */
  sum(): Expression {
    return this.binary(ADDITION);
  }

  private binary(lowest: number): Expression {
    let left = this.unary();
    let height = this.height;
    for (;;) {
      const operator = this.cursor.token;
      const precedence = operator.kind === "symbol" ? PRECEDENCE.get(operator.text) : undefined;
      if (precedence === undefined || precedence < lowest || precedence === POWER) break;
      if (precedence === COMPARISON && isComparison(left)) {
        this.cursor.fail("FRM8", operator, "Comparisons do not chain; compare two values only.");
        break;
      }
      this.cursor.take();
      const right = this.binary(precedence + 1);
      height = Math.max(height, this.height) + 1;
      if (this.tooDeep(height, operator)) break;
      left = this.join(operator.text as BinaryOperator, left, right);
    }
    this.height = height;
    return left;
  }

  private unary(): Expression {
    const operator = this.cursor.token;
    if (!this.cursor.isSymbol("-") && !this.cursor.isSymbol("+")) return this.power();
    this.cursor.tight.add(operator.from);
    this.cursor.take();
    const operand = this.nested(() => this.unary());
    return {
      kind: "unary",
      operator: operator.text as UnaryOperator,
      operand,
      from: operator.from,
      to: operand.to,
    };
  }

  private power(): Expression {
    const literal = this.cursor.token.kind === "number";
    const base = this.primary();
    const height = this.height;
    if (!this.cursor.isSymbol("^")) return base;
    if (literal && base.kind === "number" && base.unit !== null) this.ambiguous(base);
    this.cursor.take();
    const exponent = this.nested(() => this.unary());
    this.height = Math.max(height + 1, this.height);
    return this.join("^", base, exponent);
  }

  /** `2 V^2` is 4 V² to one reader and 2 V² to another. */
  private ambiguous(base: Extract<Expression, { kind: "number" }>): void {
    const text = `(${base.value} ${base.unit!.text})`;
    const message = `The power of ${quote(text.slice(1, -1))} can be read in two ways; write ${quote(`${text}^…`)}.`;
    this.cursor.note("UNI7", base, message, { title: `Write ${text}`, from: base.from, to: base.to, text });
  }

  private primary(): Expression {
    const { cursor } = this;
    const token = cursor.token;
    this.height = 1;
    if (token.kind === "number") {
      cursor.take();
      if (!this.listed) this.decimalComma(token);
      const unit = cursor.token.kind === "unit" ? cursor.takeWord() : null;
      return { kind: "number", value: Number(token.text), unit, from: token.from, to: cursor.behind };
    }
    if (token.kind === "word") return cursor.isSymbol("(", 1) ? this.call() : this.name();
    if (cursor.acceptSymbol("(")) {
      const inner = this.nested(() => this.expression());
      if (cursor.isSymbol(")")) cursor.take();
      else this.unclosed(token.from);
      return { ...inner, from: token.from, to: cursor.behind };
    }
    cursor.failHere("FRM3", "A value is wanted here");
    return { kind: "hole", from: token.from, to: token.from };
  }

  /** `4,7` where no list can stand: the point was meant. */
  private decimalComma(whole: Token): void {
    const { cursor } = this;
    const [comma, rest] = [cursor.token, cursor.peek(1)];
    if (comma.text !== "," || rest.kind !== "number" || !/^\d+$/u.test(`${whole.text}${rest.text}`)) return;
    if (comma.from !== whole.to || rest.from !== comma.to) return;
    const unit = cursor.peek(2).kind === "unit" ? cursor.peek(2) : null;
    const text = `${whole.text}.${rest.text}${unit === null ? "" : ` ${unit.text}`}`;
    const span = { from: whole.from, to: (unit ?? rest).to };
    const message = `A number has a decimal point, not a comma; write ${quote(text)}.`;
    cursor.note("TXT4", span, message, { title: `Write ${text}`, ...span, text });
    cursor.take();
    cursor.take();
  }

  private name(): Expression {
    const { cursor } = this;
    const path: Word[] = [cursor.takeWord()];
    while (cursor.acceptSymbol(".")) path.push(cursor.wantWord("The name of a pin or of v, i or p"));
    return { kind: "name", path, from: path[0]!.from, to: cursor.behind };
  }

  private call(): Expression {
    const { cursor } = this;
    const callee = cursor.takeWord();
    cursor.tight.add(callee.from);
    cursor.take();
    const args: Expression[] = [];
    const bindings: Binding[] = [];
    let height = 0;
    while (!cursor.isSymbol(")") && !cursor.atEnd) {
      const name = cursor.token.kind === "word" && cursor.isSymbol("=", 1) ? cursor.takeWord() : null;
      if (name !== null) cursor.take();
      const value = this.among(() => this.nested(() => this.expression()));
      if (name === null) args.push(value);
      else bindings.push({ name, value, from: name.from, to: value.to });
      height = Math.max(height, this.height);
      if (!cursor.acceptSymbol(",")) break;
    }
    this.height = height + 1;
    if (!cursor.isSymbol(")")) {
      this.unclosed(callee.from);
      return { kind: "hole", from: callee.from, to: cursor.behind };
    }
    cursor.take();
    return { kind: "call", callee, args, bindings, from: callee.from, to: cursor.behind };
  }

  private unclosed(from: number): void {
    const { cursor } = this;
    const to = cursor.behind;
    if (cursor.atEnd) {
      const fix = { title: "Close it with )", from: to, to, text: ")" };
      cursor.fail("FRM5", { from, to: from + 1 }, "This bracket is not closed; put a `)` at its end.", fix);
    } else {
      cursor.failHere("FRM2", "An operator, `,` or `)` is wanted here");
    }
  }

  private join(operator: BinaryOperator, left: Expression, right: Expression): Expression {
    return { kind: "binary", operator, left, right, from: left.from, to: right.to };
  }

  /** One level deeper, unless that is too deep. */
  private nested(parse: () => Expression): Expression {
    this.depth += 1;
    const here = this.cursor.token.from;
    const result: Expression = this.tooDeep(this.depth, this.cursor.token)
      ? { kind: "hole", from: here, to: here }
      : parse();
    this.depth -= 1;
    this.height += 1;
    return result;
  }

  private tooDeep(depth: number, at: Span): boolean {
    if (depth <= MOST_DEPTH) return false;
    const message = `This expression is nested or chained more than ${MOST_DEPTH} deep; name parts of it with ${quote("let")}.`;
    this.cursor.fail("CAP2", at, message);
    return true;
  }
}

function isComparison(expression: Expression): boolean {
  return expression.kind === "binary" && PRECEDENCE.get(expression.operator) === COMPARISON;
}
