import type { Span } from "../span";
import type { Symbols } from "./symbols";

/** Where the name at an offset is declared, or first written if it is a net; null where there is no name or none of its own. */
export function definitionAt(symbols: Symbols, offset: number): Span | null {
  return symbols.at(offset)?.symbol.definition ?? null;
}

/** Every place of the name at an offset, in the order of the text. */
export function referencesAt(symbols: Symbols, offset: number): readonly Span[] {
  return symbols.at(offset)?.symbol.places ?? [];
}
