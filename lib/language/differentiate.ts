import { divide } from "@/lib/units/dimension";
import type { Signal, Typed } from "./ast";
import { dimensionOf, sameSignal } from "./signals-of";
import {
  apply,
  choice,
  choose,
  constantOf,
  difference,
  negative,
  product,
  quotient,
  raised,
  sum,
} from "./simplify";

type Binary = Extract<Typed, { op: "+" | "-" | "*" | "/" | "^" | "<=" | ">=" | "<" | ">" }>;
type Call = Extract<Typed, { op: "call" }>;

/**
 * ∂`typed`/∂`signal` as an expression, all other signals, knobs and values held fixed; exact zeros and ones are dropped, so a
 * term without the signal leaves nothing. Its dimension is that of the expression over that of the signal.
 *
 * By the rules of the calculus; 1/cosh²u for tanh is 4/(eᵘ + e⁻ᵘ)², without cancellation and without overflow. Where a function
 * has a kink (`abs`, `min`, `max`, `if`) the slope is that of the branch which `evaluate` takes: at the kink itself that of the right
 * for `abs`, of the earlier value for `min` and `max`. The size grows at most with the square of that of the expression.
 */
export function differentiate(typed: Typed, signal: Signal): Typed {
  return new Differentiator(signal, dimensionOf(signal)).of(typed);
}

class Differentiator {
  constructor(
    private readonly signal: Signal,
    private readonly per: Typed["dimension"],
  ) {}

  of(typed: Typed): Typed {
    switch (typed.op) {
      case "signal":
        return sameSignal(typed.signal, this.signal) ? constantOf(1) : this.zero(typed);
      case "negate":
        return negative(this.of(typed.operand));
      case "call":
        return this.call(typed);
      case "constant":
      case "knob":
      case "let":
      case "thermal voltage":
      case "trace":
      case "reading":
      case "reduce":
        return this.zero(typed);
      default:
        return this.binary(typed);
    }
  }

  private zero(typed: Typed): Typed {
    return constantOf(0, divide(typed.dimension, this.per));
  }

  private binary(typed: Binary): Typed {
    const { left: a, right: b } = typed;
    switch (typed.op) {
      case "+":
        return sum(this.of(a), this.of(b));
      case "-":
        return difference(this.of(a), this.of(b));
      case "*":
        return sum(product(this.of(a), b), product(a, this.of(b)));
      case "/":
        // (a/b)' = a'/b − (a/b)·(b'/b)
        return difference(quotient(this.of(a), b), product(quotient(a, b), quotient(this.of(b), b)));
      case "^":
        return this.power(typed, this.of(a), this.of(b));
      default:
        return this.zero(typed);
    }
  }

  /** (aᵇ)' = b·aᵇ⁻¹·a' + aᵇ·ln(a)·b'. */
  private power(typed: Binary, da: Typed, db: Typed): Typed {
    const { left: a, right: b } = typed;
    const lowered: Typed =
      b.op === "constant"
        ? product(constantOf(b.value), raised(a, b.value - 1))
        : product(b, { op: "^", left: a, right: difference(b, constantOf(1)), dimension: a.dimension });
    const first = product(lowered, da);
    return isZero(db) ? first : sum(first, product(product(typed, apply("ln", [a])), db));
  }

  private call(typed: Call): Typed {
    const { callee, args } = typed;
    const u = args[0]!;
    if (callee === "if") return choice(u, this.of(args[1]!), this.of(args[2]!));
    if (callee === "min" || callee === "max") return this.extreme(callee, args);
    const du = this.of(u);
    if (isZero(du)) return this.zero(typed);
    switch (callee) {
      case "exp":
        return product(typed, du);
      case "ln":
        return quotient(du, u);
      case "log10":
        return quotient(du, product(u, constantOf(Math.LN10)));
      case "sqrt":
        return quotient(du, product(constantOf(2), typed));
      case "abs":
        return choose(constantOf(0, u.dimension), u, du, negative(du));
      case "tanh":
        return product(
          quotient(constantOf(4), raised(sum(apply("exp", [u]), apply("exp", [negative(u)])), 2)),
          du,
        );
      case "atan":
        return quotient(du, sum(constantOf(1), raised(u, 2)));
    }
  }

  /** min(a, b, c, …) is min(min(a, b), c, …); the earlier value is taken where two are the same. */
  private extreme(callee: "min" | "max", args: readonly Typed[]): Typed {
    let best = args[0]!;
    let slope = this.of(best);
    for (const next of args.slice(1)) {
      const own = this.of(next);
      slope = callee === "min" ? choose(best, next, slope, own) : choose(next, best, slope, own);
      best = apply(callee, [best, next], best.dimension);
    }
    return slope;
  }
}

function isZero(typed: Typed): boolean {
  return typed.op === "constant" && typed.value === 0;
}
