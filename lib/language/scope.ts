import { KINDS } from "./kinds";
import type { Statement, Word } from "./syntax";
import { CONSTANTS } from "./token";

export type BlockStatement = Extract<Statement, { kind: "block" }>;

/** A block, and the scope in which it was declared and in which its body looks for what it does not declare itself. */
export interface BlockDefinition {
  readonly statement: BlockStatement;
  readonly scope: Scope;
  /** From a shelf, where it has been checked on its own. */
  readonly isImported: boolean;
}

/** What a name of a scope stands for once blocks are taken apart. */
export interface ScopeEntry {
  readonly name: string;
  /** Lets, knobs, models and blocks are seen from the blocks inside; nets and elements are not. */
  readonly isShared: boolean;
  readonly block: BlockDefinition | null;
  /** The kind that a model follows. */
  readonly kind: string | null;
  /** For a port of a block: as in Word. */
  readonly through?: readonly string[] | undefined;
}

const EVERYWHERE: ReadonlySet<string> = new Set([...CONSTANTS, "ground", "temperature"]);

/** The namespace of the file, of a shelf, or of one instance of a block. */
export class Scope {
  private readonly own = new Map<string, ScopeEntry>();

  constructor(
    readonly prefix: string,
    private readonly parent: Scope | null,
  ) {}

  /** What a name stands for here, null where nothing has it. */
  find(name: string): ScopeEntry | null {
    const own = this.own.get(name);
    if (own !== undefined) return own;
    for (let scope = this.parent; scope !== null; scope = scope.parent) {
      const entry = scope.own.get(name);
      if (entry?.isShared) return entry;
    }
    return null;
  }

  /** The word with the name it has once blocks are taken apart; what is unknown belongs to this scope. */
  flat(word: Word): Word {
    if (word.text === "" || EVERYWHERE.has(word.text)) return word;
    const entry = this.find(word.text);
    const flat = this.named(word, entry?.name ?? this.prefix + word.text);
    return entry?.through === undefined ? flat : { ...flat, through: entry.through };
  }

  /** The word of something declared here. */
  declared(word: Word): Word {
    return word.text === "" ? word : this.named(word, this.prefix + word.text);
  }

  private named({ text, from, to }: Word, name: string): Word {
    if (name === text) return { text, from, to };
    return { text: name, prefix: name.endsWith(text) ? name.slice(0, -text.length) : "", from, to };
  }

  set(name: string, entry: Partial<ScopeEntry> & { readonly name: string }): void {
    if (name !== "" && !this.own.has(name))
      this.own.set(name, { isShared: false, block: null, kind: null, ...entry });
  }

  /** Names everything that the statements declare, then the nets by their use. Ports are set before. */
  fill(statements: readonly Statement[], isImported: boolean, countNode: () => void): void {
    for (const statement of statements) {
      countNode();
      switch (statement.kind) {
        case "let":
        case "knob":
          this.share(statement.name, {});
          break;
        case "model":
          this.share(statement.name, { kind: statement.of.text });
          break;
        case "block":
          this.share(statement.name, { block: { statement, scope: this, isImported } });
          break;
        case "device":
          this.set(statement.name.text, { name: this.prefix + statement.name.text });
          break;
        case "path":
          for (const { name } of statement.parts) this.set(name.text, { name: this.prefix + name.text });
          break;
        case "broken":
          if (statement.declares !== null) this.share(statement.declares, {});
          break;
      }
    }
    for (const statement of statements) {
      if (statement.kind === "path") for (const net of statement.nets) this.net(net);
      if (statement.kind !== "device") continue;
      const pins = this.pinsOf(statement.of.text);
      for (const { name, value } of statement.settings) {
        const isPin = pins.includes(name.text) && value.kind === "name" && value.path.length === 1;
        if (isPin) this.net(value.path[0]!);
      }
    }
  }

  /** The names that are wired to nets: pins of a kind or of a model's kind, nets of a block. */
  pinsOf(of: string): readonly string[] {
    if (isKind(of)) return KINDS[of].pins;
    const entry = this.find(of);
    if (entry?.block) return entry.block.statement.ports.map((port) => port.text);
    const kind = entry?.kind ?? null;
    return kind !== null && isKind(kind) ? KINDS[kind].pins : [];
  }

  private share(word: Word, more: Partial<ScopeEntry>): void {
    this.set(word.text, { name: this.prefix + word.text, isShared: true, ...more });
  }

  private net(word: Word): void {
    if (!EVERYWHERE.has(word.text)) this.set(word.text, { name: this.prefix + word.text });
  }
}

export function isKind(text: string): text is keyof typeof KINDS {
  return Object.hasOwn(KINDS, text);
}
