import { AMPERE, type Dimension, VOLT, WATT } from "@/lib/units/dimension";
import type { Signal, Typed } from "./ast";

/** The signals that an expression reads, each once, in the order of the text. */
export function signalsOf(typed: Typed): Signal[] {
  const found = new Map<string, Signal>();
  collect(typed, found);
  return [...found.values()];
}

export function hasSignals(typed: Typed): boolean {
  return signalsOf(typed).length > 0;
}

/** A name for a signal, as the language writes it. */
export function signalName(signal: Signal): string {
  if (signal.of === "net") return `${signal.net}.v`;
  if (signal.of === "element") return `${signal.element}.${signal.quantity}`;
  return `${signal.element}.${signal.pin}.i`;
}

export function dimensionOf(signal: Signal): Dimension {
  if (signal.of === "net") return VOLT;
  return signal.of === "pin" ? AMPERE : { v: VOLT, i: AMPERE, p: WATT }[signal.quantity];
}

export function sameSignal(a: Signal, b: Signal): boolean {
  return signalName(a) === signalName(b);
}

function collect(typed: Typed, into: Map<string, Signal>): void {
  switch (typed.op) {
    case "signal":
      into.set(signalName(typed.signal), typed.signal);
      break;
    case "negate":
      collect(typed.operand, into);
      break;
    case "call":
    case "reduce":
      for (const arg of typed.args) collect(arg, into);
      break;
    case "constant":
    case "knob":
    case "let":
    case "thermal voltage":
    case "trace":
    case "reading":
      break;
    default:
      collect(typed.left, into);
      collect(typed.right, into);
  }
}
