import { KELVIN, PURE, sameDimension } from "@/lib/units/dimension";
import { log10 } from "@/lib/units/elementary";
import { unitOf } from "@/lib/units/quantity";
import type { Agreement } from "./agreement";
import type { Knob, Sweep } from "./ast";
import type { Flat } from "./expand";
import { count, MOST_POINTS } from "./limits";
import { spellQuantity } from "./literal";
import { Names } from "./names";
import type { Quantities, Want } from "./quantities";
import type { Report } from "./report";
import { countOf, decades, evenly, stepwise } from "./spacing";
import type { Expression, Statement, SweepRange } from "./syntax";
import { quote } from "./token";
import type { Known, Typing } from "./typing";

type SweepStatement = Extract<Statement, { kind: "sweep" }>;

/** Checks sweeps and works their values out. */
export class SweepCheck {
  private readonly ranges: ReadonlyMap<string, Knob["range"]>;
  /** Product of the lengths of the sweeps so far. */
  private points = 1;

  constructor(
    private readonly names: Names,
    private readonly typing: Typing,
    private readonly agreement: Agreement,
    private readonly quantities: Quantities,
    private readonly known: ReadonlyMap<string, Known>,
    knobs: readonly Knob[],
    private readonly report: Report,
  ) {
    this.ranges = new Map(knobs.map((knob) => [knob.name, knob.range]));
  }

  sweeps(statements: readonly Flat[]): Sweep[] {
    const sweeps: Sweep[] = [];
    const swept = new Set<string>();
    const lets = new Map(
      statements.flatMap((one) => (one.kind === "let" ? [[one.name.text, one.from] as const] : [])),
    );
    for (const statement of statements) {
      if (statement.kind !== "sweep" || !this.isKnob(statement, lets)) continue;
      const { knob } = statement;
      if (swept.has(knob.text)) {
        this.report.error(
          "PLN2",
          knob,
          `The knob ${quote(knob.text)} is swept twice; remove one of the two sweeps.`,
        );
        continue;
      }
      swept.add(knob.text);
      const sweep = this.sweep(statement);
      if (sweep === null) continue;
      this.points *= sweep.values.length;
      sweeps.push(sweep);
    }
    return sweeps;
  }

  private isKnob({ knob }: SweepStatement, lets: ReadonlyMap<string, number>): boolean {
    if (knob.text === "") return false;
    const meaning = this.names.meaningOf(knob.text);
    if (meaning === "knob") return this.known.has(knob.text);
    if (meaning === null) this.names.unknown(knob, ["knob"]);
    else if (meaning === "let") {
      const from = lets.get(knob.text)!;
      const message = `Only a knob can be swept, and ${quote(knob.text)} is a let; declare it with ${quote("knob")}.`;
      const fix = { title: "Make it a knob", from, to: from + 3, text: "knob" };
      this.report.error("PLN1", knob, message, fix);
    } else if (meaning !== "unread") {
      this.report.error(
        "PLN1",
        knob,
        `Only a knob can be swept, and ${quote(knob.text)} is ${Names.describe(meaning)}.`,
      );
    }
    return false;
  }

  private sweep(statement: SweepStatement): Sweep | null {
    const { knob, range, from, to } = statement;
    const { dimension } = this.known.get(knob.text)!;
    const unit = sameDimension(dimension, KELVIN)
      ? this.known.get(knob.text)!.point
        ? "°C"
        : "K"
      : unitOf(dimension);
    const want = { dimension, unit, what: `The knob ${quote(knob.text)}` };
    const values =
      range.kind === "list" ? this.list(statement, range.values, want) : this.range(statement, range, want);
    if (values === null) return null;
    const scale = range.kind === "list" ? "list" : range.spacing === "per decade" ? "logarithmic" : "linear";
    return { knob: knob.text, dimension, scale, values, from, to };
  }

  private list(statement: SweepStatement, expressions: readonly Expression[], want: Want): number[] | null {
    const values = expressions.map((expression) => this.quantities.fixed(expression, want));
    if (!values.every((value) => value !== null) || values.length === 0) return null;
    return this.allowed(statement, values) && this.bounded(statement, values.length) ? values : null;
  }

