import { KINDS, type ParameterKind } from "../kinds";
import { isKind } from "../scope";
import type { Netlist, Setting, Statement } from "../syntax";
import type { NameScope } from "./symbol";
import type { Symbols } from "./symbols";

/** What can stand inside the braces of an element, model or instance: pins or nets, then parameters or knobs. */
export interface Braces {
  readonly pins: readonly string[];
  readonly parameters: Readonly<Record<string, ParameterKind>>;
}

/** What the braces after a kind take; a model's braces take no pins, and those of what follows one no parameters. */
export function bracesOf(of: string, scope: NameScope, isModel: boolean): Braces {
  const model = scope.find(of);
  const kind = model?.meaning === "model" ? (model.of ?? "") : of;
  if (!isKind(kind)) return { pins: [], parameters: {} };
  const { pins, parameters } = KINDS[kind];
  return { pins: isModel ? [] : pins, parameters: isModel || model === null ? parameters : {} };
}

/** What the name of a setting at an offset means: a pin or a parameter with its unit and what leaving it out means. */
export function settingAt({ statements }: Netlist, symbols: Symbols, offset: number): string | null {
  const statement = innermost(statements, offset);
  if (statement === null) return null;
  for (const { of, settings } of bracesIn(statement)) {
    const setting = settings.find(({ name }) => name.from <= offset && offset <= name.to);
    if (setting === undefined) continue;
    const { pins, parameters } = bracesOf(of, symbols.file.at(offset), statement.kind === "model");
    const name = setting.name.text;
    if (pins.includes(name)) return `pin ${name} of ${of}`;
    return Object.hasOwn(parameters, name) ? parameterLine(name, parameters[name]!) : null;
  }
  return null;
}

export function parameterLine(name: string, { unit, absent, about }: ParameterKind): string {
  const asked = absent === null ? "must be given" : `left out: ${absent}`;
  return `${name}: ${about}; ${unit === "1" ? "a pure number" : `in ${unit}`}; ${asked}`;
}

function innermost(statements: readonly Statement[], offset: number): Statement | null {
  const found = statements.find(({ from, to }) => from <= offset && offset <= to) ?? null;
  return found?.kind === "block" ? innermost(found.statements, offset) : found;
}

function bracesIn(statement: Statement): { of: string; settings: readonly Setting[] }[] {
  if (statement.kind === "model" || statement.kind === "device") {
    return [{ of: statement.of.text, settings: statement.settings }];
  }
  if (statement.kind !== "path") return [];
  return statement.parts.map(({ kind, settings }) => ({ of: kind.text, settings }));
}
