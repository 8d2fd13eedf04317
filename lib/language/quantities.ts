import { type Dimension, PURE, sameDimension } from "@/lib/units/dimension";
import type { Agreement } from "./agreement";
import type { Tolerance, Typed } from "./ast";
import type { Nominal } from "./nominal";
import type { Report } from "./report";
import type { Expression, ToleranceSyntax } from "./syntax";
import { quote } from "./token";
import type { Judged, Typing } from "./typing";
import { describeDimension, mistakenUnit, spellableUnit } from "./unit-check";

/** What a place wants of its value: its dimension, the unit to propose, and its name in a message ("The resistance of R1"). */
export interface Want {
  readonly dimension: Dimension;
  readonly unit: string;
  readonly what: string;
}

/** Checks values against what their place wants: units, fixed values, tolerances. */
export class Quantities {
  constructor(
    private readonly typing: Typing,
    private readonly agreement: Agreement,
    private readonly nominal: Nominal,
    private readonly report: Report,
  ) {}

  /** The value where it has the wanted dimension, else null and a diagnostic. */
  fitting(expression: Expression, want: Want, signals = false): Typed | null {
    const judged = this.typing.judge(expression, {
      signals,
      wanted: want.unit === "1" ? null : want.unit,
    });
    if (judged === null) return null;
    if (sameDimension(judged.typed.dimension, want.dimension)) return judged.typed;
    this.reportMisfit(expression, judged.typed, want);
    return null;
  }

  /** The number of a fitting value that no knob moves, in coherent SI units; null and a diagnostic otherwise. */
  fixed(expression: Expression, want: Want): number | null {
    const typed = this.fitting(expression, want);
    return typed === null ? null : this.fixedNumber(typed, expression, want.what);
  }

  /** The number of a value that no knob moves. */
  fixedNumber(typed: Typed, expression: Expression, what: string): number | null {
    const mover = this.nominal.mover(typed);
    if (mover !== null) {
      const message = `${what} must be fixed, but ${this.agreement.text(expression)} moves with ${quote(mover)}; use numbers and lets that no knob moves.`;
      this.report.error("NAM11", expression, message);
      return null;
    }
    const value = this.nominal.of(typed);
    return this.finite(value, expression) ? value : null;
  }

  finite(value: number, expression: Expression): boolean {
    if (Number.isFinite(value)) return true;
    this.report.error(
      "UNI9",
      expression,
      `${this.agreement.text(expression)} works out to no finite number.`,
    );
    return false;
  }

  /** A difference of temperature may not be written as a point on the scale: `± 5 °C` proposes `± 5 K`. */
  isDifference(expression: Expression, judged: Judged): boolean {
    if (!judged.point) return true;
    const text = expression.kind === "number" ? `${expression.value} K` : null;
    const message = `${this.agreement.text(expression)} is a point on the temperature scale where a difference is wanted; write ${text === null ? "it in K" : quote(text)}.`;
    const fix =
      text === null
        ? undefined
        : { title: `Change to ${text}`, from: expression.from, to: expression.to, text };
    this.report.error("UNI6", expression, message, fix);
    return false;
  }

  /** A checked tolerance of `value`; null where there is none or it cannot be used. */
  tolerance(syntax: ToleranceSyntax | null, value: Typed): Tolerance | null {
    if (syntax === null) return null;
    const amount = this.toleranceAmount(syntax.amount, value);
    if (amount === null) return null;
    if (amount.relative && amount.amount > 0 && this.nominal.of(value) === 0) {
      const message = "A relative tolerance of zero is zero; write the tolerance in the unit of the value.";
      this.report.warning("UNI10", syntax.amount, message);
    }
    const sigmas = syntax.sigmas ?? 1;
    if (!(sigmas > 0)) {
      this.report.error("UNI10", syntax, "The number of sigmas must be above 0, as in `normal 3 sigma`.");
      return null;
    }
    const base = { ...amount, law: syntax.law, sigmas };
    if (syntax.track === null) return { ...base, track: null };
    const { group, within } = syntax.track;
    if (within === null) return { ...base, track: { group: group.text, within: 0, relative: true } };
    const own = this.toleranceAmount(within, value);
    if (own === null) return null;
    return { ...base, track: { group: group.text, within: own.amount, relative: own.relative } };
  }

