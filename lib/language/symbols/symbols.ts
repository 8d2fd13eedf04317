import type { Library } from "../shelves";
import type { Span } from "../span";
import type { Expression, Netlist, Setting, Statement, ToleranceSyntax, WindowSyntax, Word } from "../syntax";
import { declareScopes, groupNamed, insideOf, pinsOf } from "./declare";
import type { NamedSymbol, NameScope } from "./symbol";

type Open = NamedSymbol & { places: Span[] };

/** A name as it is written at one place. */
export interface Occurrence extends Span {
  readonly symbol: NamedSymbol;
}

/** Every name of a netlist with its places. Works on what could be read of any text; linear but for a few look-ups a name. */
export class Symbols {
  readonly file: NameScope;
  /** In the order of the text; no two overlap. */
  readonly occurrences: readonly Occurrence[];

  constructor(netlist: Netlist, text: string, library: Library | null) {
    this.file = declareScopes(netlist, text, library);
    const found = new Map<number, Occurrence>();
    new References((symbol, { from, to }) => {
      if (!found.has(from) && to > from) found.set(from, { symbol, from, to });
    }).statements(netlist.statements, this.file);
    this.occurrences = [...found.values()].sort((a, b) => a.from - b.from);
    for (const { symbol, from, to } of this.occurrences) (symbol as Open).places.push({ from, to });
  }

  /** The name at an offset, which may also stand just behind it. */
  at(offset: number): Occurrence | null {
    let [low, high] = [0, this.occurrences.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.occurrences[middle]!.to < offset) low = middle + 1;
      else high = middle;
    }
    const touching = [this.occurrences[low], this.occurrences[low + 1]].filter(
      (one) => one !== undefined && one.from <= offset && offset <= one.to,
    );
    return touching.at(-1) ?? null;
  }
}

/** Follows every name to its symbol. */
class References {
  constructor(private readonly note: (symbol: NamedSymbol, place: Span) => void) {}

  statements(statements: readonly Statement[], scope: NameScope): void {
    for (const statement of statements) this.statement(statement, scope);
  }

  private statement(statement: Statement, scope: NameScope): void {
    switch (statement.kind) {
      case "let":
      case "knob":
        this.name(statement.name, scope);
        this.expression(statement.value, scope);
        this.tolerance(statement.tolerance, scope);
        if (statement.range !== null) this.expressions([statement.range.low, statement.range.high], scope);
        break;
      case "model":
        this.name(statement.name, scope);
        this.values(statement.settings, scope);
        break;
      case "block": {
        this.name(statement.name, scope);
        const block = scope.names.get(statement.name.text);
        const inner = block?.statement === statement ? insideOf(block) : null;
        if (inner === null) break;
        for (const port of statement.ports) this.name(port, inner);
        this.statements(statement.statements, inner);
        break;
      }
      case "path":
        for (const net of statement.nets) this.name(net, scope);
        for (const { name, kind, value, tolerance, settings } of statement.parts) {
          this.name(name, scope);
          this.name(kind, scope);
          if (value !== null) this.expression(value, scope);
          this.tolerance(tolerance, scope);
          this.values(settings, scope);
        }
        break;
      case "device":
        this.device(statement, scope);
        break;
      case "sweep":
        this.name(statement.knob, scope);
        if (statement.range.kind === "list") this.expressions(statement.range.values, scope);
        else this.expressions([statement.range.start, statement.range.stop, statement.range.amount], scope);
        break;
      case "show":
        for (const { name, value } of statement.items) {
          const trace = name === null ? undefined : scope.traces.get(name.text);
          if (name !== null && trace !== undefined) this.note(trace, name);
          this.expression(value, scope);
        }
        break;
      case "read":
        this.name(statement.name, scope);
        this.expression(statement.value, scope, true);
        this.windows(statement.windows, scope);
        break;
      case "require": {
        const { value, relation, windows, share } = statement;
        this.expression(value, scope, true);
        if (relation.kind === "compare") this.expression(relation.bound, scope, true);
        if (relation.kind === "within") this.expressions([relation.target, relation.half], scope, true);
        if (relation.kind === "between") this.expressions([relation.low, relation.high], scope, true);
        this.windows(windows, scope);
        if (share !== null) this.expression(share, scope);
        break;
      }
    }
  }

  private device(statement: Extract<Statement, { kind: "device" }>, scope: NameScope): void {
    const { name, of, settings } = statement;
    this.name(name, scope);
    this.name(of, scope);
    const block = scope.find(of.text);
    const inner = block?.meaning === "block" ? insideOf(block) : null;
    const pins = pinsOf(of.text, scope);
    for (const setting of settings) {
      if (inner !== null) this.name(setting.name, inner);
      if (pins.includes(setting.name.text) && setting.value.kind === "name")
        this.head(setting.value.path, scope);
      else this.values([setting], scope);
    }
  }

  private name(word: Word, scope: NameScope): void {
    const symbol = scope.find(word.text);
    if (symbol !== null) this.note(symbol, word);
  }

  /** A dotted name: what its head is, and, through instances of blocks, what stands inside them. */
  private head(path: readonly Word[], scope: NameScope): void {
    let within: NameScope | null = scope;
    for (const word of path) {
      const symbol: NamedSymbol | null =
        within === scope ? scope.find(word.text) : (within?.names.get(word.text) ?? null);
      if (symbol === null) return;
      this.note(symbol, word);
      const block: NamedSymbol | null =
        symbol.meaning === "instance" ? symbol.scope.find(symbol.of ?? "") : null;
      within = block === null ? null : insideOf(block);
      if (within === null) return;
    }
  }

  private expressions(all: readonly Expression[], scope: NameScope, isContract = false): void {
    for (const one of all) this.expression(one, scope, isContract);
  }

  /** In a contract a bare name is a reading or a trace before it is anything else. */
  private expression(expression: Expression, scope: NameScope, isContract = false): void {
    switch (expression.kind) {
      case "name": {
        const { path } = expression;
        const isBare =
          isContract && path.length === 1 && scope.names.get(path[0]!.text)?.meaning !== "reading";
        const trace = isBare ? scope.traces.get(path[0]!.text) : undefined;
        if (trace !== undefined) this.note(trace, path[0]!);
        else this.head(path, scope);
        break;
      }
      case "unary":
        this.expression(expression.operand, scope, isContract);
        break;
      case "binary":
        this.expressions([expression.left, expression.right], scope, isContract);
        break;
      case "call":
        this.expressions(expression.args, scope, isContract);
        for (const { name, value } of expression.bindings) {
          this.name(name, scope);
          this.expression(value, scope);
        }
        break;
    }
  }

  private values(settings: readonly Setting[], scope: NameScope): void {
    for (const { value, tolerance } of settings) {
      this.expression(value, scope);
      this.tolerance(tolerance, scope);
    }
  }

  private tolerance(tolerance: ToleranceSyntax | null, scope: NameScope): void {
    if (tolerance === null) return;
    this.expression(tolerance.amount, scope);
    const { track } = tolerance;
    if (track === null) return;
    if (track.group.text !== "") this.note(groupNamed(track.group, scope), track.group);
    if (track.within !== null) this.expression(track.within, scope);
  }

  private windows(windows: readonly WindowSyntax[], scope: NameScope): void {
    for (const { knob, low, high } of windows) {
      this.name(knob, scope);
      this.expressions(high === null ? [low] : [low, high], scope);
    }
  }
}

/** The names of a netlist; those of the shelves that it uses are among them where `library` has their texts. */
export function symbolsOf(netlist: Netlist, text: string, library: Library | null = null): Symbols {
  return new Symbols(netlist, text, library);
}
