import { type Dimension, divide, multiply, PURE, power, sameDimension } from "@/lib/units/dimension";
import { toCoherent } from "@/lib/units/unit";
import type { Agreement } from "./agreement";
import type { ReductionName, Typed } from "./ast";
import { reportCount, reportUnknownFunction } from "./call-problems";
import type { Code } from "./catalogue";
import { constantNamed } from "./constant-names";
import { FUNCTIONS, isFunctionName } from "./functions";
import { type Meaning, Names, ownName } from "./names";
import { isReductionName } from "./reductions";
import type { Report } from "./report";
import { currentInto, type PinsOf, resolveSignal } from "./signals";
import type { Span } from "./span";
import type { Expression, Word } from "./syntax";
import { quote } from "./token";
import { describeDimension, unitOfLiteral } from "./unit-check";

/** A checked expression; `point` says that it is a temperature on the scale, not a difference, as `25 °C` is. */
export interface Judged {
  readonly typed: Typed;
  readonly point: boolean;
}

/** Where an expression stands: may it use signals, and in which unit is it wanted (for proposals only). */
export interface Place {
  readonly signals: boolean;
  readonly wanted: string | null;
  /** Within a reading or requirement: what traces, readings and reductions mean. */
  readonly contract?: ContractPlace;
}

export interface ContractPlace {
  /** A trace or reading; null where it cannot be used, undefined where the name is neither. */
  named(word: Word): Judged | null | undefined;
  /** What a signal becomes. */
  kept(signal: Typed, span: Span): Typed;
  reduce(call: Extract<Expression, { kind: "call" }>, reduction: ReductionName): Judged | null;
}

/** What a knob or let is known to be. */
export interface Known {
  readonly dimension: Dimension;
  readonly point: boolean;
}

/** Resolves names and checks units. Each mistake is reported once: what contains it is null and stays quiet. */
export class Typing {
  constructor(
    private readonly agreement: Agreement,
    private readonly names: Names,
    private readonly report: Report,
    /** Knobs and lets understood so far; what is missing was reported, and its uses stay quiet. */
    private readonly known: ReadonlyMap<string, Known>,
    private readonly pinsOf: PinsOf,
  ) {}

  judge(expression: Expression, place: Place): Judged | null {
    switch (expression.kind) {
      case "number":
        return this.number(expression, place);
      case "name":
        return this.path(expression, place);
      case "unary":
        return this.unary(expression, place);
      case "binary":
        return this.binary(expression, place);
      case "call":
        return this.call(expression, place);
      case "hole":
        return null;
    }
  }

  private number(literal: Extract<Expression, { kind: "number" }>, place: Place): Judged | null {
    if (!Number.isFinite(literal.value)) return null;
    if (literal.unit === null) return constant(literal.value, PURE);
    const unit = unitOfLiteral(literal, place.wanted, this.names, this.report);
    if (unit === null) return null;
    const point = unit.scale === "celsius";
    return {
      typed: { op: "constant", value: toCoherent(literal.value, unit), dimension: unit.dimension },
      point,
    };
  }

  private path(expression: Extract<Expression, { kind: "name" }>, place: Place): Judged | null {
    const behind = this.names.pinsBehind(expression.path);
    if (behind !== null && place.signals)
      return plain(currentInto(behind, (signal) => place.contract?.kept(signal, expression) ?? signal));
    const path = this.names.settle(expression.path);
    if (path.length === 1) return this.name(path[0]!, place);
    const settled = { ...expression, path };
    const signal = resolveSignal(settled, place.signals, this.names, this.pinsOf, this.report);
    return plain(signal === null ? null : (place.contract?.kept(signal, expression) ?? signal));
  }

  private name(word: Word, place: Place): Judged | null {
    const known = constantNamed(word.text);
    if (known !== null) return plain(known);
    const named = place.contract?.named(word);
    if (named !== undefined) return named;
    const meaning = this.names.meaningOf(word.text);
    if (meaning === "knob" || meaning === "let") {
      const value = this.known.get(word.text);
      if (value === undefined) return null;
      return { typed: { op: meaning, name: word.text, dimension: value.dimension }, point: value.point };
    }
    if (meaning === null)
      this.names.unknown(word, place.signals ? ["knob", "let", "net", "element"] : ["knob", "let"]);
    else if (meaning !== "unread") this.misused(word, meaning, place);
    return null;
  }

  private misused(word: Word, meaning: Exclude<Meaning, "knob" | "let" | "unread">, place: Place): void {
    const own = ownName(word);
    const what = `${quote(own)} is ${Names.describe(meaning)} and has no value of its own`;
    if ((meaning !== "net" && meaning !== "element") || !place.signals) {
      this.report.error("NAM4", word, `${what}; a knob, a let or a number is wanted here.`);
      return;
    }
    const text = `${own}.${meaning === "net" ? "v" : "i"}`;
    const proposal = meaning === "net" ? `its voltage is ${quote(text)}` : `its current is ${quote(text)}`;
    const fix = { title: `Change to ${text}`, from: word.from, to: word.to, text };
    this.report.error("NAM4", word, `${what}; ${proposal}.`, fix);
  }

  private unary(expression: Extract<Expression, { kind: "unary" }>, place: Place): Judged | null {
    const { operand } = expression;
    const minus = expression.operator === "-";
    // A minus sign written at a Celsius literal belongs to the number: −40 °C is 233.15 K.
    if (minus && operand.kind === "number" && operand.unit?.text === "°C") {
      return this.number({ ...operand, value: -operand.value }, place);
    }
    const inner = this.judge(operand, place);
    if (inner === null || !minus) return inner;
    if (inner.typed.op === "constant") return constant(-inner.typed.value, inner.typed.dimension);
    return plain({ op: "negate", operand: inner.typed, dimension: inner.typed.dimension });
  }

