import type { Design, Requirement, Typed, Window } from "@/lib/language/ast";
import { narrowed } from "@/lib/language/window";
import type { RequirementDocument } from "./result";
import { type Compared, finite } from "./spread";

/**
 * The trace, or reading per point, whose own values a requirement bounds, with the bounds that hold at all its points. Bounds on
 * its size bound it on both sides. Null where a requirement is about anything else.
 */
export function boundedTrace(
  { value, relation }: Requirement,
  isTrace: boolean,
  limits: Compared | null,
): RequirementDocument["bounds"] {
  const isSize = value.op === "call" && value.callee === "abs";
  const own = isSize ? value.args[0]! : value;
  if (!isTrace || !isNamed(own) || relation.kind === "rising" || relation.kind === "falling") return null;
  if (limits === null) return { trace: own.name, low: null, high: null };
  const { low, high } = limits;
  if (!isSize) return { trace: own.name, low: finite(low), high: finite(high) };
  // A size that has a lower limit too is allowed in two strips, which no one pair of bounds describes.
  return { trace: own.name, low: low > 0 ? null : finite(-high), high: low > 0 ? null : finite(high) };
}

function isNamed(typed: Typed): typed is Extract<Typed, { op: "trace" | "reading" }> {
  return typed.op === "trace" || typed.op === "reading";
}

/** The windows of a requirement, narrowed by those of the reading that it is about. */
export function windowsOf(
  { value, windows }: Requirement,
  { reads }: Design,
): RequirementDocument["windows"] {
  const own = value.op === "call" && value.callee === "abs" ? value.args[0]! : value;
  const reading = own.op === "reading" ? reads.find(({ name }) => name === own.name) : undefined;
  const all: readonly Window[] = [...windows, ...(reading?.windows ?? [])];
  return narrowed(all).map(({ knob, low, high }) => ({ knob, low, high }));
}
