import type { Checked } from "../checker";
import { FUNCTIONS } from "../functions";
import { KINDS, MODEL_KINDS } from "../kinds";
import { REDUCTIONS } from "../reductions";
import type { Library } from "../shelves";
import { FILE_STATEMENTS } from "../token";
import { clausesAfter } from "./clause-completion";
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
import * as snippets from "./snippets";
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
    | "new net"
    | SymbolMeaning;
  /** One line about it. */
  readonly about: string;
  /** What is put in where that is more than `text`, with places to fill; see snippets.ts. */
  readonly snippet?: string;
  /** Another way to write it, by which it is found too. */
  readonly spelled?: string;
  readonly from: number;
  readonly to: number;
}

type Offer = Pick<Completion, "text" | "what" | "about" | "snippet" | "spelled">;

/** What can be written at an offset, that fits what is begun there, in an order for a list. Works with a text that has errors. */
export function completeAt(
  text: string,
  { netlist }: Pick<Checked, "netlist">,
  offset: number,
  library: Library | null = null,
): Completion[] {
  const standing = standingAt(text, offset);
  if (standing === null) return [];
  const scope = symbolsOf(netlist, text, library).file.at(offset);
  const begun = standing.begun.toLowerCase();
  return offers(standing, scope)
    .filter(({ text: one, spelled }) =>
      [one, spelled ?? one].some((way) => way.toLowerCase().startsWith(begun)),
    )
    .map((offer) => ({ ...offer, ...newNet(offer, scope, standing), from: standing.from, to: offset }));
}

/**
 * The word that is being written is a net of its own as far as the text says. It stays in the list, so that `n1` can be written where
 * there is an `n10`.
 */
function newNet({ text }: Offer, scope: NameScope, { from }: Standing): Pick<Offer, "what" | "about"> | null {
  const symbol = scope.find(text);
  const isNew = symbol?.meaning === "net" && symbol.places.length === 1 && symbol.places[0]!.from === from;
  return isNew ? { what: "new net", about: "a net that is not named elsewhere yet" } : null;
}

function offers(standing: Standing, scope: NameScope): Offer[] {
  const { before, statement, braces } = standing;
  const last = before.at(-1);
  const symbols = (...wanted: SymbolMeaning[]) => symbolOffers(scope.seen(), wanted);
  if (last === undefined) return [...statements(scope), ...symbols("net")];
  if (last.kind === "number") return [...afterNumber(standing, scope), ...units(standing.begun)];
  const texts = before.map((token) => token.text);
  if (last.text === ":") return kinds(statement, texts.includes("--"), scope);
  if (last.text === ".") return members(texts, scope);
  if (last.text === "--") return symbols("net");
  const isOpening = last.text === "{" || last.text === ",";
  if (braces !== null && isOpening) return settings(braces, scope, statement === "model");
  if (braces !== null && last.text === "=" && isPin(braces.of, texts.at(-2)!, scope)) return symbols("net");
  if (statement === "sweep" && before.length === 1) return symbols("knob");
  if (last.text === "for" || last.text === "at") return symbols("knob");
  if (last.text === "track") return groups(scope);
  if (statement === "model" && braces === null) return [];
  if (isOperand(last.kind, last.text) && before.length > 1) return clauses(standing, scope);
  if (before.length === 1 && ["title", "use", "block", "let", "knob", "read"].includes(statement)) return [];
  return [...values(scope, statement), ...functions(statement)];
}

/** A bare number may be a count, which clauses follow; with letters begun behind it, it is a quantity. */
function afterNumber(standing: Standing, scope: NameScope): Offer[] {
  const counts = ["sweep", "draws", "use", "require", "let", "knob"].includes(standing.statement);
  return counts && standing.before.length > 1 ? clauses(standing, scope) : [];
}

function units(begun: string): Offer[] {
  return unitsLike(begun).map((unit) => ({ ...unit, what: "unit" }));
}

function groups(scope: NameScope): Offer[] {
  return symbolOffers(scope.groups.values(), ["group"]);
}

function statements(scope: NameScope): Offer[] {
  return Object.entries(STATEMENT_MEANINGS)
    .filter(([word]) => scope.parent === null || !FILE_STATEMENTS.has(word))
    .map(([word, about]) => {
      return { text: word, what: "statement", about, snippet: snippets.statementSnippet(word, scope) };
    });
}

function symbolOffers(all: Iterable<NamedSymbol>, wanted: readonly SymbolMeaning[]): Offer[] {
  return [...all]
    .filter(({ meaning }) => wanted.includes(meaning) || (meaning === "port" && wanted.includes("net")))
    .map((one) => ({ text: one.name, what: one.meaning, about: describeSymbol(one).join("; ") }));
}

/** What can follow a colon: on a path what has two pins, else what is wired by name, first what the file declares itself. */
function kinds(statement: string, isPath: boolean, scope: NameScope): Offer[] {
  if (statement === "model") {
    return MODEL_KINDS.map((kind) => {
      return { text: kind, what: "kind", about: KINDS[kind].about, snippet: snippets.modelSnippet(kind) };
    });
  }
  const declared = symbolOffers(scope.seen(), ["model", "block"]);
  const own = Object.entries(KINDS).map(([kind, { about }]) => ({
    text: kind,
    what: "kind" as const,
    about,
  }));
  const snippet = isPath ? snippets.pathSnippet : snippets.deviceSnippet;
  return [...declared, ...own]
    .filter(({ text, what }) => what !== "kind" || isPath || ["gain", "law"].includes(text))
    .filter(({ text }) => !isPath || !snippets.hasManyPins(text, scope))
    .map((offer) => ({ ...offer, snippet: snippet(offer.text, scope) }));
}

