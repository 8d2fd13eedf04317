import type { Design, Element, Typed } from "@/lib/language/ast";
import { elementsOf, netsSensed } from "./wiring-laws";

export const GROUND = 0;

/** A pin of an element on a net. */
export interface Connection {
  readonly element: Element;
  readonly pin: string;
}

/** The design as the wiring checks see it: nets by number, ground being 0. */
export interface Wiring {
  readonly design: Design;
  /** Names by number. */
  readonly nets: readonly string[];
  readonly connections: readonly (readonly Connection[])[];
  /** Numbers of the nets whose voltage a trace reads. */
  readonly shown: ReadonlySet<number>;
  /** Numbers of the nets that laws read. */
  readonly sensed: ReadonlySet<number>;
  /** The number of the net at a pin. */
  net(element: Element, pin: string): number;
}

/** Amplifiers whose model has no gain: their inputs have no difference and their output current is free. */
export function idealAmplifiers(design: Design): ReadonlySet<Element> {
  const ideal = new Set(
    design.models.filter((model) => !model.params.has("gain")).map((model) => model.name),
  );
  return new Set(design.elements.filter((element) => element.kind === "opamp" && ideal.has(element.model!)));
}

export function wiringOf(design: Design): Wiring {
  const nets = ["ground", ...design.nets];
  const numbers = new Map(nets.map((name, i) => [name, i]));
  const connections: Connection[][] = nets.map(() => []);
  const net = (element: Element, pin: string): number => numbers.get(element.pins[pin]!)!;
  for (const element of design.elements) {
    for (const pin of Object.keys(element.pins)) connections[net(element, pin)]!.push({ element, pin });
  }
  const shown = new Set<number>();
  for (const show of design.shows) {
    for (const name of netsRead(show.value)) shown.add(numbers.get(name)!);
  }
  const named = elementsOf(design);
  const sensed = new Set(
    design.elements.flatMap((element) => netsSensed(element, named)).map((name) => numbers.get(name)!),
  );
  return { design, nets, connections, shown, sensed, net };
}

function netsRead(typed: Typed): string[] {
  switch (typed.op) {
    case "signal":
      return typed.signal.of === "net" ? [typed.signal.net] : [];
    case "negate":
      return netsRead(typed.operand);
    case "call":
    case "reduce":
      return typed.args.flatMap(netsRead);
    case "constant":
    case "knob":
    case "let":
    case "thermal voltage":
    case "trace":
    case "reading":
      return [];
    default:
      return [...netsRead(typed.left), ...netsRead(typed.right)];
  }
}

/** "`a`, `b` and 3 more": names in a sentence. */
export function list(names: readonly string[]): string {
  const quoted = names.map((name) => `\`${name.length > 40 ? `${name.slice(0, 37)}…` : name}\``);
  if (quoted.length === 1) return quoted[0]!;
  if (quoted.length > 5) return `${quoted.slice(0, 4).join(", ")} and ${quoted.length - 4} more`;
  return `${quoted.slice(0, -1).join(", ")} and ${quoted[quoted.length - 1]}`;
}
