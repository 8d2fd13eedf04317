import { KINDS } from "../kinds";
import { isKind } from "../scope";
import type { Statement } from "../syntax";
import { insideOf, portsOf } from "./declare";
import type { NamedSymbol, NameScope } from "./symbol";

/** Elements named for a net at most. */
const MOST_NAMED = 8;

/** What a symbol is, in a line or two, from the text alone. */
export function describeSymbol(symbol: NamedSymbol): string[] {
  const { shelf } = symbol.scope;
  const lines = linesOf(symbol);
  return shelf === null || symbol.definition === null ? lines : [...lines, `from the shelf "${shelf.name}"`];
}

function linesOf(symbol: NamedSymbol): string[] {
  const { name, meaning, of, scope } = symbol;
  switch (meaning) {
    case "knob":
      return [
        symbol.definition === null
          ? "temperature: the ambient of the file, 25 °C"
          : `knob ${name}${given(symbol)}`,
      ];
    case "let":
      return [`let ${name}${given(symbol)}`];
    case "model":
      return [`model ${name}: ${kindLine(of)}`];
    case "element": {
      const model = scope.find(of ?? "");
      const kind = model?.meaning === "model" ? `${of}, ${kindLine(model.of)}` : kindLine(of);
      return [`element ${name}: ${kind}`];
    }
    case "block": {
      const knobs = [...(insideOf(symbol)?.names.values() ?? [])].filter((one) => one.meaning === "knob");
      const line = `block ${name}(${portsOf(symbol).join(", ")})`;
      return knobs.length === 0 ? [line] : [line, `knobs: ${knobs.map((one) => one.name).join(", ")}`];
    }
    case "instance": {
      const block = scope.find(of ?? "");
      return [`${name}: an instance of ${of}(${block === null ? "" : portsOf(block).join(", ")})`];
    }
    case "port":
      return [`net ${name} of the block, joined to a net outside`];
    case "net":
      return name === "ground" ? ["ground: the net that voltages are counted from"] : [netLine(symbol)];
    case "trace":
      return [`trace ${name}${shown(symbol)}`];
    case "group":
      return [groupLine(symbol)];
    case "reading":
      return [`reading ${name}${given(symbol)}`];
  }
}

function groupLine({ name, places }: NamedSymbol): string {
  const many = places.length === 1 ? "one value follows it so far" : `${places.length} values follow it`;
  return `group ${name}: what tracks with it shares one draw; ${many}`;
}

function kindLine(kind: string | null): string {
  return kind !== null && isKind(kind) ? `${kind}, ${KINDS[kind].about}` : (kind ?? "");
}

/** ` = value ± tolerance` as it is written. */
function given({ statement, scope }: NamedSymbol): string {
  if (statement?.kind !== "let" && statement?.kind !== "knob" && statement?.kind !== "read") return "";
  const { value, to } = statement;
  return ` = ${scope.text.slice(value.from, statement.kind === "read" ? value.to : to).replace(/\s+/gu, " ")}`;
}

function shown({ statement, name, scope }: NamedSymbol): string {
  const item =
    statement?.kind === "show" ? statement.items.find((one) => one.name?.text === name) : undefined;
  if (item === undefined) return "";
  return ` = ${scope.text.slice(item.value.from, item.value.to).replace(/\s+/gu, " ")}`;
}

function netLine({ name, scope, places }: NamedSymbol): string {
  const named = wiringOf(scope).get(name) ?? [];
  const list = named.slice(0, MOST_NAMED).join(", ") + (named.length > MOST_NAMED ? " and more" : "");
  return named.length === 0 ? `net ${name}, named ${places.length} times` : `net ${name}, wired to ${list}`;
}

/** What each net of a scope is wired to, in the order of the text; found once for all nets, since lists of completions tell of all. */
const wirings = new WeakMap<NameScope, ReadonlyMap<string, readonly string[]>>();

function wiringOf(scope: NameScope): ReadonlyMap<string, readonly string[]> {
  const known = wirings.get(scope);
  if (known !== undefined) return known;
  const statements = [...scope.names.values()].flatMap(({ statement }) =>
    statement === null ? [] : [statement],
  );
  const wiring = new Map<string, string[]>();
  for (const statement of [...new Set(statements)].sort((a, b) => a.from - b.from)) {
    for (const [net, end] of wiresOf(statement)) {
      const ends = wiring.get(net);
      if (ends === undefined) wiring.set(net, [end]);
      else if (!ends.includes(end)) ends.push(end);
    }
  }
  wirings.set(scope, wiring);
  return wiring;
}

/** The nets that a statement names, each with the element or pin that it is wired to there. */
function wiresOf(statement: Statement): (readonly [net: string, end: string])[] {
  if (statement.kind === "path") {
    return statement.parts.flatMap(({ name }, k) =>
      [statement.nets[k], statement.nets[k + 1]].flatMap((net) =>
        net === undefined ? [] : [[net.text, name.text] as const],
      ),
    );
  }
  if (statement.kind !== "device") return [];
  return statement.settings.flatMap(({ name, value }) =>
    value.kind === "name" && value.path.length === 1
      ? [[value.path[0]!.text, `${statement.name.text}.${name.text}`] as const]
      : [],
  );
}
