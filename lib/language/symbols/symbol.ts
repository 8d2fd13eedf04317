import type { Span } from "../span";
import type { Statement } from "../syntax";

/**
 * What a name stands for, as an editor tells it. "trace" is what `show NAME = …` keeps; "port" a net of a block's head;
 * "group" what parts `track` with. */
export type SymbolMeaning =
  | "net"
  | "element"
  | "instance"
  | "knob"
  | "let"
  | "model"
  | "block"
  | "port"
  | "trace"
  | "reading"
  | "group";

/** A name of the file or of a block, and every place where it is written. */
export interface NamedSymbol {
  readonly name: string;
  readonly meaning: SymbolMeaning;
  /** Where it is declared, or, for a net, first named; null for `ground` and a temperature that no knob declares. */
  readonly definition: Span | null;
  /** The statement of the definition; null where there is none. */
  readonly statement: Statement | null;
  /** Kind or model of an element, kind of a model, block of an instance; else null. */
  readonly of: string | null;
  readonly scope: NameScope;
  /** Every place in the order of the text, the definition among them. */
  readonly places: readonly Span[];
}

/** A text that names are brought in from; `span` is where the file names it. */
export interface Shelf {
  readonly name: string;
  readonly span: Span;
}

/** The names of the file, or of one block with those of the scopes around it. */
export class NameScope {
  readonly names = new Map<string, NamedSymbol & { places: Span[] }>();
  /** Traces have a namespace of their own, since `show out = out.v` is fine. */
  readonly traces = new Map<string, NamedSymbol & { places: Span[] }>();
  /** So have the groups of tolerances. */
  readonly groups = new Map<string, NamedSymbol & { places: Span[] }>();
  readonly inner: NameScope[] = [];

  /** `span` is where the names hold, in `text`; `shelf` is null where that is the file itself. */
  constructor(
    readonly span: Span,
    readonly parent: NameScope | null,
    readonly text: string,
    readonly shelf: Shelf | null,
  ) {
    parent?.inner.push(this);
  }

  /** What a name stands for here. Nets and elements of a scope are not seen from the blocks inside it. */
  find(name: string): (NamedSymbol & { places: Span[] }) | null {
    const own = this.names.get(name);
    if (own !== undefined) return own;
    for (let scope = this.parent; scope !== null; scope = scope.parent) {
      const found = scope.names.get(name);
      if (found !== undefined && isShared(found)) return found;
    }
    return null;
  }

  /** The innermost scope at an offset. */
  at(offset: number): NameScope {
    const inside = this.inner.find(({ span }) => span.from <= offset && offset <= span.to);
    return inside?.at(offset) ?? this;
  }

  /** This scope and all inside it. */
  *all(): Iterable<NameScope> {
    yield this;
    for (const scope of this.inner) yield* scope.all();
  }

  /** Every symbol that can be written here. */
  *seen(): Iterable<NamedSymbol> {
    const met = new Set<string>();
    for (let scope: NameScope | null = this; scope !== null; scope = scope.parent) {
      for (const symbol of scope.names.values()) {
        if (met.has(symbol.name) || (scope !== this && !isShared(symbol))) continue;
        met.add(symbol.name);
        yield symbol;
      }
    }
  }
}

function isShared({ meaning, name }: NamedSymbol): boolean {
  return ["let", "knob", "model", "block"].includes(meaning) || name === "ground";
}
