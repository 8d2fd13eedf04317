import { KINDS } from "../kinds";
import { isKind } from "../scope";
import type { Span } from "../span";
import type { Netlist, PathPart, Statement, Word } from "../syntax";
import { insideOf, pinsOf, portsOf } from "./declare";
import type { NameScope } from "./symbol";
import type { Symbols } from "./symbols";

/** A pin of an element, or a net of an instance's head, and the net it is joined to; null where it is left open. */
export interface Joint {
  readonly pin: string;
  readonly net: string | null;
  /** Where the text names it. */
  readonly at: Span | null;
}

/** An element, or an instance of a block; names are dotted from the file (`S.Q`), as are those of nets. */
export interface Box {
  readonly name: string;
  /** What it is in a word: its kind, model or block. */
  readonly of: string;
  /** What else the text says of it: the value of a resistor, the model of a diode; "" where nothing. */
  readonly value: string;
  readonly joints: readonly Joint[];
  /** Its part of the text; that of the instance in the file for what stands inside a block of a shelf. */
  readonly span: Span;
  /** What stands inside an instance; null for an element. */
  readonly inside: readonly Row[] | null;
}

/** What one statement wires: the parts of a path in their order, or a single box. */
export type Row = readonly Box[];

/** What is connected to what, as the text says it. */
export interface Connections {
  readonly rows: readonly Row[];
  /** Where each net is first named; `ground` is among them where it is named. */
  readonly nets: ReadonlyMap<string, Span>;
}

/** Blocks within blocks that are looked into, and boxes in all. */
const MOST_DEPTH = 16;
const MOST_BOXES = 2_000;
/** UTF-16 units of a value that are kept. */
const MOST_VALUE = 24;

/** The connections of a netlist; works on what could be read of a text with mistakes. Pins of unknown kinds are those that are given. */
export function connectionsOf({ statements }: Netlist, { file }: Symbols): Connections {
  const reader = new Reader();
  const rows = reader.rows(statements, { scope: file, prefix: "", ports: new Map(), within: null, depth: 0 });
  return { rows, nets: reader.nets };
}

/** Where statements stand: names inside an instance begin with its own, and its nets of the head are nets outside. */
interface Around {
  readonly scope: NameScope;
  readonly prefix: string;
  readonly ports: ReadonlyMap<string, string | null>;
  /** The instance whose block is of another text; null where the text is the file's own. */
  readonly within: Span | null;
  readonly depth: number;
}

class Reader {
  readonly nets = new Map<string, Span>();
  private boxes = 0;

  rows(statements: readonly Statement[], around: Around): Row[] {
    return statements.flatMap((statement): Row[] => {
      if (this.boxes >= MOST_BOXES) return [];
      if (statement.kind === "path") return [this.path(statement, around)];
      if (statement.kind === "device" && statement.name.text !== "")
        return [[this.device(statement, around)]];
      return [];
    });
  }

  private path({ parts, nets }: Extract<Statement, { kind: "path" }>, around: Around): Row {
    return parts.flatMap((part, k) => {
      if (part.name.text === "") return [];
      this.boxes += 1;
      const [left = "left", right = "right"] = pinsOf(part.kind.text, around.scope);
      const joints = [this.joint(left, nets[k], around), this.joint(right, nets[k + 1], around)];
      const span = around.within ?? { from: part.from, to: part.to };
      const name = around.prefix + part.name.text;
      return [
        { name, of: part.kind.text, value: writtenValue(part, around.scope), joints, span, inside: null },
      ];
    });
  }

  private device(
    { name, of, settings, from, to }: Extract<Statement, { kind: "device" }>,
    around: Around,
  ): Box {
    this.boxes += 1;
    const block = around.scope.find(of.text);
    const inner = block?.meaning === "block" ? insideOf(block) : null;
    const known = block?.meaning === "block" ? portsOf(block) : pinsOf(of.text, around.scope);
    const given = settings.filter(({ value }) => value.kind === "name" && value.path.length === 1);
    const isUnknown = known.length === 0;
    const pins = isUnknown ? given.map((setting) => setting.name.text) : known;
    const joints = pins.map((pin): Joint => {
      const setting = given.find((one) => one.name.text === pin);
      const value = setting?.value;
      return this.joint(pin, value?.kind === "name" ? value.path[0] : undefined, around);
    });
    const own = around.prefix + name.text;
    const span = around.within ?? { from, to };
    const box = { name: own, of: of.text, value: "", joints, span };
    if (inner === null || block?.statement?.kind !== "block" || around.depth >= MOST_DEPTH) {
      return { ...box, inside: null };
    }
    const ports = new Map(joints.map(({ pin, net }) => [pin, net]));
    const within = inner.shelf === null ? null : span;
    const inside = { scope: inner, prefix: `${own}.`, ports, within, depth: around.depth + 1 };
    return { ...box, inside: this.rows(block.statement.statements, inside) };
  }

  /** Joins a pin to a net, whose name is that from the file; notes where it is first named. */
  private joint(pin: string, word: Word | undefined, { prefix, ports, within }: Around): Joint {
    if (word === undefined || word.text === "") return { pin, net: null, at: null };
    const at = within ?? { from: word.from, to: word.to };
    if (ports.has(word.text)) return { pin, net: ports.get(word.text)!, at };
    const net = word.text === "ground" ? "ground" : prefix + word.text;
    if (!this.nets.has(net)) this.nets.set(net, at);
    return { pin, net, at };
  }
}

/** The value or model of a part on a path, as it is written. */
function writtenValue({ kind, value, settings }: PathPart, { text }: NameScope): string {
  const said = value ?? (isKind(kind.text) && KINDS[kind.text].follows === "law" ? settings[0]?.value : null);
  if (said === null || said === undefined || said.kind === "hole") return "";
  const written = text.slice(said.from, said.to).replace(/\s+/gu, " ");
  return written.length > MOST_VALUE ? `${written.slice(0, MOST_VALUE - 1)}…` : written;
}
