import type { Design, Element, Model } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import { currentsRead } from "./law-signals";

/** An unknown of the modified nodal system, named as the language reads it. */
export interface Unknown {
  /** `out.v` of a net, `Q1.b_inner.v` behind a terminal; `V1.i`, `A1.out.i`, `Q1.b.i` of a branch. */
  readonly name: string;
  readonly unit: "V" | "A";
}

/** What lies between a pin and its net where that is more than a wire: a terminal resistance, or the eye of a law that reads the current. */
export interface Terminal {
  readonly element: Element;
  readonly pin: string;
  /** Its resistance by the name of the parameter; null for none. */
  readonly resistance: string | null;
  /** Numbers of the voltages of the net and at the pin, and of the current from net to pin. */
  readonly net: number;
  readonly inner: number;
  readonly branch: number;
}

/**
 * The unknowns of a design in order: the voltage of every net but ground and of every inner net, then the current of every element
 * whose law does not give it and of every terminal. Ground has the number `size`, one past the last unknown, where vectors of
 * the solver keep a slot that is not solved.
 */
export interface Circuit {
  readonly unknowns: readonly Unknown[];
  readonly size: number;
  /** Number of each net, `ground` included. */
  readonly nets: ReadonlyMap<string, number>;
  /** Number of the current of each element of which it is an unknown: voltage, opamp, gain, law of volts. */
  readonly branches: ReadonlyMap<string, number>;
  /** By element and pin, as `Q1.b`. */
  readonly terminals: ReadonlyMap<string, Terminal>;
  /** Numbers of the two nets between which each branch current flows, the first branch first. */
  readonly branchNets: readonly (readonly [number, number])[];
}

const RESISTANCES: Readonly<Record<string, string>> = { c: "R_collector", b: "R_base", e: "R_emitter" };

export function numberUnknowns(design: Design): Circuit {
  const ends = terminalsOf(design);
  const drivers = design.elements.filter(hasBranch);
  const voltages = [...design.nets, ...ends.map(({ element, pin }) => `${element.name}.${pin}_inner`)];
  const nets = new Map(design.nets.map((net, i) => [net, i]));
  const size = voltages.length + drivers.length + ends.length;
  nets.set("ground", size);
  const unknowns: Unknown[] = voltages.map((name) => ({ name: `${name}.v`, unit: "V" }));
  const branches = new Map<string, number>();
  const branchNets: [number, number][] = [];
  for (const { name, kind, pins } of drivers) {
    const [first, second, third] = KINDS[kind].pins as [string, string, string?];
    branches.set(name, unknowns.length);
    unknowns.push({ name: third === undefined ? `${name}.i` : `${name}.out.i`, unit: "A" });
    const [from, to] = third === undefined ? [pins[first]!, pins[second]!] : [pins.out!, "ground"];
    branchNets.push([nets.get(from)!, nets.get(to)!]);
  }
  const terminals = new Map<string, Terminal>();
  for (const [i, end] of ends.entries()) {
    const { element, pin } = end;
    const net = nets.get(element.pins[pin]!)!;
    const inner = design.nets.length + i;
    terminals.set(`${element.name}.${pin}`, { ...end, net, inner, branch: unknowns.length });
    unknowns.push({ name: currentName(element, pin), unit: "A" });
    branchNets.push([net, inner]);
  }
  return { unknowns, size, nets, branches, terminals, branchNets };
}

/** Whether the current of an element is an unknown of its own. */
function hasBranch({ kind, law }: Element): boolean {
  return kind === "voltage" || kind === "opamp" || kind === "gain" || law?.quantity === "volts";
}

/** The number and sign with which the current into a pin is an unknown; null where it is none. */
export function branchAt(
  { branches, terminals }: Pick<Circuit, "branches" | "terminals">,
  { name, kind }: Element,
  pin: string,
): { readonly number: number; readonly sign: 1 | -1 } | null {
  const branch = branches.get(name);
  const terminal = terminals.get(`${name}.${pin}`);
  if (terminal !== undefined) return { number: terminal.branch, sign: 1 };
  if (branch === undefined) return null;
  const { pins } = KINDS[kind];
  if (pins.length === 2) return { number: branch, sign: pin === pins[0] ? 1 : -1 };
  return pin === "out" ? { number: branch, sign: 1 } : null;
}

/** The terminals of a design: resistances that are not a plain 0 Ω, and currents that laws read and no branch gives. */
function terminalsOf({
  elements,
  models,
  ...design
}: Design): Pick<Terminal, "element" | "pin" | "resistance">[] {
  const read = new Set(
    currentsRead({ ...design, elements, models }).map(({ element, pin }) => `${element}.${pin}`),
  );
  const modelOf = new Map(models.map((model) => [model.name, model]));
  const found: Pick<Terminal, "element" | "pin" | "resistance">[] = [];
  for (const element of elements) {
    const isDriver = hasBranch(element);
    for (const pin of KINDS[element.kind].pins) {
      const model = element.model === null ? null : modelOf.get(element.model)!;
      const resistance = model === null ? null : resistanceAt(model, pin);
      const isKnown = isDriver && (KINDS[element.kind].pins.length === 2 || pin === "out");
      const isRead = !isKnown && read.has(`${element.name}.${pin}`);
      if (resistance !== null || isRead) found.push({ element, pin, resistance });
    }
  }
  return found;
}

/** The terminal resistance of a model's pin, where the model gives one other than a plain 0 without tolerance. */
function resistanceAt({ kind, params }: Model, pin: string): string | null {
  const name = kind === "npn" || kind === "pnp" ? RESISTANCES[pin]! : null;
  const given = name === null ? undefined : params.get(name);
  if (given === undefined) return null;
  const isWire = given.tolerance === null && given.value.op === "constant" && given.value.value === 0;
  return isWire ? null : name;
}

function currentName({ name, kind }: Element, pin: string): string {
  const { pins } = KINDS[kind];
  return pins.length === 2 && pin === pins[0] ? `${name}.i` : `${name}.${pin}.i`;
}
