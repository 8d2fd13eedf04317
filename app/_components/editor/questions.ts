import type { Span } from "@/lib/language/span";
import type { Completion } from "@/lib/language/symbols/completion";
import type { Connections } from "@/lib/language/symbols/connections";
import type { Fold } from "@/lib/language/symbols/folds";
import type { OutlineEntry } from "@/lib/language/symbols/outline";
import type { Renaming } from "@/lib/language/symbols/rename";

/** What stands at a place of a text. Spans are UTF-16 offsets in that text. */
export interface Told extends Span {
  /** What it is, line by line, and its value at the defaults. Plain text. */
  readonly lines: readonly string[];
  /** Names that it has in the circuit once blocks are taken apart; none for words of the language. */
  readonly paths: readonly string[];
  /** Where it is declared; null for what has no declaration. */
  readonly definition: Span | null;
  /** Every place where the name is written. */
  readonly places: readonly Span[];
}

/** What the thread of the language can be asked, and what it answers. */
export interface Questions {
  readonly complete: { readonly asks: { readonly offset: number }; readonly gives: readonly Completion[] };
  readonly tell: { readonly asks: { readonly offset: number }; readonly gives: Told | null };
  readonly rename: {
    readonly asks: { readonly offset: number; readonly name: string };
    readonly gives: Renaming;
  };
  readonly folds: { readonly asks: object; readonly gives: readonly Fold[] };
  readonly outline: { readonly asks: object; readonly gives: readonly OutlineEntry[] };
  readonly connections: { readonly asks: object; readonly gives: Connections };
  readonly format: { readonly asks: object; readonly gives: string };
}

export type Kind = keyof Questions;

/** A question about one text, with a number that the answer carries back. */
export type Question = {
  readonly [K in Kind]: Questions[K]["asks"] & {
    readonly ask: K;
    readonly number: number;
    readonly text: string;
  };
}[Kind];

export interface Answer {
  readonly number: number;
  readonly gives: Questions[Kind]["gives"];
}
