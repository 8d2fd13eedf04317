import { KINDS } from "../kinds";
import { isKind } from "../scope";
import type { Span } from "../span";
import type { Netlist, Statement, Word } from "../syntax";
import { type NamedSymbol, NameScope, type SymbolMeaning } from "./symbol";

/** The scopes of a netlist with everything that it declares, before any reference is followed. */
export function declareScopes(netlist: Netlist, length: number): NameScope {
  const file = new NameScope({ from: 0, to: length }, null);
  file.names.set("ground", builtIn("ground", "net", file));
  fill(file, netlist.statements);
  if (!file.names.has("temperature")) file.names.set("temperature", builtIn("temperature", "knob", file));
  return file;
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
    const inner = new NameScope({ from: statement.from, to: statement.to }, scope);
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
