import type { Design, Element, Signal, Typed } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { signalsOf } from "@/lib/language/signals-of";

/** A current into a pin of an element. */
export interface PinCurrent {
  readonly element: string;
  readonly pin: string;
}

/** Every expression within an expression, itself first. */
export function* nodesOf(typed: Typed): Generator<Typed> {
  yield typed;
  if (typed.op === "negate") yield* nodesOf(typed.operand);
  else if (typed.op === "call") for (const arg of typed.args) yield* nodesOf(arg);
  else if ("left" in typed) {
    yield* nodesOf(typed.left);
    yield* nodesOf(typed.right);
  }
}

/** The current that a signal other than a voltage stands for; that of an element flows into its first pin. */
export function pinCurrent(signal: Signal, kind: Element["kind"]): PinCurrent | null {
  if (signal.of === "net" || (signal.of === "element" && signal.quantity === "v")) return null;
  const { element } = signal;
  return { element, pin: signal.of === "pin" ? signal.pin : KINDS[kind].pins[0]! };
}

/** The currents that the laws of a design read, each once. */
export function currentsRead(design: Design): readonly PinCurrent[] {
  const kinds = new Map(design.elements.map(({ name, kind }) => [name, kind]));
  const found = new Map<string, PinCurrent>();
  for (const { law } of design.elements) {
    if (law === null) continue;
    for (const signal of signalsOf(law.value)) {
      if (signal.of === "net") continue;
      const current = pinCurrent(signal, kinds.get(signal.element)!);
      if (current !== null) found.set(`${current.element}.${current.pin}`, current);
    }
  }
  return [...found.values()];
}
