import { atan, log, log10, power, tanh } from "@/lib/units/elementary";
import { exp } from "@/lib/units/exponential";
import type { Reduced, Signal, Typed } from "./ast";

/** Where an expression finds the values of the point being solved: coherent SI units, temperatures in K. */
export interface Scope {
  knob(name: string): number;
  let(name: string): number;
  signal(signal: Signal): number;
  /** V_T in V at the present temperature. */
  readonly thermalVoltage: number;
  /** The value of a reduction or a reading, where there are any; without it they are NaN. */
  reduced?(reduced: Reduced): number;
}

/**
 * The value of a checked expression in coherent SI units. A comparison is 1 where it holds, 0 where it does not, and NaN where a
 * side of it is none, so that nothing unknown is ever taken for false. Where the mathematics has no value (1/0, ln(−1)) the
 * result is not finite; nothing is thrown. Depth is bounded by the parser's cap.
 */
export function evaluate(typed: Typed, scope: Scope): number {
  switch (typed.op) {
    case "constant":
      return typed.value;
    case "knob":
      return scope.knob(typed.name);
    case "let":
      return scope.let(typed.name);
    case "thermal voltage":
      return scope.thermalVoltage;
    case "signal":
      return scope.signal(typed.signal);
    case "reduce":
    case "trace":
    case "reading":
      return scope.reduced?.(typed) ?? Number.NaN;
    case "negate":
      return -evaluate(typed.operand, scope);
    case "call":
      return call(typed, scope);
    default:
      return binary(typed.op, evaluate(typed.left, scope), evaluate(typed.right, scope));
  }
}

function binary(op: "+" | "-" | "*" | "/" | "^" | "<=" | ">=" | "<" | ">", a: number, b: number): number {
  switch (op) {
    case "+":
      return a + b;
    case "-":
      return a - b;
    case "*":
      return a * b;
    case "/":
      return a / b;
    case "^":
      return power(a, b);
    case "<=":
      return truth(a <= b, a, b);
    case ">=":
      return truth(a >= b, a, b);
    case "<":
      return truth(a < b, a, b);
    case ">":
      return truth(a > b, a, b);
  }
}

function truth(holds: boolean, a: number, b: number): number {
  return Number.isNaN(a) || Number.isNaN(b) ? Number.NaN : holds ? 1 : 0;
}

/** Only the branch that `if` chooses is worked out, so that it can guard the other. */
function call(typed: Extract<Typed, { op: "call" }>, scope: Scope): number {
  const { callee, args } = typed;
  if (callee === "if") {
    const condition = evaluate(args[0]!, scope);
    return Number.isNaN(condition) ? condition : evaluate(condition !== 0 ? args[1]! : args[2]!, scope);
  }
  const x = evaluate(args[0]!, scope);
  switch (callee) {
    case "exp":
      return exp(x);
    case "ln":
      return log(x);
    case "log10":
      return log10(x);
    case "sqrt":
      return Math.sqrt(x);
    case "abs":
      return Math.abs(x);
    case "min":
      return extreme(args, x, scope, Math.min);
    case "max":
      return extreme(args, x, scope, Math.max);
    case "tanh":
      return tanh(x);
    case "atan":
      return atan(x);
  }
}

/** The least or largest of the values, `first` being that of the first one; nothing is allocated, since laws are worked out in loops. */
function extreme(
  args: readonly Typed[],
  first: number,
  scope: Scope,
  of: (a: number, b: number) => number,
): number {
  let found = first;
  for (let k = 1; k < args.length; k++) found = of(found, evaluate(args[k]!, scope));
  return found;
}
