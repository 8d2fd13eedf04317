import { atan, log, log10, power as raised, tanh } from "@/lib/units/elementary";
import { exp } from "@/lib/units/exponential";
import type { Signal, Typed } from "./ast";

/** All values from `low` to `high`. */
export interface Interval {
  readonly low: number;
  readonly high: number;
}

/** Where an expression finds the ranges of its signals; knobs and values are exact as they stand. */
export interface IntervalScope {
  knob(name: string): number;
  let(name: string): number;
  signal(signal: Signal): Interval;
  readonly thermalVoltage: number;
  /**
   * The expression is the slope of a function that is continuous where the signals range: an `if` that is not decided is then a kink, and
   * stands for all values of both its branches (Clarke, Optimization and Nonsmooth Analysis, 1983, from memory).
   */
  readonly isContinuous?: boolean;
}

/** Relative widening of one operation, four units in the last place each way, and absolute, for underflow. */
const WIDE = 2 ** -50;
const TINY = Number.MIN_VALUE * 4;
/** Powers are good to fewer digits, the fewer the larger they are. */
const WIDE_POWER = 2 ** -44;
/** k·T/q with rounded constants. */
const WIDE_THERMAL = 2 ** -49;

const ANYTHING: Interval = { low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY };

/**
 * An interval that holds the exact value of an expression for all values of its signals, rounding included (Moore, Interval Analysis,
 * 1966). Infinite where nothing is known: over a pole, out of a function's domain, or where `if` is not decided, since it may jump there.
 */
export function evaluateInterval(typed: Typed, scope: IntervalScope): Interval {
  switch (typed.op) {
    case "constant":
      return point(typed.value);
    case "knob":
      return point(scope.knob(typed.name));
    case "let":
      return point(scope.let(typed.name));
    case "thermal voltage":
      return widened(scope.thermalVoltage, scope.thermalVoltage, WIDE_THERMAL);
    case "signal":
      return scope.signal(typed.signal);
    case "negate": {
      const { low, high } = evaluateInterval(typed.operand, scope);
      return { low: -high, high: -low };
    }
    case "call":
      return call(typed, scope);
    case "reduce":
    case "trace":
    case "reading":
      return ANYTHING;
    default:
      return binary(typed.op, evaluateInterval(typed.left, scope), evaluateInterval(typed.right, scope));
  }
}

function point(value: number): Interval {
  return Number.isNaN(value) ? ANYTHING : { low: value, high: value };
}

/** An end that has overflowed is beyond the largest number, wherever that may be. */
function widened(low: number, high: number, by = WIDE): Interval {
  if (Number.isNaN(low) || Number.isNaN(high)) return ANYTHING;
  const [down, up] = [low - Math.abs(low) * by - TINY, high + Math.abs(high) * by + TINY];
  return {
    low: low === Number.POSITIVE_INFINITY ? Number.MAX_VALUE : down,
    high: high === Number.NEGATIVE_INFINITY ? -Number.MAX_VALUE : up,
  };
}

function hull(values: readonly number[], by = WIDE): Interval {
  return widened(Math.min(...values), Math.max(...values), by);
}

function binary(
  op: "+" | "-" | "*" | "/" | "^" | "<=" | ">=" | "<" | ">",
  a: Interval,
  b: Interval,
): Interval {
  switch (op) {
    case "+":
      return widened(a.low + b.low, a.high + b.high);
    case "-":
      return widened(a.low - b.high, a.high - b.low);
    case "*":
      return product(a, b);
    case "/":
      if (b.low <= 0 && b.high >= 0) return ANYTHING;
      return hull([a.low / b.low, a.low / b.high, a.high / b.low, a.high / b.high]);
    case "^":
      return power(a, b);
    case "<":
    case "<=":
      return comparison(a, b, op === "<");
    case ">":
    case ">=":
      return comparison(b, a, op === ">");
  }
}

function product(a: Interval, b: Interval): Interval {
  const isNothing = (one: Interval) => one.low === 0 && one.high === 0;
  if (isNothing(a) || isNothing(b)) return point(0);
  return hull([a.low * b.low, a.low * b.high, a.high * b.low, a.high * b.high]);
}

/** 1 or 0 where it is decided, else from 0 to 1. */
function comparison(a: Interval, b: Interval, isStrict: boolean): Interval {
  if (isStrict ? a.high < b.low : a.high <= b.low) return point(1);
  if (isStrict ? a.low >= b.high : a.low > b.high) return point(0);
  return { low: 0, high: 1 };
}

function power(a: Interval, b: Interval): Interval {
  if (b.low === b.high && Number.isInteger(b.low)) {
    const n = b.low;
    if (n < 0 && a.low <= 0 && a.high >= 0) return ANYTHING;
    const ends = [raised(a.low, n), raised(a.high, n)];
    return hull(n % 2 === 0 && n > 0 && a.low < 0 && a.high > 0 ? [...ends, 0] : ends, WIDE_POWER);
  }
  if (!(a.low > 0))
    return a.low === 0 && b.low > 0 ? { low: 0, high: power(point(a.high), b).high } : ANYTHING;
  const ends = [raised(a.low, b.low), raised(a.low, b.high), raised(a.high, b.low), raised(a.high, b.high)];
  return hull(ends, WIDE_POWER);
}

function call(typed: Extract<Typed, { op: "call" }>, scope: IntervalScope): Interval {
  const ranges = () => typed.args.map((arg) => evaluateInterval(arg, scope));
  const rising = (f: (x: number) => number, from = Number.NEGATIVE_INFINITY) => {
    const { low, high } = evaluateInterval(typed.args[0]!, scope);
    return low >= from ? widened(f(low), f(high)) : ANYTHING;
  };
  switch (typed.callee) {
    case "if": {
      const condition = evaluateInterval(typed.args[0]!, scope);
      if (condition.low > 0 || condition.high < 0) return evaluateInterval(typed.args[1]!, scope);
      if (condition.low === 0 && condition.high === 0) return evaluateInterval(typed.args[2]!, scope);
      if (scope.isContinuous !== true) return ANYTHING;
      const [one, other] = [evaluateInterval(typed.args[1]!, scope), evaluateInterval(typed.args[2]!, scope)];
      return { low: Math.min(one.low, other.low), high: Math.max(one.high, other.high) };
    }
    case "exp": {
      const range = rising(exp);
      return { low: Math.max(0, range.low), high: range.high };
    }
    case "ln":
      return rising(log, Number.MIN_VALUE);
    case "log10":
      return rising(log10, Number.MIN_VALUE);
    case "sqrt":
      return rising(Math.sqrt, 0);
    case "tanh":
      return rising(tanh);
    case "atan":
      return rising(atan);
    case "abs": {
      const [{ low, high }] = ranges() as [Interval];
      return low >= 0 ? { low, high } : { low: high <= 0 ? -high : 0, high: Math.max(-low, high) };
    }
    case "min":
      return pick(ranges(), Math.min);
    case "max":
      return pick(ranges(), Math.max);
  }
}

function pick(ranges: readonly Interval[], of: (...values: number[]) => number): Interval {
  return { low: of(...ranges.map(({ low }) => low)), high: of(...ranges.map(({ high }) => high)) };
}
