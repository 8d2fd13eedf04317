import { type Dimension, divide, multiply, PURE, power } from "@/lib/units/dimension";
import type { FunctionName, Typed } from "./ast";

/*
 * Makers of expressions that drop what is exactly zero or one, and work out constants where nothing is lost: sums and products
 * of two numbers are the same rounded numbers that evaluation would give.
 */

export function constantOf(value: number, dimension: Dimension = PURE): Typed {
  return { op: "constant", value, dimension };
}

export function isConstant(typed: Typed, value: number): boolean {
  return typed.op === "constant" && typed.value === value;
}

export function sum(left: Typed, right: Typed): Typed {
  if (isConstant(left, 0)) return right;
  if (isConstant(right, 0)) return left;
  if (left.op === "constant" && right.op === "constant") {
    return constantOf(left.value + right.value, left.dimension);
  }
  if (right.op === "negate") return { op: "-", left, right: right.operand, dimension: left.dimension };
  return { op: "+", left, right, dimension: left.dimension };
}

export function difference(left: Typed, right: Typed): Typed {
  if (isConstant(right, 0)) return left;
  if (isConstant(left, 0)) return negative(right);
  if (left.op === "constant" && right.op === "constant") {
    return constantOf(left.value - right.value, left.dimension);
  }
  if (right.op === "negate") return { op: "+", left, right: right.operand, dimension: left.dimension };
  return { op: "-", left, right, dimension: left.dimension };
}

export function negative(operand: Typed): Typed {
  if (operand.op === "negate") return operand.operand;
  if (operand.op === "constant")
    return constantOf(operand.value === 0 ? 0 : -operand.value, operand.dimension);
  return { op: "negate", operand, dimension: operand.dimension };
}

export function product(left: Typed, right: Typed): Typed {
  const dimension = multiply(left.dimension, right.dimension);
  if (isConstant(left, 0) || isConstant(right, 0)) return constantOf(0, dimension);
  if (isConstant(left, 1) && isPure(left)) return right;
  if (isConstant(right, 1) && isPure(right)) return left;
  if (left.op === "constant" && right.op === "constant") {
    return constantOf(left.value * right.value, dimension);
  }
  if (left.op === "negate") return negative(product(left.operand, right));
  if (right.op === "negate") return negative(product(left, right.operand));
  return { op: "*", left, right, dimension };
}

/** Never worked out where the divisor is a constant zero. */
export function quotient(left: Typed, right: Typed): Typed {
  const dimension = divide(left.dimension, right.dimension);
  if (isConstant(left, 0) && !isConstant(right, 0)) return constantOf(0, dimension);
  if (isConstant(right, 1) && isPure(right)) return left;
  if (left.op === "negate") return negative(quotient(left.operand, right));
  return { op: "/", left, right, dimension };
}

/** `base` to a constant power. */
export function raised(base: Typed, exponent: number): Typed {
  if (exponent === 0) return constantOf(1);
  if (exponent === 1) return base;
  const dimension = power(base.dimension, exponent);
  return { op: "^", left: base, right: constantOf(exponent), dimension };
}

export function apply(callee: FunctionName, args: readonly Typed[], dimension: Dimension = PURE): Typed {
  return { op: "call", callee, args, dimension };
}

/** The first where `left <= right`, else the second; one of them where both are the same constant. */
export function choose(left: Typed, right: Typed, first: Typed, second: Typed): Typed {
  if (first.op === "constant" && second.op === "constant" && first.value === second.value) return first;
  return choice({ op: "<=", left, right, dimension: PURE }, first, second);
}

/** What holds under a condition, and what does otherwise. */
export function choice(condition: Typed, first: Typed, second: Typed): Typed {
  if (first.op === "constant" && second.op === "constant" && first.value === second.value) return first;
  return apply("if", [condition, first, second], first.dimension);
}

function isPure({ dimension }: Typed): boolean {
  return dimension.every((exponent) => exponent === 0);
}
