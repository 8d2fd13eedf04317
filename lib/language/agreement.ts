import { type Dimension, PURE, sameDimension } from "@/lib/units/dimension";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Expression } from "./syntax";
import { quote } from "./token";
import { describeDimension, spellableUnit } from "./unit-check";

/** Judges whether values go together, and says so with the text at hand. */
export class Agreement {
  constructor(
    private readonly whole: string,
    private readonly report: Report,
  ) {}

  /** The text of a span as it is written. */
  source(span: Span): string {
    return this.whole.slice(span.from, span.to);
  }

  /** The text of a span as a message shows it. */
  text(span: Span): string {
    return quote(this.whole.slice(span.from, Math.min(span.to, span.from + 80)).replace(/\s+/gu, " "));
  }

  /** Two values that must have the same dimension; where one lacks its unit, the proposal gives it the other's. */
  alike(left: Expression, a: Dimension, right: Expression, b: Dimension, verb: string): boolean {
    if (sameDimension(a, b)) return true;
    const message = `${this.text(left)} is ${describeDimension(a)} but ${this.text(right)} is ${describeDimension(b)}, so they cannot be ${verb}`;
    const [bare, unit] = isBare(left)
      ? [left, spellableUnit(b)]
      : isBare(right)
        ? [right, spellableUnit(a)]
        : [null, null];
    const span = { from: left.from, to: right.to };
    if (bare === null || unit === null) {
      this.report.error("UNI4", span, `${message}.`);
      return false;
    }
    const text = `${this.source(bare)} ${unit}`;
    const fix = { title: `Write ${text}`, from: bare.from, to: bare.to, text };
    this.report.error("UNI4", span, `${message}; write ${quote(text)}.`, fix);
    return false;
  }

  /** A pure number is wanted; where the value has a unit the proposal divides by it. */
  pure(expression: Expression, dimension: Dimension, what: string, inBrackets = false): boolean {
    if (sameDimension(dimension, PURE)) return true;
    const message = `${what} wants a pure number, but ${this.text(expression)} is ${describeDimension(dimension)}`;
    const unit = spellableUnit(dimension);
    if (unit === null || expression.to - expression.from > 200) {
      this.report.error("UNI5", expression, `${message}; divide it by a quantity of the same unit.`);
      return false;
    }
    const source = this.source(expression);
    const simple = expression.kind !== "binary" && expression.kind !== "unary";
    const quotient = `${simple ? source : `(${source})`} / 1 ${unit}`;
    const text = inBrackets ? `(${quotient})` : quotient;
    const fix = { title: `Divide by 1 ${unit}`, from: expression.from, to: expression.to, text };
    this.report.error("UNI5", expression, `${message}; write ${quote(text)}.`, fix);
    return false;
  }
}

function isBare(expression: Expression): boolean {
  return expression.kind === "number" && expression.unit === null;
}
