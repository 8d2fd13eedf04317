import { KINDS, type ParameterKind } from "../kinds";
import { isKind } from "../scope";
import { insideOf, portsOf } from "./declare";
import { bracesOf } from "./settings";
import type { NamedSymbol, NameScope } from "./symbol";

/*
 * What a completion puts in beyond its word. `‹text›` are the places to fill, in their order, an empty one at the end is where the
 * cursor comes to rest; with the texts that stand in the places it can be read without a mistake of form, names or units.
 */

/** The whole of a statement from its word. */
export function statementSnippet(word: string, scope: NameScope): string {
  switch (word) {
    case "title":
      return 'title "‹Name›"';
    case "use":
      return 'use "‹shelf›" revision ‹1›';
    case "let":
      return "let ‹name› = ‹1 kΩ›";
    case "knob":
      return "knob ‹name› = ‹1 µA›";
    case "model":
      return "model ‹name› : ‹npn› { ‹Is = 1 fA› }";
    case "block":
      return "block ‹name›(‹in, out›) {\n  ‹›\n}";
    case "sweep":
      return "sweep ‹temperature› from ‹10 °C› to ‹40 °C›, ‹4 points›";
    case "draws":
      return "draws ‹100› seed ‹1›";
    case "seek":
      return "seek ‹2›";
    case "show":
      return `show ‹${first(scope.names.values(), "net", "ground")}›.v`;
    case "read":
      return `read ‹name› = highest(‹${first(scope.traces.values(), "trace", "trace")}›)`;
    case "require":
      return `require ‹${first(scope.traces.values(), "trace", "trace")}› ‹rising› as "‹label›"`;
    default:
      return word;
  }
}

/** What follows the colon of a model. */
export function modelSnippet(kind: string): string {
  const asked = isKind(kind)
    ? Object.entries(KINDS[kind].parameters).filter(([, one]) => one.absent === null)
    : [];
  if (asked.length === 0) return `${kind} { ‹› }`;
  const settings = asked.map(([name, one]) => `${name} = ‹${standard(name, one)}›`);
  return `${kind} { ${settings.join(", ")} }`;
}

/** A kind on a path, where its pins are what stands to its left and right. */
export function pathSnippet(of: string, scope: NameScope): string {
  if (!isKind(of)) return of;
  const { follows, value } = KINDS[of];
  if (follows === "law") return `${of} { volts = ‹1 V› }`;
  if (value !== null) return `${of} ‹${value.unit === "Ω" ? "10 kΩ" : `1 ${value.unit}`}›`;
  const model = [...scope.seen()].find((one) => one.meaning === "model" && one.of === of);
  return model === undefined ? of : `${of} ${model.name}`;
}

/** What follows the colon of an element that is wired by named pins; a pin is joined to a net of its own name to begin with. */
export function deviceSnippet(of: string, scope: NameScope): string {
  const block = scope.find(of);
  const pins = block?.meaning === "block" ? portsOf(block) : bracesOf(of, scope, false).pins;
  if (pins.length === 0) return of;
  const settings = pins.map((pin) => `${pin} = ‹${pin}›`);
  if (of === "law") settings.push("volts = ‹1 V›");
  if (of === "gain") settings.push("ratio = ‹10›");
  return `${of} { ${settings.join(", ")} }`;
}

/** A pin with the cursor where its net stands. */
export function pinSnippet(pin: string): string {
  return `${pin} = `;
}

/** A parameter with its default, or else one of its unit. */
export function parameterSnippet(name: string, kind: ParameterKind): string {
  return `${name} = ‹${standard(name, kind)}›`;
}

/** A knob of a block as an instance sets it, with the default of the block. */
export function knobSnippet({ name, statement, scope }: NamedSymbol): string {
  if (statement?.kind !== "knob") return `${name} = `;
  const { from, to } = statement.value;
  return `${name} = ‹${scope.text.slice(from, to)}›`;
}

/** A function with the places of its values. */
export function callSnippet(name: string, least: number): string {
  if (name === "at") return "at(‹›, ‹temperature› = ‹25 °C›)";
  if (name === "if") return "if(‹1 < 2›, ‹1›, ‹0›)";
  return `${name}(${Array(least).fill("‹›").join(", ")})`;
}

/** Whether an element that follows this is wired by named pins alone. */
export function hasManyPins(of: string, scope: NameScope): boolean {
  const block = scope.find(of);
  if (block?.meaning === "block") return insideOf(block) !== null;
  return bracesOf(of, scope, false).pins.length > 2;
}

function standard(name: string, { absent, unit }: ParameterKind): string {
  if (name === "Is" || name.startsWith("I_leak")) return "1 fA";
  if (absent !== null && /^[\d.]/.test(absent)) return absent;
  return unit === "1" ? "1" : `1 ${unit}`;
}

function first(symbols: Iterable<NamedSymbol>, meaning: NamedSymbol["meaning"], otherwise: string): string {
  for (const one of symbols) if (one.meaning === meaning && one.definition !== null) return one.name;
  return otherwise;
}
