import type { Fix } from "@/lib/language/diagnostic";
import type { Span } from "@/lib/language/span";

/** What can be done at the cursor, by key or from the menu of the text. */
export type TextCommand =
  | "complete"
  | "tell"
  | "mend here"
  | "rename"
  | "definition"
  | "places"
  | "comment"
  | "fold all"
  | "unfold all"
  | "find";

/** What the page may ask of the editor. Spans are UTF-16 offsets in a text whose lines end with "\n". */
export interface EditorHandle {
  /** The text as it stands. */
  text(): string;
  /** Puts another text in place of the whole; the reader can undo it. */
  replace(text: string): void;
  /** Selects the span and brings it into view. */
  goTo(span: Span): void;
  /** Marks the lines of a span and brings them into view without taking the focus; null takes the mark away. */
  show(span: Span | null): void;
  /** Puts a fix in, if the text is still the one it was worked out for. */
  mend(fix: Fix, of: string): void;
  /** Brings the text into canonical form. */
  format(): void;
  /** Opens the list of what the text declares and asks for, to jump from. */
  openOutline(): void;
}

/** What the Tab key does in the text: indents, or moves the focus on, for now or always. */
export type TabDoes = "indents" | "moves on" | "always moves on";

/** What the editor tells the page. */
export interface EditorEvents {
  /** After each change; ask the handle for the text when it is needed. */
  readonly onEdit: () => void;
  readonly onQueue: () => void;
  readonly onSave: () => void;
  readonly onTab: (does: TabDoes) => void;
  /**
   * Where the cursor stands in the text, when it has come to rest, and the names that what stands there has in the circuit: more
   * than one inside a block with several instances.
   */
  readonly onCursor?: (offset: number, names: readonly string[]) => void;
}
