import type { ElementKind } from "./ast";
import type { Flat } from "./expand";
import { KINDS } from "./kinds";
import { nearest } from "./nearest";
import type { Report } from "./report";
import type { Span } from "./span";
import type { Word } from "./syntax";
import { CONSTANTS, quote, STATEMENT_WORDS } from "./token";

/** What a name of the file means. "unread" is a name whose statement could not be read; its uses stay quiet. */
export type Meaning =
  | "net"
  | "element"
  | "knob"
  | "let"
  | "model"
  | "block"
  | "instance"
  | "port"
  | "reading"
  | "unread";

const ARTICLE: Readonly<Record<Meaning, string>> = {
  net: "a net",
  element: "an element",
  knob: "a knob",
  let: "a let",
  model: "a model",
  block: "a block",
  instance: "an instance of a block",
  port: "a net of the block",
  reading: "a reading",
  unread: "a name",
};

/** Unknown names for which the whole file is searched for a near one; beyond them the search would cost too much. */
const MOST_SEARCHES = 20;

/** Names of every file that mean the same inside its blocks. */
const UNIVERSAL: ReadonlySet<string> = new Set(["ground", "temperature"]);

/** A pin of an element. */
export interface PinOf {
  readonly element: string;
  readonly pin: string;
}

interface Entry {
  readonly meaning: Meaning;
  readonly place: Span;
  /** For elements: the kind, once known. */
  kind: ElementKind | null;
}

/** The one namespace of a file, in which what stands inside an instance `S` of a block has a name such as `S.x`. */
export class Names {
  private readonly entries = new Map<string, Entry>();
  private readonly mentioned = new Set<string>();
  /** The pins inside an instance that its port leads to. */
  private readonly fed = new Map<string, PinOf[]>();
  /** The nets that the nets of blocks are joined to. */
  private readonly joined = new Map<string, Word>();
  /** Set where a part of the file could not be told from another: unknown names are then not reported. */
  isIncomplete = false;
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
    const own = ownName(word);
    if (this.isReserved(own, meaning) || (own !== word.text && UNIVERSAL.has(own))) {
      const message = `${quote(own)} is a word of the language and cannot be ${ARTICLE[meaning]}; choose another name.`;
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
    const message = `${quote(own)} ${already}, and a name means one thing in a ${own === word.text ? "file" : "block"}; choose another name for this ${meaning}.`;
    this.report.error("NAM1", word, message);
    return false;
  }

  /** Declares a net of a block by its name inside, `S.in`, as the net that it is joined to. */
  join(port: Word, net: Word): void {
    if (this.declare(port, "port")) this.joined.set(port.text, net);
  }

  /** Follows the dots of a name through instances of blocks: `S.Q.c.i` begins with the element `S.Q`, `S.in.v` with a net outside. */
  settle(path: readonly Word[]): readonly Word[] {
    let head = path[0]!;
    let at = 1;
    while (at < path.length && this.meaningOf(head.text) === "instance") {
      const next = path[at]!;
      const text = `${head.text}.${next.text}`;
      if (this.meaningOf(text) === null) break;
      head = { text, prefix: head.prefix ?? "", from: head.from, to: next.to };
      at += 1;
    }
    const net = this.joined.get(head.text);
    return at === 1 && net === undefined
      ? path
      : [net === undefined ? head : { ...head, text: net.text }, ...path.slice(at)];
  }

  /** Notes that a port of an instance leads to a pin inside. */
  feed(port: string, pin: PinOf): void {
    const pins = this.fed.get(port);
    if (pins === undefined) this.fed.set(port, [pin]);
    else pins.push(pin);
  }

  /** For `S.in.i`, the pins inside that the port leads to; null where a dotted name is not the current of a port. */
  pinsBehind(path: readonly Word[]): readonly PinOf[] | null {
    if (path.length < 3 || path.at(-1)!.text !== "i") return null;
    const port = path
      .slice(0, -1)
      .map(({ text }) => text)
      .join(".");
    return this.meaningOf(port) === "port" ? (this.fed.get(port) ?? []) : null;
  }

