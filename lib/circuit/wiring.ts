import type { Design } from "@/lib/language/ast";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { Report } from "@/lib/language/report";
import { checkFeedback } from "./wiring-feedback";
import { idealAmplifiers, wiringOf } from "./wiring-graph";
import { checkGround } from "./wiring-ground";
import { checkLoops } from "./wiring-loops";
import { checkReach } from "./wiring-reach";
import { checkShorts } from "./wiring-shorts";

/**
 * What is wrong with the wiring of a design, decided before anything is solved: diagnostics of the family WIR, sorted by place.
 * An error means that no solution exists or that it is not the only one, or is surely a slip; a warning that the circuit can be
 * solved but is probably not what was meant. Linear in the number of pins, apart from a logarithm. `text` is what the design was
 * read from; with it a net that was meant for ground is mended wherever it is written.
 */
export function checkWiring(design: Design, text: string | null = null): Diagnostic[] {
  const report = new Report();
  if (design.elements.length === 0) {
    const message = "Nothing is wired; add elements such as `ground -- V1 : voltage 1 V -- in`.";
    report.error("WIR9", { from: 0, to: 0 }, message);
    return report.sorted();
  }
  const wiring = wiringOf(design);
  if (!checkGround(wiring, text, report)) return report.sorted();
  const ideal = idealAmplifiers(design);
  checkShorts(wiring, ideal, report);
  checkReach(wiring, report);
  checkLoops(wiring, ideal, report);
  checkFeedback(wiring, ideal, report);
  return report.sorted();
}
