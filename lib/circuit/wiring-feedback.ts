import type { Design, Element } from "@/lib/language/ast";
import type { Report } from "@/lib/language/report";
import { components } from "./strong-components";
import { UnionFind } from "./union-find";
import { GROUND, list, type Wiring } from "./wiring-graph";
import { drivesCurrent, elementsOf, isDriver, netsSensed } from "./wiring-laws";

/**
 * Amplifiers with no path from their output back to an input. A path leads through any element but one that drives a current, from
 * the inputs of other amplifiers and gains to their outputs, and from what a law reads to its ends; never through ground or a net
 * that voltage elements tie to it, which do not move. So an amplifier has feedback exactly where its output and one of its
 * inputs lie in one strong component.
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
    if (isDriver(element) || drivesCurrent(element)) continue;
    const nets = Object.keys(element.pins)
      .map((pin) => net(element, pin))
      .filter(moves);
    for (const other of nets) joined.union(nets[0]!, other);
  }
  const edges = new Map<number, number[]>();
  const lead = (inputs: readonly number[], output: number): void => {
    const to = joined.find(output);
    for (const input of inputs) {
      const from = joined.find(input);
      const list = edges.get(from);
      if (list === undefined) edges.set(from, [to]);
      else list.push(to);
    }
  };
  const numbers = new Map(wiring.nets.map((name, i) => [name, i]));
  const named = elementsOf(design);
  for (const element of design.elements) {
    if (isDriver(element)) lead(inputsOf(element, wiring), net(element, "out"));
    if (element.law === null) continue;
    const sensed = netsSensed(element, named).map((name) => numbers.get(name)!);
    for (const pin of Object.keys(element.pins)) lead(sensed, net(element, pin));
  }
  const limited = limitedAmplifiers(design);
  const component = components(wiring.nets.length, (n) => edges.get(n) ?? []);
  for (const amplifier of amplifiers) {
    // An output on a net that does not move has been reported as a second driver.
    if (!moves(net(amplifier, "out"))) continue;
    const out = component[joined.find(net(amplifier, "out"))];
    const fedBack = inputsOf(amplifier, wiring).some((n) => moves(n) && component[joined.find(n)] === out);
    if (!fedBack && !limited.has(amplifier)) reportOpenLoop(amplifier, ideal.has(amplifier), report);
  }
}

function inputsOf(amplifier: Element, { net }: Wiring): number[] {
  return [net(amplifier, "plus"), net(amplifier, "minus")];
}

/** Amplifiers with both limits, which may well run open as comparators. */
function limitedAmplifiers({ models, elements }: Design): ReadonlySet<Element> {
  const both = models.filter(({ params }) => params.has("out_low") && params.has("out_high"));
  const limited = new Set(both.map(({ name }) => name));
  return new Set(elements.filter(({ model }) => limited.has(model ?? "")));
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
