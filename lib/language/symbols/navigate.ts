import type { Span } from "../span";
import type { Symbols } from "./symbols";

/**
 * Where the name at an offset is declared, or first written if it is a net; the shelf's name where a shelf brings it in; null where
 * there is no name or none of its own.
 */
export function definitionAt(symbols: Symbols, offset: number): Span | null {
  const symbol = symbols.at(offset)?.symbol;
  return symbol?.scope.shelf?.span ?? symbol?.definition ?? null;
}

/** Every place of the name at an offset, in the order of the text. */
export function referencesAt(symbols: Symbols, offset: number): readonly Span[] {
  return symbols.at(offset)?.symbol.places ?? [];
}