  private toleranceAmount(
    expression: Expression,
    value: Typed,
  ): { amount: number; relative: boolean } | null {
    const unit = spellableUnit(value.dimension);
    const judged = this.typing.judge(expression, { signals: false, wanted: unit });
    if (judged === null || !this.isDifference(expression, judged)) return null;
    const pure = sameDimension(judged.typed.dimension, PURE);
    if (!pure && !sameDimension(judged.typed.dimension, value.dimension)) {
      const message = `The tolerance is ${describeDimension(judged.typed.dimension)} but its value is ${describeDimension(value.dimension)}; give it in the same unit or in %.`;
      this.report.error("UNI3", expression, message);
      return null;
    }
    const relative = pure && (!sameDimension(value.dimension, PURE) || isShare(expression));
    if (relative && expression.kind === "number" && expression.unit === null) {
      const text = `${expression.value} ${unit ?? "%"}`;
      const message = `A tolerance wants a unit; write ${quote(text)}${unit === null ? "" : ` or ${quote(`${expression.value} %`)}`}.`;
      const fix = { title: `Write ${text}`, from: expression.from, to: expression.to, text };
      this.report.error("UNI10", expression, message, fix);
      return null;
    }
    const amount = this.fixedNumber(judged.typed, expression, "A tolerance");
    if (amount === null) return null;
    if (amount < 0) {
      this.report.error("UNI10", expression, "A tolerance cannot be negative; it reaches to both sides.");
      return null;
    }
    return { amount, relative };
  }

  /** `over 4,7 kΩ`: in a list the 4 is read as a value of its own, and lacks its unit. */
  private hasDecimalComma(expression: Expression): boolean {
    if (expression.kind !== "number" || expression.unit !== null) return false;
    const { from, to } = expression;
    const behind = /^,(\d+)/u.exec(this.agreement.source({ from: to, to: to + 20 }));
    if (behind === null || !Number.isInteger(expression.value)) return false;
    const text = `${expression.value}.${behind[1]}`;
    const span = { from, to: to + behind[0].length };
    const message = `A number has a decimal point, not a comma; write ${quote(text)}, or give each value of the list its unit.`;
    this.report.error("TXT4", span, message, { title: `Write ${text}`, ...span, text });
    return true;
  }

  private reportMisfit(expression: Expression, typed: Typed, want: Want): void {
    const wanted = sameDimension(want.dimension, PURE) ? "a pure number" : `in ${want.unit}`;
    if (this.hasDecimalComma(expression)) return;
    const message = `${want.what} is ${wanted}, but ${this.agreement.text(expression)} is ${describeDimension(typed.dimension)}`;
    const isNegative = expression.kind === "unary" && expression.operator === "-";
    const number = isNegative ? expression.operand : expression;
    const unit =
      number.kind !== "number" || sameDimension(want.dimension, PURE)
        ? null
        : number.unit === null
          ? want.unit
          : mistakenUnit(number.unit.text, want.dimension);
    if (unit === null || number.kind !== "number") {
      this.report.error("UNI3", expression, `${message}; ${mending(expression, want)}.`);
      return;
    }
    const text = `${isNegative ? "-" : ""}${number.value} ${unit}`;
    const fix = { title: `Write ${text}`, from: expression.from, to: expression.to, text };
    this.report.error("UNI3", expression, `${message}; write ${quote(text)}.`, fix);
  }
}

/** How a value of a wrong unit is mended where no one unit was surely meant. */
function mending(expression: Expression, want: Want): string {
  const isLiteral = expression.kind === "number";
  if (!sameDimension(want.dimension, PURE))
    return `give ${isLiteral ? "a value" : "an expression"} in ${want.unit}`;
  return isLiteral ? "leave its unit out" : "divide it by a quantity of its unit";
}

/** Written with % or ppm: a share of the value even where the value is itself a pure number. */
function isShare(expression: Expression): boolean {
  return expression.kind === "number" && (expression.unit?.text === "%" || expression.unit?.text === "ppm");
}
