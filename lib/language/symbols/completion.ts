import type { Checked } from "../checker";
import { KINDS, MODEL_KINDS } from "../kinds";
import { REDUCTIONS } from "../reductions";
import { FILE_STATEMENTS } from "../token";
import { insideOf } from "./declare";
import { describeSymbol } from "./describe";
import {
  CLAUSE_MEANINGS,
  CONSTANT_MEANINGS,
  FUNCTION_MEANINGS,
  SIGNAL_MEANINGS,
  STATEMENT_MEANINGS,
} from "./meanings";
import { bracesOf, parameterLine } from "./settings";
import { type Standing, standingAt } from "./standing";
import type { NamedSymbol, NameScope, SymbolMeaning } from "./symbol";
import { symbolsOf } from "./symbols";
import { unitsLike } from "./unit-completion";

/** Something that can be written at a cursor: put `text` over [from, to). */
export interface Completion {
  readonly text: string;
  readonly what:
    | "statement"
    | "clause"
    | "kind"
    | "pin"
    | "parameter"
    | "unit"
    | "function"
    | "constant"
    | SymbolMeaning;
  /** One line about it. */
  readonly about: string;
  readonly from: number;
  readonly to: number;
}

type Offer = Pick<Completion, "text" | "what" | "about">;

/** Clause words of each statement, for where a value has just ended. */
const CLAUSES: Readonly<Record<string, readonly string[]>> = {
  let: ["uniform", "normal", "track"],
  knob: ["in", "uniform", "normal", "track"],
  sweep: ["from", "over"],
  draws: ["seed"],
  use: ["revision"],
  read: ["for", "at"],
  require: ["within", "between", "rising", "falling", "for", "at", "in", "as"],
};

/** What can be written at an offset, that fits what is begun there, in an order for a list. Works with a text that has errors. */
export function completeAt(text: string, checked: Checked, offset: number): Completion[] {
  const standing = standingAt(text, offset);
  if (standing === null) return [];
  const scope = symbolsOf(checked.netlist, text).file.at(offset);
  const begun = standing.begun.toLowerCase();
  return offers(standing, scope, text)
    .filter((offer) => offer.text.toLowerCase().startsWith(begun))
    .map((offer) => ({ ...offer, from: standing.from, to: offset }));
}

function offers(standing: Standing, scope: NameScope, text: string): Offer[] {
  const { before, statement, braces } = standing;
  const last = before.at(-1);
  const symbols = (...wanted: SymbolMeaning[]) => symbolOffers(scope.seen(), wanted, text);
  if (last === undefined) return [...statements(scope), ...symbols("net")];
  if (last.kind === "number") return unitsLike(standing.begun).map((unit) => ({ ...unit, what: "unit" }));
  if (last.text === ":") return kinds(statement, scope, text);
  if (last.text === ".")
    return members(
      before.map((token) => token.text),
      scope,
      text,
    );
  if (last.text === "--") return symbols("net");
  const isOpening = last.text === "{" || last.text === ",";
  if (braces !== null && isOpening) return settings(braces, scope, statement === "model", text);
  if (braces !== null && last.text === "=" && isPin(braces.of, before.at(-2)!.text, scope))
    return symbols("net");
  if (statement === "sweep" && before.length === 1) return symbols("knob");
  if (last.text === "for" || last.text === "at") return symbols("knob");
  if (statement === "model" && braces === null) return [];
  if (isOperand(last.kind, last.text) && before.length > 1) return clauses(statement);
  if (before.length === 1 && ["title", "use", "block", "let", "knob", "read"].includes(statement)) return [];
  return [...values(scope, statement, text), ...functions(statement)];
}

function statements(scope: NameScope): Offer[] {
  return Object.entries(STATEMENT_MEANINGS)
    .filter(([word]) => scope.parent === null || !FILE_STATEMENTS.has(word))
    .map(([word, about]) => ({ text: word, what: "statement", about }));
}

function symbolOffers(all: Iterable<NamedSymbol>, wanted: readonly SymbolMeaning[], text: string): Offer[] {
  return [...all]
    .filter(({ meaning }) => wanted.includes(meaning) || (meaning === "port" && wanted.includes("net")))
    .map((one) => ({ text: one.name, what: one.meaning, about: describeSymbol(one, text)[0]! }));
}

