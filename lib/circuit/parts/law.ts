import { UNIT } from "@/lib/devices/rounding";
import type { Element } from "@/lib/language/ast";
import { LawExpression } from "../law-expression";
import { type Bench, type Gap, type JunctionPart, netAt, type Proof } from "../part";
import { across, flow, type State } from "../state";
import type { PointValues } from "../values";

/** Values of all signals that are tried in turn where a law has no value with all of them at 0, as a logarithm has none. */
const STARTS = [0, 1e-3, 1, -1e-3, -1];
/** A step may change a law's value this many times as much as its slopes say, */
const GROWTH = 4;
/** or this many times as much as the value itself, or by as much as these: V, A. */
const RISE = 10;
const FREE_VOLTS = 1;
const FREE_AMPERES = 1e-6;
/** Steps within this part of the signals are not weighed. */
const SMALL = 1e-3;
const MOST_HALVINGS = 60;
/** Roundings of its terms that the acceptance test must let pass, as a part of what it compares: 10 · 1e-16 of 1e-10. */
const ROUNDED = 1e-5;

/**
 * An element whose voltage, or whose current from plus to minus, is an expression of signals. It is linearised at values of the
 * signals of its own, which stay where the expression has a value and does not run away.
 */
export class LawPart implements JunctionPart, Proof {
  readonly proof: Proof = this;
  readonly gaps: readonly Gap[];
  readonly element: Element;
  readonly movers: ReadonlySet<string>;
  private readonly expression: LawExpression;
  private readonly plus: number;
  private readonly minus: number;
  /** Number of the current of a law of volts and of its mismatch; −1 for a law of amperes. */
  private readonly branch: number;
  private readonly free: number;
  private readonly constantPlaces: readonly number[];
  /** For each signal: where its slope enters, first with + and then with −. */
  private readonly gains: readonly (readonly number[])[];
  private readonly losses: readonly (readonly number[])[];
  /** The signals at which it is linearised, its value and slopes there. */
  private readonly y: Float64Array;
  private readonly slopes: Float64Array;
  private value = 0;
  private readonly target: Float64Array;
  private readonly trial: Float64Array;

  constructor(bench: Bench, elements: ReadonlyMap<string, Element>) {
    const { element, circuit, pattern, values } = bench;
    this.element = element;
    this.expression = new LawExpression(element.law!.value, circuit, elements, values);
    this.movers = this.expression.movers;
    const { plus, minus, branch } = {
      plus: netAt(bench, "plus"),
      minus: netAt(bench, "minus"),
      branch: circuit.branches.get(element.name) ?? -1,
    };
    this.plus = plus;
    this.minus = minus;
    this.branch = branch;
    this.free = branch < 0 ? FREE_AMPERES : FREE_VOLTS;
    const place = (row: number, column: number) => pattern.place(row, column);
    this.constantPlaces =
      branch < 0
        ? []
        : [place(plus, branch), place(minus, branch), place(branch, plus), place(branch, minus)];
    const { sources } = this.expression;
    // A law of amperes adds to the row of plus; one of volts takes off its own row.
    const [added, taken] = branch < 0 ? [plus, minus] : [circuit.size, branch];
    this.gaps = sources.map(({ from, less }) => [from, less]);
    const entries = sources.map(({ from, sign, less }) => {
      const [up, down] = sign > 0 ? [from, less] : [less, from];
      return {
        gains: [place(added, up), place(taken, down)],
        losses: [place(added, down), place(taken, up)],
      };
    });
    this.gains = entries.map(({ gains }) => gains);
    this.losses = entries.map(({ losses }) => losses);
    const vector = () => new Float64Array(sources.length);
    this.y = vector();
    this.slopes = vector();
    this.target = vector();
    this.trial = vector();
  }

  read(values: PointValues): void {
    this.expression.read(values);
  }

  start(): void {
    for (const start of STARTS) {
      this.y.fill(start);
      if (this.isFiniteAt(this.y)) return;
    }
    this.y.fill(0);
  }

  settle(state: State): void {
    this.expression.measure(state, this.y);
  }

