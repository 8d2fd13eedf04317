import type { Element } from "@/lib/language/ast";
import type { Report } from "@/lib/language/report";
import { list, type Wiring } from "./wiring-graph";

/** Elements whose pins all hang on one net, and amplifiers whose two inputs do. */
export function checkShorts({ design }: Wiring, ideal: ReadonlySet<Element>, report: Report): void {
  for (const element of design.elements) {
    if (element.kind === "opamp") {
      if (element.pins.plus === element.pins.minus) shortedInputs(element, ideal.has(element), report);
      continue;
    }
    const nets = new Set(Object.values(element.pins));
    if (nets.size > 1) continue;
    const message = `${list([element.name])} is shorted: all its pins are on the net ${list([...nets])}; wire one of them elsewhere or remove the element.`;
    report.error("WIR7", element, message);
  }
}

/** With a finite gain this shows the offset, which may be what is wanted; an ideal amplifier then has no defined output. */
function shortedInputs(element: Element, isIdeal: boolean, report: Report): void {
  const message = `Both inputs of ${list([element.name])} are on the net ${list([element.pins.plus!])}`;
  if (isIdeal) report.error("WIR7", element, `${message}, so nothing sets its output; wire them apart.`);
  else report.warning("WIR7", element, `${message}, so its output is its offset times its gain.`);
}
