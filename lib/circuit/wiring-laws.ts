import type { Design, Element, Signal } from "@/lib/language/ast";
import { signalsOf } from "@/lib/language/signals-of";

/** The nets at which a law reads something: of a voltage, those it lies between; of a current, those at the element's pins. */
export function netsSensed(law: Element, elements: ReadonlyMap<string, Element>): readonly string[] {
  if (law.law === null) return [];
  return signalsOf(law.law.value).flatMap((signal) =>
    signal.of === "net" ? [signal.net] : Object.values(elements.get(signal.element)!.pins),
  );
}

export function elementsOf({ elements }: Design): ReadonlyMap<string, Element> {
  return new Map(elements.map((element) => [element.name, element]));
}

/** Drives its output to a voltage to ground by what it finds at its inputs. */
export function isDriver({ kind }: Element): boolean {
  return kind === "opamp" || kind === "gain";
}

/** Holds a voltage whatever its current: a voltage element, or a law of volts that does not read its own current. */
export function holdsVoltage(element: Element): boolean {
  if (element.kind === "voltage") return true;
  return element.law?.quantity === "volts" && !readsOwn(element, (signal) => signal !== "v");
}

/** Drives a current whatever its voltage: a current element, or a law of amperes that does not read the voltage over itself. */
export function drivesCurrent(element: Element): boolean {
  if (element.kind === "current") return true;
  return element.law?.quantity === "amps" && !readsOwn(element, (signal) => signal !== "i");
}

/** Whether a law reads its own voltage, directly or by its nets, current or power. */
function readsOwn(element: Element, isMeant: (quantity: "v" | "i" | "p") => boolean): boolean {
  const ends = Object.values(element.pins).filter((net) => net !== "ground");
  const quantityOf = (signal: Signal): "v" | "i" | "p" | null => {
    if (signal.of === "net") return ends.includes(signal.net) ? "v" : null;
    if (signal.element !== element.name) return null;
    return signal.of === "pin" ? "i" : signal.quantity;
  };
  return signalsOf(element.law!.value).some((signal) => {
    const quantity = quantityOf(signal);
    return quantity !== null && isMeant(quantity);
  });
}