/** What can follow a dot: `before` ends with it. */
function members(before: readonly string[], scope: NameScope): Offer[] {
  let start = before.length - 2;
  while (before[start - 1] === "." && start >= 2) start -= 2;
  let symbol: NamedSymbol | null = scope.find(before[start] ?? "");
  let at = start + 2;
  while (symbol?.meaning === "instance") {
    const block: NamedSymbol | null = symbol.scope.find(symbol.of ?? "");
    const inner: NameScope | null = block === null ? null : insideOf(block);
    if (inner === null) return [];
    if (at >= before.length) {
      return symbolOffers(inner.names.values(), ["net", "element", "instance", "knob", "let"]);
    }
    symbol = inner.names.get(before[at]!) ?? null;
    at += 2;
  }
  const signal = (name: "v" | "i" | "p"): Offer => ({
    text: name,
    what: "pin",
    about: SIGNAL_MEANINGS[name],
  });
  const isPin = symbol?.meaning === "port" && at > start + 2;
  if (isPin) return [signal("v"), signal("i")];
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
): Offer[] {
  const block = scope.find(of);
  const inner = block?.meaning === "block" ? insideOf(block) : null;
  const { pins, parameters } = bracesOf(of, scope, isModel);
  const knobs = [...(inner?.names.values() ?? [])].filter(({ meaning }) => meaning === "knob");
  const pin = (name: string, what: "pin" | "port", about: string): Offer => {
    return { text: name, what, about, snippet: snippets.pinSnippet(name) };
  };
  const all: Offer[] = [
    ...symbolOffers(inner?.names.values() ?? [], ["port"]).map(({ text, about }) => pin(text, "port", about)),
    ...knobs.map((one) => {
      const about = describeSymbol(one).join("; ");
      return { text: one.name, what: "knob" as const, about, snippet: snippets.knobSnippet(one) };
    }),
    ...pins.map((name) => pin(name, "pin", `pin ${name} of ${of}`)),
    ...Object.entries(parameters).map(([name, kind]) => {
      const snippet = snippets.parameterSnippet(name, kind);
      return { text: name, what: "parameter" as const, about: parameterLine(name, kind), snippet };
    }),
    ...lawSettings(of, given),
  ];
  return all.filter((offer) => !given.includes(offer.text));
}

/** A law has one of the two. */
function lawSettings(of: string, given: readonly string[]): Offer[] {
  if (of !== "law" || given.includes("volts") || given.includes("amps")) return [];
  return [
    {
      text: "volts",
      what: "parameter",
      about: "the voltage of plus above minus as an expression, in V",
      snippet: "volts = ",
    },
    {
      text: "amps",
      what: "parameter",
      about: "the current from plus to minus as an expression, in A",
      snippet: "amps = ",
    },
  ];
}

function isPin(of: string, name: string, scope: NameScope): boolean {
  const block = scope.find(of);
  const inner = block?.meaning === "block" ? insideOf(block) : null;
  if (inner !== null) return inner.names.get(name)?.meaning === "port";
  return bracesOf(of, scope, false).pins.includes(name);
}

/** Words of clauses that wait for nothing. */
const COMPLETE: ReadonlySet<string> = new Set(["rising", "falling", "uniform"]);

function isOperand(kind: string, text: string): boolean {
  if (kind === "unit" || kind === "string" || text === ")" || COMPLETE.has(text)) return true;
  return kind === "word" && !Object.hasOwn(CLAUSE_MEANINGS, text);
}

function clauses({ statement, before }: Standing, scope: NameScope): Offer[] {
  return clausesAfter(statement, before, scope).map((clause) => ({ ...clause, what: "clause" }));
}

function values(scope: NameScope, statement: string): Offer[] {
  const isContract = statement === "read" || statement === "require";
  const signals: SymbolMeaning[] = ["net", "element", "instance"];
  const wanted: SymbolMeaning[] = ["knob", "let"];
  if (["show", "read", "require", ""].includes(statement)) wanted.push(...signals);
  if (isContract) wanted.push("reading");
  const traces = isContract ? symbolOffers(scope.traces.values(), ["trace"]) : [];
  return [...traces, ...symbolOffers(scope.seen(), wanted)];
}

function functions(statement: string): Offer[] {
  const reductions = statement === "read" || statement === "require" ? Object.entries(REDUCTIONS) : [];
  const call = (name: string, about: string, least: number): Offer => {
    return { text: name, what: "function", about, snippet: snippets.callSnippet(name, least) };
  };
  return [
    ...reductions.map(([name, { about, values: least }]) => call(name, about, least)),
    ...Object.entries(FUNCTION_MEANINGS).map(([name, about]) =>
      call(name, about, FUNCTIONS[name as keyof typeof FUNCTIONS].least),
    ),
    ...Object.entries(CONSTANT_MEANINGS).map(([name, about]) => ({
      text: name,
      what: "constant" as const,
      about,
    })),
  ];
}
