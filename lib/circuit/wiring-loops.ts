import type { Element } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import type { Report } from "@/lib/language/report";
import { hasSignals } from "@/lib/language/signals-of";
import { UnionFind } from "./union-find";
import { GROUND, list, type Wiring } from "./wiring-graph";
import { holdsVoltage, isDriver, softAmplifiers } from "./wiring-laws";

/** Loops for which the members are looked up; each costs a walk over the voltage elements. */
const MOST_WALKS = 20;

/** An element that fixes the voltage between two nets. */
interface Tie {
  readonly element: Element;
  readonly from: number;
  readonly to: number;
}

/**
 * Two drivers on a net, and loops of elements that each fix a voltage: their voltages need not add up to zero, and a current
 * could run round the loop unseen. An output without resistance fixes the voltage of its net to ground; the inputs of an ideal
 * amplifier fix a difference of zero.
 */
export function checkLoops(wiring: Wiring, ideal: ReadonlySet<Element>, report: Report): void {
  const { elements } = wiring.design;
  const voltages = elements
    .filter(holdsVoltage)
    .map((element): Tie => {
      const [first, second] = KINDS[element.kind].pins as [string, string];
      return { element, from: wiring.net(element, first), to: wiring.net(element, second) };
    })
    .filter((tie) => tie.from !== tie.to);
  const outputs = soleDrivers(wiring, voltages, report);
  const race =
    "close a loop of fixed voltages in which nothing limits the current; put a resistor into it or take one out";
  findLoops(wiring, [...voltages, ...outputs], () => true, race, report);
  const inputs = [...ideal]
    .map((element): Tie => ({ element, from: wiring.net(element, "plus"), to: wiring.net(element, "minus") }))
    .filter((tie) => tie.from !== tie.to);
  const twice =
    "fix the same voltage twice, since the inputs of an ideal amplifier have no difference; wire one of them apart";
  // Loops of voltage elements alone have been reported; a law that reads signals can follow them.
  const fixed = voltages.filter(({ element }) => element.law === null || !hasSignals(element.law.value));
  findLoops(wiring, [...fixed, ...inputs], (tie) => tie.element.kind === "opamp", twice, report);
}

/** Reports nets with two drivers; the outputs that are the only driver of their net. */
function soleDrivers(wiring: Wiring, voltages: readonly Tie[], report: Report): Tie[] {
  const drivers = new Map<number, Element>();
  for (const { element, from, to } of voltages) {
    if (from === GROUND) drivers.set(to, element);
    if (to === GROUND) drivers.set(from, element);
  }
  const outputs: Tie[] = [];
  const soft = softAmplifiers(wiring.design);
  for (const element of wiring.design.elements) {
    if (!isDriver(element) || soft.has(element)) continue;
    const out = wiring.net(element, "out");
    const rival = drivers.get(out);
    if (out === GROUND) {
      const message = `The output of ${list([element.name])} is wired to \`ground\`, which has its voltage already; wire it to a net of its own.`;
      report.error("WIR8", element, message);
    } else if (rival !== undefined) {
      const message = `${list([rival.name])} and ${list([element.name])} both drive the net ${list([wiring.nets[out]!])}; let one of them drive it.`;
      report.error("WIR8", element, message);
    } else {
      drivers.set(out, element);
      outputs.push({ element, from: GROUND, to: out });
    }
  }
  return outputs;
}

function findLoops(
  wiring: Wiring,
  ties: readonly Tie[],
  isReported: (tie: Tie) => boolean,
  trouble: string,
  report: Report,
): void {
  const sets = new UnionFind(wiring.nets.length);
  const forest = new Map<number, Tie[]>();
  let walks = 0;
  for (const tie of ties) {
    if (sets.union(tie.from, tie.to)) {
      push(forest, tie.from, tie);
      push(forest, tie.to, tie);
    } else if (isReported(tie)) {
      const others = walks++ < MOST_WALKS ? between(forest, tie) : [];
      const members = [...new Set([...others, tie.element])].sort((a, b) => a.from - b.from);
      const names = members.map((element) => element.name);
      const message = `${list(names)} ${trouble}.`;
      report.error("WIR3", tie.element, message);
    }
  }
}

/** The elements of the forest that lead from one end of a tie to the other, found breadth first. */
function between(forest: ReadonlyMap<number, readonly Tie[]>, tie: Tie): Element[] {
  const cameBy = new Map<number, { tie: Tie; from: number } | null>([[tie.from, null]]);
  const queue = [tie.from];
  for (let i = 0; i < queue.length && !cameBy.has(tie.to); i++) {
    for (const step of forest.get(queue[i]!) ?? []) {
      const next = step.from === queue[i] ? step.to : step.from;
      if (cameBy.has(next)) continue;
      cameBy.set(next, { tie: step, from: queue[i]! });
      queue.push(next);
    }
  }
  const found: Element[] = [];
  for (let way = cameBy.get(tie.to); way; way = cameBy.get(way.from)) found.push(way.tie.element);
  return found.reverse();
}

function push(forest: Map<number, Tie[]>, net: number, tie: Tie): void {
  const ties = forest.get(net);
  if (ties === undefined) forest.set(net, [tie]);
  else ties.push(tie);
}
