import { KINDS } from "../kinds";
import { parse } from "../parser";
import { isKind } from "../scope";
import type { Library } from "../shelves";
import type { Span } from "../span";
import type { Netlist, Statement, Word } from "../syntax";
import { type NamedSymbol, NameScope, type Shelf, type SymbolMeaning } from "./symbol";

/** Shelves within shelves that are looked into. */
const MOST_SHELF_DEPTH = 8;

/**
 * The scopes of a netlist with everything that it declares, before any reference is followed. Models and blocks of shelves are
 * among the names of the file where `library` has their text.
 */
export function declareScopes(netlist: Netlist, text: string, library: Library | null = null): NameScope {
  return declareFile(netlist, text, { library, shelf: null, depth: 0 });
}

interface Around {
  readonly library: Library | null;
  readonly shelf: Shelf | null;
  readonly depth: number;
}

function declareFile({ statements }: Netlist, text: string, around: Around): NameScope {
  const file = new NameScope({ from: 0, to: text.length }, null, text, around.shelf);
  file.names.set("ground", builtIn("ground", "net", file));
  const imported = around.depth < MOST_SHELF_DEPTH ? statements.flatMap((one) => bring(one, around)) : [];
  // The blocks of the file may be wired inside with what shelves bring, so that comes first; own names then take their place.
  for (const one of imported) if (!declares(statements, one.name)) file.names.set(one.name, one);
  fill(file, statements);
  if (!file.names.has("temperature")) file.names.set("temperature", builtIn("temperature", "knob", file));
  return file;
}

function declares(statements: readonly Statement[], name: string): boolean {
  return statements.some((one) => (one.kind === "model" || one.kind === "block") && one.name.text === name);
}

/** The models and blocks that a `use` statement brings in; those of the shelves that the shelf uses are among them. */
function bring(
  statement: Statement,
  { library, shelf, depth }: Around,
): (NamedSymbol & { places: Span[] })[] {
  if (statement.kind !== "use" || library === null) return [];
  const { revision } = statement;
  const text = library(statement.shelf.text, revision?.kind === "number" ? revision.value : null);
  if (text === null) return [];
  const span = shelf?.span ?? { from: statement.shelf.from, to: statement.shelf.to };
  const inner = { library, shelf: { name: statement.shelf.text, span }, depth: depth + 1 };
  const names = [...declareFile(parse(text).netlist, text, inner).names.values()];
  return names.filter(({ meaning }) => meaning === "model" || meaning === "block");
}

function builtIn(name: string, meaning: SymbolMeaning, scope: NameScope): NamedSymbol & { places: Span[] } {
  return { name, meaning, definition: null, statement: null, of: null, scope, places: [] };
}

function fill(scope: NameScope, statements: readonly Statement[]): void {
  const set = (word: Word, meaning: SymbolMeaning, statement: Statement, of: string | null = null): void => {
    const names = meaning === "trace" ? scope.traces : scope.names;
    if (word.text === "" || names.has(word.text)) return;
    const definition = { from: word.from, to: word.to };
    names.set(word.text, { name: word.text, meaning, definition, statement, of, scope, places: [] });
  };
  for (const statement of statements) {
    switch (statement.kind) {
      case "let":
      case "knob":
        set(statement.name, statement.kind, statement);
        break;
      case "read":
        set(statement.name, "reading", statement);
        break;
      case "model":
        set(statement.name, "model", statement, statement.of.text);
        break;
      case "block":
        set(statement.name, "block", statement);
        break;
      case "path":
        for (const { name, kind } of statement.parts) set(name, "element", statement, kind.text);
        break;
      case "show":
        for (const { name } of statement.items) if (name !== null) set(name, "trace", statement);
        break;
    }
  }
  for (const statement of statements) {
    if (statement.kind === "device") {
      const isBlock = scope.find(statement.of.text)?.meaning === "block";
      set(statement.name, isBlock ? "instance" : "element", statement, statement.of.text);
    }
    if (statement.kind !== "block") continue;
    const span = { from: statement.from, to: statement.to };
    const inner = new NameScope(span, scope, scope.text, scope.shelf);
    for (const port of statement.ports) {
      const definition = { from: port.from, to: port.to };
      const symbol = { name: port.text, meaning: "port", definition, statement, of: null } as const;
      inner.names.set(port.text, { ...symbol, scope: inner, places: [] });
    }
    fill(inner, statement.statements);
  }
  nets(scope, statements, set);
}

/** Nets are declared by their first use, after everything else has taken its name. */
function nets(
  scope: NameScope,
  statements: readonly Statement[],
  set: (word: Word, meaning: SymbolMeaning, statement: Statement) => void,
): void {
  const net = (word: Word, statement: Statement): void => {
    if (scope.find(word.text)?.meaning !== "net") set(word, "net", statement);
  };
  for (const statement of statements) {
    if (statement.kind === "path") for (const word of statement.nets) net(word, statement);
    if (statement.kind !== "device") continue;
    const pins = pinsOf(statement.of.text, scope);
    for (const { name, value } of statement.settings) {
      if (pins.includes(name.text) && value.kind === "name" && value.path.length === 1) {
        net(value.path[0]!, statement);
      }
    }
  }
}

/** The group of tolerances that a name means, declared by its first use. Each instance of a block has groups of its own. */
export function groupNamed(word: Word, scope: NameScope): NamedSymbol & { places: Span[] } {
  const known = scope.groups.get(word.text);
  if (known !== undefined) return known;
  const definition = { from: word.from, to: word.to };
  const group = { name: word.text, meaning: "group", definition, statement: null, of: null } as const;
  const symbol = { ...group, scope, places: [] };
  scope.groups.set(word.text, symbol);
  return symbol;
}

/** The pins of a kind or model, or the nets of a block. */
export function pinsOf(of: string, scope: NameScope): readonly string[] {
  const symbol = scope.find(of);
  if (symbol?.meaning === "block") return portsOf(symbol);
  const kind = symbol?.meaning === "model" ? (symbol.of ?? "") : of;
  return isKind(kind) ? KINDS[kind].pins : [];
}

export function portsOf({ statement }: NamedSymbol): readonly string[] {
  return statement?.kind === "block" ? statement.ports.map(({ text }) => text) : [];
}

/** The scope inside a block. */
export function insideOf(block: NamedSymbol): NameScope | null {
  const { statement, scope } = block;
  return scope.inner.find(({ span }) => span.from === statement?.from && span.to === statement.to) ?? null;
}