  /** Notes that a net is named here. */
  mentionNet(word: Word): void {
    if (word.text === "" || this.mentioned.has(word.text)) return;
    this.mentioned.add(word.text);
    if (this.meaningOf(word.text) !== "net") this.declare(word, "net");
  }

  /** Reports a name that means nothing, with the nearest of the wanted meanings that does. */
  unknown(word: Word, wanted: readonly Meaning[]): void {
    if (this.isIncomplete) return;
    const own = ownName(word);
    const start = `Nothing here is called ${quote(own)}`;
    const search = () => this.near(own, this.namesSeen(wanted, word.prefix ?? ""));
    this.report.propose("NAM3", word, start, search, "declare it, or use a name of this file");
  }

  /** The name of the file that was probably meant, for the first few that are asked for. */
  near(name: string, candidates: Iterable<string>): string | null {
    return this.searches++ < MOST_SEARCHES ? nearest(name, candidates) : null;
  }

  *namesOf(wanted: readonly Meaning[]): Iterable<string> {
    for (const [name, entry] of this.entries) if (wanted.includes(entry.meaning)) yield name;
  }

  /** Names as they are written inside an instance with this prefix: those of its own, and the values and models around. */
  *namesSeen(wanted: readonly Meaning[], prefix: string): Iterable<string> {
    for (const [name, { meaning }] of this.entries) {
      if (!wanted.includes(meaning)) continue;
      const own = name.startsWith(prefix) ? name.slice(prefix.length) : name;
      const isSeen = name.startsWith(prefix) || (meaning !== "net" && meaning !== "element");
      if (isSeen && !own.includes(".")) yield own;
    }
  }

  /** Names of what stands inside an instance with this prefix. */
  *namesInside(prefix: string): Iterable<string> {
    for (const name of this.entries.keys()) {
      const own = name.startsWith(prefix) ? name.slice(prefix.length) : "";
      if (own !== "" && !own.includes(".") && !own.includes("'")) yield own;
    }
  }

  static describe(meaning: Meaning): string {
    return ARTICLE[meaning];
  }

  private isReserved(name: string, meaning: Meaning): boolean {
    if (STATEMENT_WORDS.has(name) || CONSTANTS.has(name) || this.reserved.has(name)) return true;
    if (meaning === "model" || meaning === "block")
      return Object.hasOwn(KINDS, name) || name === "ground" || name === "temperature";
    return false;
  }
}

/** Declares everything the statements declare by a word of their own, then the nets by use: the former explain the latter. */
export function declareAll(statements: readonly Flat[], names: Names): void {
  const temperatures = new Set<string>();
  for (const statement of statements) {
    if (statement.kind === "let" || statement.kind === "knob") {
      const first =
        statement.kind === "knob" && statement.name.text === "temperature" && temperatures.size === 0;
      if (first) temperatures.add("temperature");
      else names.declare(statement.name, statement.kind);
    } else if (statement.kind === "parameter") names.declare(statement.name, "let");
    else if (statement.kind === "block") names.declare(statement.name, statement.whole ? "block" : "unread");
    else if (statement.kind === "instance") {
      if (statement.name !== null) names.declare(statement.name, "instance");
      for (const { port, net } of statement.ports) names.join(port, net);
    } else if (statement.kind === "model") names.declare(statement.name, "model");
    else if (statement.kind === "device") names.declare(statement.name, "element");
    else if (statement.kind === "read") names.declare(statement.name, "reading");
    else if (statement.kind === "path")
      for (const part of statement.parts) names.declare(part.name, "element");
    else if (statement.kind === "broken" && statement.declares !== null)
      names.declare(statement.declares, "unread");
  }
}

/** A name as it is written where it stands, without the instance it belongs to. */
export function ownName({ text, prefix = "" }: Word): string {
  return text.slice(prefix.length);
}