  follow(state: State): boolean {
    const { expression, y, target, trial } = this;
    expression.measure(state, target);
    let change = 0;
    let isSmall = true;
    for (let k = 0; k < y.length; k++) {
      const step = target[k]! - y[k]!;
      change += this.slopes[k]! * step;
      if (!(Math.abs(step) <= SMALL * Math.abs(y[k]!))) isSmall = false;
    }
    if (isSmall) {
      y.set(target);
      return true;
    }
    const allowed = RISE * Math.abs(this.value) + this.free;
    for (let part = 1, n = 0; n < MOST_HALVINGS; part /= 2, n++) {
      for (let k = 0; k < y.length; k++) {
        trial[k] = part === 1 ? target[k]! : y[k]! + part * (target[k]! - y[k]!);
      }
      const grown = Math.abs(expression.valueAt(trial) - this.value);
      if (!(grown <= GROWTH * part * Math.abs(change) + allowed) || !this.isFiniteAt(trial)) continue;
      y.set(trial);
      return part === 1;
    }
    return false;
  }

  apart(state: State): number {
    this.expression.measure(state, this.target);
    let most = 0;
    for (let k = 0; k < this.y.length; k++) {
      const from = this.y[k]!;
      most = Math.max(most, Math.abs(this.target[k]! - from) / (Math.abs(from) + 1e-3));
    }
    return most;
  }

  private isFiniteAt(signals: Float64Array): boolean {
    if (!Number.isFinite(this.expression.valueAt(signals))) return false;
    this.expression.slopesAt(signals, this.slopes);
    return this.slopes.every(Number.isFinite);
  }

  addConstantSlopes(jacobian: Float64Array): void {
    if (this.branch < 0) return;
    const [outOfPlus, intoMinus, byPlus, byMinus] = this.constantPlaces;
    jacobian[outOfPlus!]! += 1;
    jacobian[intoMinus!]! -= 1;
    jacobian[byPlus!]! += 1;
    jacobian[byMinus!]! -= 1;
  }

  addTo(state: State): void {
    const { expression, y, slopes, target, plus, minus, branch } = this;
    const { jacobian, share } = state;
    this.value = expression.valueAt(y);
    expression.slopesAt(y, slopes);
    expression.measure(state, target);
    let value = this.value;
    let rounded = Math.abs(value);
    for (let k = 0; k < y.length; k++) {
      const slope = slopes[k]!;
      value += slope * (target[k]! - y[k]!);
      rounded += Math.abs(slope * y[k]!);
      const [up, down] = this.gains[k]!;
      const [less, more] = this.losses[k]!;
      jacobian[up!]! += share * slope;
      jacobian[down!]! += share * slope;
      jacobian[less!]! -= share * slope;
      jacobian[more!]! -= share * slope;
    }
    value *= share;
    rounded *= ROUNDED * share;
    if (branch < 0) {
      flow(state, plus, minus, value);
      state.scale[plus]! += rounded;
      state.scale[minus]! += rounded;
      return;
    }
    flow(state, plus, minus, state.x[branch]! + state.low[branch]!);
    const drop = across(state, plus, minus);
    state.residual[branch] = drop - value;
    state.scale[branch] = Math.abs(drop) + Math.abs(value) + rounded;
  }

  /** Interval arithmetic at the signals themselves, which are known to a few roundings. */
  addDoubt({ share }: State, doubt: Float64Array): void {
    const { expression, y, trial, value, plus, minus, branch } = this;
    for (let k = 0; k < y.length; k++) trial[k] = 4 * UNIT * Math.abs(y[k]!);
    const { low, high } = expression.valueRange(y, trial);
    const most = share * Math.max(high - value, value - low);
    if (branch < 0) {
      doubt[plus]! += most;
      doubt[minus]! += most;
    } else doubt[branch]! += most;
  }

  /** Interval arithmetic over the ball. */
  addSpread({ share }: State, radius: number, widths: Float64Array, at: number, spread: Float64Array): void {
    const { expression, y, trial, slopes, plus, minus, branch } = this;
    for (let k = 0; k < y.length; k++) trial[k] = radius * widths[at + k]! + 4 * UNIT * Math.abs(y[k]!);
    let most = 0;
    for (let k = 0; k < y.length; k++) {
      const { low, high } = expression.slopeRange(k, y, trial);
      most += share * widths[at + k]! * Math.max(high - slopes[k]!, slopes[k]! - low);
    }
    if (branch < 0) {
      spread[plus]! += most;
      spread[minus]! += most;
    } else spread[branch]! += most;
  }

  current(pin: string, state: State): number {
    const i = this.branch < 0 ? this.amperes(state) : state.x[this.branch]!;
    return pin === "plus" ? i : -i;
  }

  private amperes(state: State): number {
    this.expression.measure(state, this.target);
    return this.expression.valueAt(this.target) * state.share;
  }
}
