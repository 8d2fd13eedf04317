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

/** Holds a voltage whatever the currents: a voltage element, or a law of volts that reads no current. */
export function holdsVoltage(element: Element): boolean {
  if (element.kind === "voltage") return true;
  return element.law?.quantity === "volts" && signalsOf(element.law.value).every(isVoltage);
}

function isVoltage(signal: Signal): boolean {
  return signal.of === "net" || (signal.of === "element" && signal.quantity === "v");
}

/** Amplifiers with an output resistance, whose output another element may well drive. */
export function softAmplifiers({ models, elements }: Design): ReadonlySet<Element> {
  const soft = new Set(models.filter(({ params }) => params.has("R_out")).map(({ name }) => name));
  return new Set(elements.filter(({ kind, model }) => kind === "opamp" && soft.has(model!)));
}

/** Drives a current whatever its voltage: a current element, or a law of amperes that does not read the voltage over itself. */
export function drivesCurrent(element: Element): boolean {
  if (element.kind === "current") return true;
  return element.law?.quantity === "amps" && !readsOwnVoltage(element);
}

/** Whether a law reads the voltage over itself or at one of its ends. */
function readsOwnVoltage(element: Element): boolean {
  const ends = Object.values(element.pins).filter((net) => net !== "ground");
  return signalsOf(element.law!.value).some((signal) => {
    if (signal.of === "net") return ends.includes(signal.net);
    return isVoltage(signal) && signal.element === element.name;
  });
}
