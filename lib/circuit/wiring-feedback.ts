import type { Element } from "@/lib/language/ast";
import type { Report } from "@/lib/language/report";
import { components } from "./strong-components";
import { UnionFind } from "./union-find";
import { GROUND, list, type Wiring } from "./wiring-graph";

/**
 * Amplifiers with no path from their output back to an input. A path leads through any element but a current element, and from
 * the inputs of other amplifiers to their outputs; never through ground or a net that voltage elements tie to it, which do not
 * move. So an amplifier has feedback exactly where its output and one of its inputs lie in one strong component.
 */
export function checkFeedback(wiring: Wiring, ideal: ReadonlySet<Element>, report: Report): void {
  const { design, net } = wiring;
  const amplifiers = design.elements.filter((element) => element.kind === "opamp");
  if (amplifiers.length === 0) return;
  const stiff = new UnionFind(wiring.nets.length);
  for (const element of design.elements) {
    if (element.kind === "voltage") stiff.union(net(element, "left"), net(element, "right"));
  }
  const moves = (n: number): boolean => stiff.find(n) !== stiff.find(GROUND);
  const joined = new UnionFind(wiring.nets.length);
  for (const element of design.elements) {
    if (element.kind === "opamp" || element.kind === "current") continue;
    const nets = Object.keys(element.pins)
      .map((pin) => net(element, pin))
      .filter(moves);
    for (const other of nets) joined.union(nets[0]!, other);
  }
  const edges = new Map<number, number[]>();
  for (const amplifier of amplifiers) {
    for (const input of inputsOf(amplifier, wiring)) {
      const from = joined.find(input);
      const to = joined.find(net(amplifier, "out"));
      const list = edges.get(from);
      if (list === undefined) edges.set(from, [to]);
      else list.push(to);
    }
  }
  const component = components(wiring.nets.length, (n) => edges.get(n) ?? []);
  for (const amplifier of amplifiers) {
    // An output on a net that does not move has been reported as a second driver.
    if (!moves(net(amplifier, "out"))) continue;
    const out = component[joined.find(net(amplifier, "out"))];
    const fedBack = inputsOf(amplifier, wiring).some((n) => moves(n) && component[joined.find(n)] === out);
    if (!fedBack) reportOpenLoop(amplifier, ideal.has(amplifier), report);
  }
}

function inputsOf(amplifier: Element, { net }: Wiring): number[] {
  return [net(amplifier, "plus"), net(amplifier, "minus")];
}

/** Open loop an ideal amplifier has no defined output; one with a gain merely has a very large one. */
function reportOpenLoop(amplifier: Element, isIdeal: boolean, report: Report): void {
  const message = `No path leads from the output of ${list([amplifier.name])} back to its inputs`;
  if (isIdeal)
    report.error(
      "WIR6",
      amplifier,
      `${message}, and an ideal amplifier needs one; close its loop or give its model a gain.`,
    );
  else report.warning("WIR6", amplifier, `${message}; without feedback its whole gain acts on the input.`);
}
