import type { FunctionName } from "./ast";

/**
 * What a function asks of its values: "pure" numbers in and out; "root" halves the dimension; "keep" passes it on, all values
 * having the same; "choose" takes a comparison and two values of the same dimension.
 */
interface FunctionShape {
  readonly rule: "pure" | "root" | "keep" | "choose";
  readonly least: number;
  readonly most: number;
}

export const FUNCTIONS: Readonly<Record<FunctionName, FunctionShape>> = {
  exp: { rule: "pure", least: 1, most: 1 },
  ln: { rule: "pure", least: 1, most: 1 },
  log10: { rule: "pure", least: 1, most: 1 },
  sqrt: { rule: "root", least: 1, most: 1 },
  abs: { rule: "keep", least: 1, most: 1 },
  min: { rule: "keep", least: 2, most: 64 },
  max: { rule: "keep", least: 2, most: 64 },
  tanh: { rule: "pure", least: 1, most: 1 },
  atan: { rule: "pure", least: 1, most: 1 },
  if: { rule: "choose", least: 3, most: 3 },
};

export const FUNCTION_NAMES: ReadonlySet<string> = new Set(Object.keys(FUNCTIONS));

export function isFunctionName(name: string): name is FunctionName {
  return FUNCTION_NAMES.has(name);
}
