import type { ElementKind } from "./ast";
import { KINDS } from "./kinds";
import { nearest } from "./nearest";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Statement, Word } from "./syntax";
import { CONSTANTS, quote, STATEMENT_WORDS } from "./token";

/** What a name of the file means. "unread" is a name whose statement could not be read; its uses stay quiet. */
export type Meaning = "net" | "element" | "knob" | "let" | "model" | "unread";

const ARTICLE: Readonly<Record<Meaning, string>> = {
  net: "a net",
  element: "an element",
  knob: "a knob",
  let: "a let",
  model: "a model",
  unread: "a name",
};

/** Unknown names for which the whole file is searched for a near one; beyond them the search would cost too much. */
const MOST_SEARCHES = 20;

interface Entry {
  readonly meaning: Meaning;
  readonly place: Span;
  /** For elements: the kind, once known. */
  kind: ElementKind | null;
}

/** The one namespace of a file. */
export class Names {
  private readonly entries = new Map<string, Entry>();
  private readonly mentioned = new Set<string>();
  private searches = 0;

  constructor(
    private readonly report: Report,
    private readonly reserved: ReadonlySet<string>,
  ) {
    this.entries.set("ground", { meaning: "net", place: { from: 0, to: 0 }, kind: null });
    this.entries.set("temperature", { meaning: "knob", place: { from: 0, to: 0 }, kind: null });
  }

  meaningOf(name: string): Meaning | null {
    return this.entries.get(name)?.meaning ?? null;
  }

  kindOf(element: string): ElementKind | null {
    return this.entries.get(element)?.kind ?? null;
  }

  setKind(element: string, kind: ElementKind): void {
    this.entries.get(element)!.kind = kind;
  }

  placeOf(name: string): Span {
    return this.entries.get(name)!.place;
  }

  /** Gives a name its meaning; false, and a diagnostic, where it is taken or belongs to the language. */
  declare(word: Word, meaning: Meaning): boolean {
    if (word.text === "") return false;
    if (this.isReserved(word.text, meaning)) {
      const message = `${quote(word.text)} is a word of the language and cannot be ${ARTICLE[meaning]}; choose another name.`;
      this.report.error("NAM2", word, message);
      return false;
    }
    const known = this.entries.get(word.text);
    if (known === undefined) {
      this.entries.set(word.text, { meaning, place: { from: word.from, to: word.to }, kind: null });
      return true;
    }
    if (known.meaning === "unread" || meaning === "unread") return false;
    const already =
      known.place.to === 0 ? "belongs to every netlist" : `is already ${ARTICLE[known.meaning]}`;
    const message = `${quote(word.text)} ${already}, and a name means one thing in a file; choose another name for this ${meaning}.`;
    this.report.error("NAM1", word, message);
    return false;
  }

  /** Notes that a net is named here. */
  mentionNet(word: Word): void {
    if (word.text === "" || this.mentioned.has(word.text)) return;
    this.mentioned.add(word.text);
    if (this.meaningOf(word.text) !== "net") this.declare(word, "net");
  }

  /** Reports a name that means nothing, with the nearest of the wanted meanings that does. */
  unknown(word: Word, wanted: readonly Meaning[]): void {
    const start = `Nothing here is called ${quote(word.text)}`;
    const search = () => this.near(word.text, this.namesOf(wanted));
    this.report.propose("NAM3", word, start, search, "declare it, or use a name of this file");
  }

  /** The name of the file that was probably meant, for the first few that are asked for. */
  near(name: string, candidates: Iterable<string>): string | null {
    return this.searches++ < MOST_SEARCHES ? nearest(name, candidates) : null;
  }

  *namesOf(wanted: readonly Meaning[]): Iterable<string> {
    for (const [name, entry] of this.entries) if (wanted.includes(entry.meaning)) yield name;
  }

  static describe(meaning: Meaning): string {
    return ARTICLE[meaning];
  }

  private isReserved(name: string, meaning: Meaning): boolean {
    if (STATEMENT_WORDS.has(name) || CONSTANTS.has(name) || this.reserved.has(name)) return true;
    if (meaning === "model") return Object.hasOwn(KINDS, name) || name === "ground" || name === "temperature";
    return false;
  }
}

/** Declares everything the statements declare by a word of their own, then the nets by use: the former explain the latter. */
export function declareAll(statements: readonly Statement[], names: Names): void {
  const temperatures = new Set<string>();
  for (const statement of statements) {
    if (statement.kind === "let" || statement.kind === "knob") {
      const first =
        statement.kind === "knob" && statement.name.text === "temperature" && temperatures.size === 0;
      if (first) temperatures.add("temperature");
      else names.declare(statement.name, statement.kind);
    } else if (statement.kind === "model") names.declare(statement.name, "model");
    else if (statement.kind === "device") names.declare(statement.name, "element");
    else if (statement.kind === "path")
      for (const part of statement.parts) names.declare(part.name, "element");
    else if (statement.kind === "broken" && statement.declares !== null)
      names.declare(statement.declares, "unread");
  }
}
