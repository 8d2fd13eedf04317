import type { Design, Element, Signal, Typed } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { AMPERE, VOLT } from "@/lib/units/dimension";

/** A current into a pin of an element. */
export interface PinCurrent {
  readonly element: string;
  readonly pin: string;
}

/** A law with the power of elements written as voltage times current, so that no signal is left but these two. */
export function withoutPower(typed: Typed): Typed {
  if (typed.op === "signal") return powerless(typed, typed.signal);
  if (typed.op === "negate") return { ...typed, operand: withoutPower(typed.operand) };
  if (typed.op === "call") return { ...typed, args: typed.args.map(withoutPower) };
  if ("left" in typed) return { ...typed, left: withoutPower(typed.left), right: withoutPower(typed.right) };
  return typed;
}

function powerless(typed: Typed, signal: Signal): Typed {
  if (signal.of !== "element" || signal.quantity !== "p") return typed;
  const of = { of: "element", element: signal.element } as const;
  return {
    op: "*",
    left: { op: "signal", signal: { ...of, quantity: "v" }, dimension: VOLT },
    right: { op: "signal", signal: { ...of, quantity: "i" }, dimension: AMPERE },
    dimension: typed.dimension,
  };
}

/** The signals of an expression, each once, in the order of the text. */
export function signalsOf(typed: Typed): readonly Signal[] {
  const found = new Map<string, Signal>();
  collect(typed, found);
  return [...found.values()];
}

function collect(typed: Typed, into: Map<string, Signal>): void {
  if (typed.op === "signal") into.set(JSON.stringify(typed.signal), typed.signal);
  else if (typed.op === "negate") collect(typed.operand, into);
  else if (typed.op === "call") for (const arg of typed.args) collect(arg, into);
  else if ("left" in typed) {
    collect(typed.left, into);
    collect(typed.right, into);
  }
}

/** The current that a signal other than a voltage stands for; that of an element flows into its first pin. */
export function pinCurrent(signal: Signal, kindOf: (element: string) => Element["kind"]): PinCurrent | null {
  if (signal.of === "pin") return { element: signal.element, pin: signal.pin };
  if (signal.of === "net" || signal.quantity === "v") return null;
  return { element: signal.element, pin: KINDS[kindOf(signal.element)].pins[0]! };
}

/** The currents that the laws of a design read, each once. */
export function currentsRead(design: Design): readonly PinCurrent[] {
  const kinds = new Map(design.elements.map(({ name, kind }) => [name, kind]));
  const found = new Map<string, PinCurrent>();
  for (const { law } of design.elements) {
    if (law === null) continue;
    for (const signal of signalsOf(withoutPower(law.value))) {
      const current = pinCurrent(signal, (element) => kinds.get(element)!);
      if (current !== null) found.set(`${current.element}.${current.pin}`, current);
    }
  }
  return [...found.values()];
}