function kinds(statement: string, scope: NameScope, text: string): Offer[] {
  const names = statement === "model" ? MODEL_KINDS : Object.keys(KINDS);
  const own = names.map((kind) => {
    return { text: kind, what: "kind" as const, about: KINDS[kind as keyof typeof KINDS].about };
  });
  return statement === "model" ? own : [...symbolOffers(scope.seen(), ["model", "block"], text), ...own];
}

/** What can follow a dot: `before` ends with it. */
function members(before: readonly string[], scope: NameScope, text: string): Offer[] {
  let start = before.length - 2;
  while (before[start - 1] === "." && start >= 2) start -= 2;
  let symbol: NamedSymbol | null = scope.find(before[start] ?? "");
  let at = start + 2;
  while (symbol?.meaning === "instance") {
    const block: NamedSymbol | null = symbol.scope.find(symbol.of ?? "");
    const inner: NameScope | null = block === null ? null : insideOf(block);
    if (inner === null) return [];
    if (at >= before.length) {
      return symbolOffers(inner.names.values(), ["net", "element", "instance", "knob", "let"], text);
    }
    symbol = inner.names.get(before[at]!) ?? null;
    at += 2;
  }
  const signal = (name: "v" | "i" | "p"): Offer => ({
    text: name,
    what: "pin",
    about: SIGNAL_MEANINGS[name],
  });
  if (symbol?.meaning === "net" || symbol?.meaning === "port") return [signal("v")];
  if (symbol?.meaning !== "element") return [];
  if (at < before.length) return [signal("i")];
  const { pins } = bracesOf(symbol.of ?? "", symbol.scope, false);
  if (pins.length === 2) return [signal("v"), signal("i"), signal("p")];
  return pins.map((pin) => ({ text: pin, what: "pin", about: `pin ${pin} of ${symbol.of}` }));
}

function settings(
  { of, given }: NonNullable<Standing["braces"]>,
  scope: NameScope,
  isModel: boolean,
  text: string,
): Offer[] {
  const block = scope.find(of);
  const inner = block?.meaning === "block" ? insideOf(block) : null;
  const { pins, parameters } = bracesOf(of, scope, isModel);
  const all: Offer[] = [
    ...symbolOffers(inner?.names.values() ?? [], ["port", "knob"], text),
    ...pins.map((pin) => ({ text: pin, what: "pin" as const, about: `pin ${pin} of ${of}` })),
    ...Object.entries(parameters).map(([name, kind]) => {
      return { text: name, what: "parameter" as const, about: parameterLine(name, kind) };
    }),
  ];
  return all.filter((offer) => !given.includes(offer.text));
}

function isPin(of: string, name: string, scope: NameScope): boolean {
  const block = scope.find(of);
  const inner = block?.meaning === "block" ? insideOf(block) : null;
  if (inner !== null) return inner.names.get(name)?.meaning === "port";
  return bracesOf(of, scope, false).pins.includes(name);
}

function isOperand(kind: string, text: string): boolean {
  return kind === "unit" || text === ")" || (kind === "word" && !Object.hasOwn(CLAUSE_MEANINGS, text));
}

function clauses(statement: string): Offer[] {
  return (CLAUSES[statement] ?? []).map((word) => ({
    text: word,
    what: "clause",
    about: CLAUSE_MEANINGS[word]!,
  }));
}

function values(scope: NameScope, statement: string, text: string): Offer[] {
  const isContract = statement === "read" || statement === "require";
  const signals: SymbolMeaning[] = ["net", "element", "instance"];
  const wanted: SymbolMeaning[] = ["knob", "let"];
  if (["show", "read", "require", ""].includes(statement)) wanted.push(...signals);
  if (isContract) wanted.push("reading");
  const traces = isContract ? symbolOffers(scope.traces.values(), ["trace"], text) : [];
  return [...traces, ...symbolOffers(scope.seen(), wanted, text)];
}

function functions(statement: string): Offer[] {
  const reductions = statement === "read" || statement === "require" ? Object.entries(REDUCTIONS) : [];
  return [
    ...reductions.map(([name, { about }]) => ({ text: name, what: "function" as const, about })),
    ...Object.entries(FUNCTION_MEANINGS).map(([name, about]) => ({
      text: name,
      what: "function" as const,
      about,
    })),
    ...Object.entries(CONSTANT_MEANINGS).map(([name, about]) => ({
      text: name,
      what: "constant" as const,
      about,
    })),
  ];
}