  private binary(expression: Extract<Expression, { kind: "binary" }>, place: Place): Judged | null {
    const { operator } = expression;
    if (operator === "<=" || operator === ">=" || operator === "<" || operator === ">") {
      const message = "A comparison is no value; it can stand first in `if(…, a, b)` only.";
      this.report.error("FRM8", expression, message);
      return null;
    }
    const inner = operator === "+" || operator === "-" ? place : { ...place, wanted: null };
    const left = this.judge(expression.left, inner);
    const right = this.judge(expression.right, inner);
    if (left === null || right === null) return null;
    const a = left.typed.dimension;
    const b = right.typed.dimension;
    const make = (dimension: Dimension, point = false): Judged => ({
      typed: { op: operator, left: left.typed, right: right.typed, dimension },
      point,
    });
    switch (operator) {
      case "*":
        return make(multiply(a, b));
      case "/":
        return make(divide(a, b));
      case "^":
        return this.power(expression, left, right, make);
      default:
        if (
          !this.agreement.alike(
            expression.left,
            a,
            expression.right,
            b,
            operator === "+" ? "added" : "subtracted",
          )
        )
          return null;
        if (operator === "+" && left.point && right.point) {
          const message = `${this.agreement.text(expression.left)} and ${this.agreement.text(expression.right)} are both points on the temperature scale and cannot be added; write the difference in K.`;
          this.report.error("UNI6", expression, message);
          return null;
        }
        return make(a, operator === "+" ? left.point || right.point : left.point && !right.point);
    }
  }

  private power(
    expression: Extract<Expression, { kind: "binary" }>,
    base: Judged,
    exponent: Judged,
    make: (dimension: Dimension) => Judged,
  ): Judged | null {
    if (!this.agreement.pure(expression.right, exponent.typed.dimension, "An exponent", true)) return null;
    if (sameDimension(base.typed.dimension, PURE)) return make(PURE);
    if (exponent.typed.op === "constant") return make(power(base.typed.dimension, exponent.typed.value));
    const message = `${this.agreement.text(expression.left)} is ${describeDimension(base.typed.dimension)}, so its exponent must be a plain number.`;
    this.report.error("UNI5", expression.right, message);
    return null;
  }

  private call(expression: Extract<Expression, { kind: "call" }>, place: Place): Judged | null {
    const { callee, args } = expression;
    if (isReductionName(callee.text)) {
      if (place.contract !== undefined) return place.contract.reduce(expression, callee.text);
      const message = `${quote(callee.text)} goes along a whole sweep; it can stand in ${quote("read")} and ${quote("require")} only.`;
      this.report.error("CON10", callee, message);
      return null;
    }
    if (!isFunctionName(callee.text)) {
      reportUnknownFunction(expression, this.report);
      return null;
    }
    const shape = FUNCTIONS[callee.text];
    if (args.length < shape.least || args.length > shape.most) {
      reportCount(expression, shape, place.contract !== undefined, this.report);
      return null;
    }
    const inner = { ...place, wanted: shape.rule === "keep" ? place.wanted : null };
    const judged = args.map((arg, i) =>
      shape.rule === "choose" && i === 0 ? this.condition(arg, inner) : this.judge(arg, inner),
    );
    if (!judged.every((one) => one !== null)) return null;
    const dimension = this.callDimension(expression, shape.rule, judged);
    if (dimension === null) return null;
    return plain({ op: "call", callee: callee.text, args: judged.map((one) => one.typed), dimension });
  }

  private callDimension(
    { callee, args }: Extract<Expression, { kind: "call" }>,
    rule: "pure" | "root" | "keep" | "choose",
    judged: readonly Judged[],
  ): Dimension | null {
    if (rule === "root") return power(judged[0]!.typed.dimension, 0.5);
    if (rule === "pure")
      return this.agreement.pure(args[0]!, judged[0]!.typed.dimension, quote(callee.text)) ? PURE : null;
    const first = rule === "choose" ? 1 : 0;
    const dimension = judged[first]!.typed.dimension;
    const alike = args.every(
      (arg, i) =>
        i <= first ||
        this.agreement.alike(args[first]!, dimension, arg, judged[i]!.typed.dimension, "chosen between"),
    );
    return alike ? dimension : null;
  }

  /** The first value of `if`. */
  private condition(expression: Expression, place: Place): Judged | null {
    const message = "`if` wants a comparison first, such as `if(out.v > 0 V, a, b)`.";
    return this.comparison(expression, place, "FRM8", message);
  }

  /** Two values compared; `code` and `message` answer anything else. */
  comparison(expression: Expression, place: Place, code: Code, message: string): Judged | null {
    if (expression.kind !== "binary" || !["<=", ">=", "<", ">"].includes(expression.operator)) {
      if (expression.kind !== "hole") this.report.error(code, expression, message);
      return null;
    }
    const left = this.judge(expression.left, place);
    const right = this.judge(expression.right, place);
    if (left === null || right === null) return null;
    const [a, b] = [left.typed, right.typed];
    if (!this.agreement.alike(expression.left, a.dimension, expression.right, b.dimension, "compared"))
      return null;
    return plain({
      op: expression.operator as "<=" | ">=" | "<" | ">",
      left: a,
      right: b,
      dimension: PURE,
    });
  }
}

function constant(value: number, dimension: Dimension): Judged {
  return { typed: { op: "constant", value, dimension }, point: false };
}

function plain(typed: Typed | null): Judged | null {
  return typed === null ? null : { typed, point: false };
}