  private range(
    statement: SweepStatement,
    range: Extract<SweepRange, { kind: "range" }>,
    want: Want,
  ): number[] | null {
    const start = this.quantities.fixed(range.start, want);
    const stop = this.quantities.fixed(range.stop, want);
    const amount =
      range.spacing === "step" ? this.step(range.amount, want) : this.whole(range.amount, range.spacing);
    if (start === null || stop === null || amount === null) return null;
    if (!this.allowed(statement, [start, stop])) return null;
    const span = { from: range.start.from, to: range.stop.to };
    if (start === stop) {
      this.report.error(
        "PLN5",
        span,
        "The sweep ends where it begins; give it two different ends, or one value with `over`.",
      );
      return null;
    }
    if (range.spacing === "per decade") {
      if (!(start * stop > 0)) {
        const message =
          "A sweep per decade cannot reach or cross zero; give both ends one sign, or use `points`.";
        this.report.error("PLN3", span, message);
        return null;
      }
      const points = countOf(Math.abs(log10(stop / start)) * amount);
      return this.bounded(statement, points) ? decades(start, stop, amount) : null;
    }
    if (range.spacing === "points") {
      if (amount < 2) {
        this.report.error("PLN4", range.amount, "A sweep has at least 2 points, its two ends.");
        return null;
      }
      return this.bounded(statement, amount) ? evenly(start, stop, amount) : null;
    }
    if (amount === 0 || amount > 0 !== stop > start) {
      const what =
        amount === 0 ? "A step of zero never arrives" : "This step leads away from the end of the sweep";
      this.report.error("PLN5", range.amount, `${what}; give a step towards the end.`);
      return null;
    }
    return this.bounded(statement, countOf((stop - start) / amount)) ? stepwise(start, stop, amount) : null;
  }

  private step(expression: Expression, want: Want): number | null {
    const unit = want.unit === "°C" ? "K" : want.unit;
    const judged = this.typing.judge(expression, { signals: false, wanted: unit === "1" ? null : unit });
    if (judged === null || !this.quantities.isDifference(expression, judged)) return null;
    return this.quantities.fixed(expression, { ...want, unit, what: "The step" });
  }

  private whole(expression: Expression, spacing: string): number | null {
    const what = spacing === "points" ? "The number of points" : "The number of points per decade";
    const value = this.quantities.fixed(expression, { dimension: PURE, unit: "1", what });
    if (value === null) return null;
    if (Number.isInteger(value) && value > 0) return value;
    this.report.error(
      "PLN4",
      expression,
      `${what} must be a whole number above 0, not ${this.agreement.text(expression)}.`,
    );
    return null;
  }

  /** Asked before the values are worked out, so that a refused sweep costs nothing. */
  private bounded(statement: SweepStatement, own: number): boolean {
    const points = own * this.points;
    if (points <= MOST_POINTS) return true;
    const what = own > MOST_POINTS ? "This sweep has" : "With this sweep the plan has";
    this.tooMany(statement, own > MOST_POINTS ? own : points, what);
    return false;
  }

  private tooMany(statement: SweepStatement, points: number, what: string): void {
    const many = Number.isFinite(points) && points < 1e15 ? count(points) : "too many";
    const message = `${what} ${many} points, and a plan can have ${count(MOST_POINTS)} at most; space them wider.`;
    this.report.error("CAP4", statement, message);
  }

  /** The knob's own range, and the absolute zero of temperature. */
  private allowed(statement: SweepStatement, values: readonly number[]): boolean {
    const name = statement.knob.text;
    let low = Number.POSITIVE_INFINITY;
    let high = Number.NEGATIVE_INFINITY;
    for (const value of values) {
      low = Math.min(low, value);
      high = Math.max(high, value);
    }
    const span = { from: statement.knob.to + 1, to: statement.to };
    if (name === "temperature" && low <= 0) {
      this.report.error("PLN6", span, "The temperature must stay above 0 K (−273.15 °C).");
      return false;
    }
    const range = this.ranges.get(name);
    if (!range || (low >= range.low && high <= range.high)) return true;
    const unit = unitOf(this.known.get(name)!.dimension);
    const bounds = `${spellQuantity(range.low, unit)} .. ${spellQuantity(range.high, unit)}`;
    const message = `The sweep leaves the range of the knob ${quote(name)}, ${bounds}; narrow the sweep or widen the range.`;
    this.report.error("PLN6", span, message);
    return false;
  }
}
