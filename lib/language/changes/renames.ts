import type { Design, Element } from "../ast";
import { sameMeaning } from "./same";

/** Old names with the new ones, of what is otherwise the same. */
export interface Renames {
  readonly nets: ReadonlyMap<string, string>;
  readonly elements: ReadonlyMap<string, string>;
}

/** Pairs of elements that are looked at, one gone and one come; with more, every one counts as added or removed. */
const MOST_PAIRS = 2_500;

/**
 * Nets and elements that only got another name: a net that all elements on it exchanged for one new net, an element that alone is
 * the same as one new element.
 */
export function findRenames(before: Design, after: Design): Renames {
  const nets = netRenames(before, after);
  const gone = only(before.elements, after.elements).map((one) => withNets(one, nets));
  const come = only(after.elements, before.elements);
  const elements = new Map<string, string>();
  if (gone.length * come.length > MOST_PAIRS) return { nets, elements };
  // Whatever is like the same one is alike, so rivals show at the one they would become: only pairs of gone and come are looked at.
  const claims = new Map<string, string[]>();
  for (const old of gone) {
    const alike = come.filter((one) => sameMeaning({ ...one, name: "" }, { ...old, name: "" }));
    const [one] = alike;
    if (one !== undefined && alike.length === 1)
      claims.set(one.name, [...(claims.get(one.name) ?? []), old.name]);
  }
  for (const [name, [old, ...rivals]] of claims) if (rivals.length === 0) elements.set(old!, name);
  return { nets, elements };
}

function netRenames(before: Design, after: Design): Map<string, string> {
  const [old, now] = [new Set(before.nets), new Set(after.nets)];
  const later = new Map(after.elements.map((one) => [one.name, one]));
  const found = new Map<string, Set<string>>();
  const back = new Map<string, Set<string>>();
  for (const element of before.elements) {
    const next = later.get(element.name);
    if (next === undefined || next.kind !== element.kind) continue;
    for (const [pin, net] of Object.entries(element.pins)) {
      const to = next.pins[pin]!;
      note(found, net, to);
      note(back, to, net);
    }
  }
  const names = new Map<string, string>();
  for (const [net, tos] of found) {
    const [to] = tos;
    if (tos.size !== 1 || to === undefined || !old.has(net) || !now.has(to)) continue;
    if (old.has(to) || now.has(net)) continue;
    if (back.get(to)?.size === 1) names.set(net, to);
  }
  return names;
}

function note(map: Map<string, Set<string>>, key: string, value: string): void {
  const known = map.get(key);
  if (known === undefined) map.set(key, new Set([value]));
  else known.add(value);
}

function only(these: readonly Element[], those: readonly Element[]): Element[] {
  const names = new Set(those.map(({ name }) => name));
  return these.filter(({ name }) => !names.has(name));
}

function withNets(element: Element, nets: ReadonlyMap<string, string>): Element {
  const pins = Object.entries(element.pins).map(([pin, net]) => [pin, nets.get(net) ?? net]);
  return { ...element, pins: Object.fromEntries(pins) };
}

/** A design with its nets and elements under their new names, in signals too. */
export function renamed(design: Design, { nets, elements }: Renames): Design {
  if (nets.size === 0 && elements.size === 0) return design;
  const inside = <T>(one: T): T => {
    if (typeof one !== "object" || one === null || one instanceof Map) return one;
    if (Array.isArray(one)) return one.map(inside) as T;
    const copy = Object.fromEntries(Object.entries(one).map(([key, value]) => [key, inside(value)]));
    if (copy.of === "net") copy.net = nets.get(copy.net) ?? copy.net;
    if (copy.of === "element" || copy.of === "pin") copy.element = elements.get(copy.element) ?? copy.element;
    return copy as T;
  };
  return {
    ...design,
    elements: design.elements.map((one) => ({
      ...withNets(one, nets),
      name: elements.get(one.name) ?? one.name,
      law: inside(one.law),
    })),
    shows: inside(design.shows),
    reads: inside(design.reads),
    requirements: inside(design.requirements),
  };
}
