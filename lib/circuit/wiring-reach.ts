import type { Element } from "@/lib/language/ast";
import { nearest } from "@/lib/language/nearest";
import type { Report } from "@/lib/language/report";
import { UnionFind } from "./union-find";
import { GROUND, list, type Wiring } from "./wiring-graph";
import { LIKE_GROUND } from "./wiring-ground";
import { drivesCurrent, elementsOf, holdsVoltage, isDriver, netsSensed } from "./wiring-laws";

/** Parameters that give a transistor base current. */
const BASE_CURRENTS = ["beta_f", "beta_r", "I_leak_e", "I_leak_c"];

/** One-connection nets for which a near name is searched. */
const MOST_SEARCHES = 40;

/**
 * Nets with one connection, nets with no path to ground, and cuts of current elements. A path leads through resistors, voltage
 * elements, diodes, transistors and laws, and from the output of an amplifier or gain to ground; not through what drives a
 * current, which lets no voltage settle, nor into what takes no current of its own: the input of an amplifier or gain, the base of
 * a transistor without base current.
 */
export function checkReach(wiring: Wiring, report: Report): void {
  const reach = conducting(wiring);
  const members = new Map<number, number[]>();
  wiring.nets.forEach((_, net) => {
    const root = reach.find(net);
    const set = members.get(root);
    if (set === undefined) members.set(root, [net]);
    else set.push(net);
  });
  const grounded = reach.find(GROUND);
  const ends = checkEnds(wiring, (net) => reach.find(net) === grounded, report);
  for (const [root, nets] of members) {
    if (root === grounded || (nets.length === 1 && ends.has(nets[0]!))) continue;
    checkIsland(wiring, nets, report);
  }
}

function conducting(wiring: Wiring): UnionFind {
  const sets = new UnionFind(wiring.nets.length);
  const withoutGains = wiring.design.models.filter(
    ({ params }) => !BASE_CURRENTS.some((name) => params.has(name)),
  );
  const baseless = new Set(withoutGains.map((model) => model.name));
  for (const element of wiring.design.elements) {
    if (drivesCurrent(element)) continue;
    if (isDriver(element)) {
      sets.union(wiring.net(element, "out"), GROUND);
      continue;
    }
    const pins = Object.keys(element.pins).filter((pin) => pin !== "b" || !baseless.has(element.model!));
    const nets = pins.map((pin) => wiring.net(element, pin));
    for (const net of nets) sets.union(net, nets[0]!);
  }
  joinBySensing(wiring, sets);
  return sets;
}

/**
 * A law that drives a current by a voltage which nothing else ties to ground may settle that voltage: two of them across each other
 * do. Whether it does is the solver's to say.
 */
function joinBySensing({ design, nets, net }: Wiring, sets: UnionFind): void {
  const numbers = new Map(nets.map((name, i) => [name, i]));
  const named = elementsOf(design);
  const joins = design.elements
    .filter((element) => element.law !== null && drivesCurrent(element))
    .map((law) => ({ law, sensed: netsSensed(law, named).map((name) => numbers.get(name)!) }))
    .filter(({ sensed }) => sensed.some((one) => sets.find(one) !== sets.find(GROUND)));
  for (const { law, sensed } of joins) {
    for (const one of [...Object.keys(law.pins).map((pin) => net(law, pin)), ...sensed]) {
      sets.union(sensed[0]!, one);
    }
  }
}

/** Nets with one connection. Shown by a trace and settled they may be meant, as the output of a stage; else they are a slip. */
function checkEnds(wiring: Wiring, isSettled: (net: number) => boolean, report: Report): Set<number> {
  const ends = new Set<number>();
  const wellConnected = wiring.nets.filter((_, net) => wiring.connections[net]!.length > 1);
  wiring.connections.forEach((connections, net) => {
    if (net === GROUND || connections.length !== 1) return;
    // What a law reads is as good as a second connection, where the net has a voltage without it.
    if (wiring.sensed.has(net) && isSettled(net)) return;
    ends.add(net);
    const name = wiring.nets[net]!;
    const place = wiring.design.netPlaces.get(name)!;
    const { element, pin } = connections[0]!;
    const message = `The net ${list([name])} has one connection, ${list([`${element.name}.${pin}`])}`;
    if (isSettled(net) && wiring.shown.has(net)) {
      if (element.kind === "gain" || holdsVoltage(element)) return;
      report.warning("WIR1", place, `${message}; nothing loads it.`);
      return;
    }
    const near = ends.size <= MOST_SEARCHES ? nearAround(name, wellConnected) : null;
    if (near === null) {
      const mend = isSettled(net)
        ? "connect it to something or show its voltage"
        : "connect it to something else too";
      report.error("WIR1", place, `${message}; ${mend}.`);
      return;
    }
    const fix = { title: `Change to ${near}`, from: place.from, to: place.to, text: near };
    report.error("WIR1", place, `${message}; did you mean ${list([near])}?`, fix);
  });
  return ends;
}

/** The net of the same instance, or of the file, that was probably meant: its name as it is written there. */
function nearAround(name: string, nets: readonly string[]): string | null {
  const own = name.lastIndexOf(".") + 1;
  if (LIKE_GROUND.test(name.slice(own))) return nets.includes("ground") ? "ground" : null;
  const prefix = name.slice(0, own);
  const around = nets.filter((net) => net.startsWith(prefix) && !net.includes(".", own));
  return nearest(
    name.slice(own),
    around.map((net) => net.slice(own)),
  );
}

/** Nets joined to each other but not to ground. */
function checkIsland(wiring: Wiring, nets: readonly number[], report: Report): void {
  const names = nets.map((net) => wiring.nets[net]!);
  const place = wiring.design.netPlaces.get(names[0]!)!;
  const which = names.length === 1 ? `The net ${list(names)} has` : `The nets ${list(names)} have`;
  const inside = new Set(nets);
  const cut = new Set<Element>();
  for (const net of nets) {
    for (const { element } of wiring.connections[net]!) {
      if (drivesCurrent(element) && !within(wiring, element, inside)) cut.add(element);
    }
  }
  if (cut.size === 0) {
    const message = `${which} no path to \`ground\`, so no voltage is defined there; connect ${names.length === 1 ? "it" : "one of them"} to \`ground\` through an element.`;
    report.error("WIR2", place, message);
    return;
  }
  const elements = [...cut];
  const through = elements.length === 1 ? "the current element" : "the current elements";
  const trouble =
    elements.length === 1 ? "whose current has no way back" : "whose currents need not add up to zero";
  const cutList = list(elements.map((element) => element.name));
  const message = `${which} no way for current but through ${through} ${cutList}, ${trouble}; add a resistor or another path to \`ground\`.`;
  report.error("WIR4", elements[0]!, message);
}

function within(wiring: Wiring, element: Element, nets: ReadonlySet<number>): boolean {
  return Object.keys(element.pins).every((pin) => nets.has(wiring.net(element, pin)));
}
