import { type CheckOptions, check } from "../checker";
import { FUNCTION_NAMES } from "../functions";
import { tokenize } from "../lexer";
import { Report } from "../report";
import { isKind } from "../scope";
import type { Span } from "../span";
import { CONSTANTS, quote, STATEMENT_WORDS } from "../token";
import type { NamedSymbol, NameScope, SymbolMeaning } from "./symbol";
import { symbolsOf } from "./symbols";

/** Put `text` over [from, to). */
export interface Edit extends Span {
  readonly text: string;
}

/** The edits, in the order of the text, or one sentence on why there are none. */
export type Renaming = { readonly edits: readonly Edit[] } | { readonly refusal: string };

/**
 * Gives the name at an offset another one, wherever it is written. Refused where the new name is none, is taken where it would be
 * seen, or would bring in a problem that the text has not now.
 */
export function renameAt(text: string, offset: number, name: string, options: CheckOptions = {}): Renaming {
  const checked = check(text, options);
  const symbols = symbolsOf(checked.netlist, text, options.library);
  const symbol = symbols.at(offset)?.symbol;
  if (symbol === undefined) return { refusal: "There is no name here." };
  if (symbol.definition === null || symbol.name === "temperature") {
    return { refusal: `${quote(symbol.name)} belongs to the language and keeps its name.` };
  }
  const { shelf } = symbol.scope;
  if (shelf !== null) {
    return { refusal: `${quote(symbol.name)} comes from the shelf "${shelf.name}"; rename it there.` };
  }
  const refusal = refusalOf(symbol, name);
  if (refusal !== null) return { refusal };
  const edits = symbol.places.map(({ from, to }) => ({ from, to, text: name }));
  const errors = (all: readonly { severity: string }[]) =>
    all.filter((one) => one.severity === "error").length;
  if (errors(check(applied(text, edits), options).diagnostics) > errors(checked.diagnostics)) {
    return { refusal: `With the name ${quote(name)} the netlist would have a new problem.` };
  }
  return { edits };
}

function refusalOf(symbol: NamedSymbol, name: string): string | null {
  const tokens = tokenize(name, new Report());
  if (tokens.length !== 1 || tokens[0]!.kind !== "word" || tokens[0]!.text !== name) {
    return "A name is made of letters, digits and `_`, and does not begin with a digit.";
  }
  if (name === symbol.name) return "That is its name already.";
  const isWord = [STATEMENT_WORDS, CONSTANTS, FUNCTION_NAMES].some((words) => words.has(name));
  if (isWord || isKind(name) || name === "ground" || name === "temperature") {
    return `${quote(name)} is a word of the language.`;
  }
  const taken = symbol.meaning === "group" ? symbol.scope.groups.get(name) : takenBy(symbol, name);
  return taken === undefined ? null : `${quote(name)} is taken: it is ${ARTICLES[taken.meaning]} already.`;
}

const ARTICLES: Readonly<Record<SymbolMeaning, string>> = {
  net: "a net",
  port: "a net of a block",
  element: "an element",
  instance: "an instance of a block",
  knob: "a knob",
  let: "a value",
  model: "a model",
  block: "a block",
  trace: "a trace",
  reading: "a reading",
  group: "a group",
};

/** What has a name where the symbol is seen, or in a scope around it. */
function takenBy({ scope, meaning }: NamedSymbol, name: string): NamedSymbol | undefined {
  const around: NameScope[] = [...scope.all()];
  for (let one = scope.parent; one !== null; one = one.parent) around.push(one);
  for (const one of around) {
    const found = one.names.get(name) ?? (meaning === "net" ? undefined : one.traces.get(name));
    if (found !== undefined) return found;
  }
  return undefined;
}

/** A text with edits made, which stand in its order and do not overlap. */
export function applied(text: string, edits: readonly Edit[]): string {
  let at = 0;
  const parts: string[] = [];
  for (const { from, to, text: put } of edits) {
    parts.push(text.slice(at, from), put);
    at = to;
  }
  return parts.join("") + text.slice(at);
}
