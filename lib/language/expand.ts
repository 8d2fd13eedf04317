import { count } from "./limits";
import { Ports } from "./ports";
import type { Report } from "./report";
import { Rewriter } from "./rewrite";
import { type BlockDefinition, type BlockStatement, isKind, Scope } from "./scope";
import type { Span } from "./span";
import type { Expression, Setting, Statement, ToleranceSyntax, Word } from "./syntax";
import { quote } from "./token";

type DeviceStatement = Extract<Statement, { kind: "device" }>;

/** A knob of a block: a value of the instance. `standard` is the default that an instance has replaced, else null. */
export interface ParameterStatement extends Span {
  readonly kind: "parameter";
  readonly whole: boolean;
  readonly name: Word;
  readonly value: Expression;
  readonly tolerance: ToleranceSyntax | null;
  readonly range: { readonly low: Expression; readonly high: Expression } | null;
  readonly standard: Expression | null;
}

/** An instance of a block by its name, which a trial has not; the nets at its ports by their names inside. */
export interface InstanceStatement extends Span {
  readonly kind: "instance";
  readonly whole: boolean;
  readonly name: Word | null;
  readonly ports: readonly { readonly port: Word; readonly net: Word }[];
}

/** A statement with blocks taken apart. */
export type Flat = Statement | ParameterStatement | InstanceStatement;

export interface Expansion {
  readonly statements: readonly Flat[];
  /** Blocks without an instance are tried once, so that they are checked; what they make has names that begin so. */
  readonly trials: readonly string[];
  /** False where there were so many statements that the rest was left out, which is reported. */
  readonly isWhole: boolean;
}

/** A model or block of a shelf: its name there, and in the file. */
interface Offer {
  readonly local: string;
  readonly name: string;
  readonly block: BlockDefinition | null;
  readonly kind: string | null;
}

/** What a shelf offers, and the statements that declare it under the names of the file. */
export interface Import {
  readonly statements: readonly Flat[];
  readonly offered: readonly Offer[];
}

/** Takes blocks apart: every instance becomes the statements of its body under dotted names. */
export class Expander {
  private readonly flat: Flat[] = [];
  private readonly trials: string[] = [];
  private readonly rewriter = new Rewriter();
  private readonly active: BlockStatement[] = [];
  private readonly used = new Set<BlockStatement>();
  private readonly waiting: { definition: BlockDefinition; name: Word }[] = [];
  private readonly ports: Ports;
  private isFull = false;
  /** The instance in the file that is being unfolded. */
  private outermost: Span | null = null;

  /** `most`: words and values that blocks may unfold to. */
  constructor(
    private readonly report: Report,
    private readonly most: number,
  ) {
    this.ports = new Ports(report);
  }

  file(statements: readonly Statement[], imports: readonly Import[]): Expansion {
    const scope = new Scope("", null);
    for (const { statements: needed, offered } of imports) {
      this.flat.push(...needed);
      for (const one of offered) scope.set(one.local, { ...one, isShared: true });
    }
    scope.fill(statements, false, () => undefined);
    this.body(statements, scope, (statement) => statement);
    for (const { definition, name } of this.waiting)
      if (!this.used.has(definition.statement)) this.try(definition, name);
    return { statements: this.flat, trials: this.trials, isWhole: !this.isFull };
  }

  private body(
    statements: readonly Statement[],
    scope: Scope,
    written: (statement: Statement) => Flat | null,
  ): void {
    for (const statement of statements) {
      if (this.full()) return;
      const isInstance = statement.kind === "device" && !isKind(statement.of.text);
      const definition = isInstance ? scope.find(statement.of.text)?.block : null;
      if (statement.kind === "block") {
        this.flat.push({ ...statement, name: scope.declared(statement.name), statements: [] });
        const own = scope.find(statement.name.text)?.block;
        if (own?.statement === statement)
          this.waiting.push({ definition: own, name: scope.declared(statement.name) });
      } else if (statement.kind === "device" && definition) this.instance(statement, definition, scope);
      else {
        const flat = written(statement);
        if (flat !== null) this.flat.push(flat);
      }
    }
  }

  private instance(device: DeviceStatement, definition: BlockDefinition, outside: Scope): void {
    const { statement } = definition;
    const name = outside.declared(device.name);
    const { from, to, whole } = device;
    if (this.active.includes(statement)) {
      const message = `${quote(device.of.text)} contains itself, so it would never end; take this instance out.`;
      this.report.error("NAM12", device.of, message);
    }
    if (this.active.includes(statement) || !statement.whole) {
      this.flat.push({ kind: "broken", declares: name, whole: false, from, to });
      return;
    }
    const prefix = `${name.text}.`;
    const { nets, values } = this.ports.connect(device, statement);
    const ports = statement.ports.map((port) => {
      const net = nets.get(port.text);
      const flat = net === undefined ? { ...port, text: `${prefix}${port.text}'` } : outside.flat(net);
      return { port: { ...port, text: prefix + port.text, prefix }, net: flat };
    });
    this.flat.push({ kind: "instance", name, ports, whole, from, to });
    this.unfold(definition, device, prefix, ports, (knob) => this.given(knob, values, outside));
  }

  /** The value that an instance gives to a knob, in the names of the scope around. */
  private given(
    knob: string,
    values: ReadonlyMap<string, Setting>,
    outside: Scope,
  ): Pick<Setting, "value" | "tolerance"> | null {
    const setting = values.get(knob);
    if (setting === undefined) return null;
    return {
      value: this.rewriter.expression(setting.value, outside),
      tolerance: this.rewriter.tolerance(setting.tolerance, outside),
    };
  }

  /** An instance without a name, on nets of its own. */
  private try(definition: BlockDefinition, { text, from, to }: Word): void {
    this.used.add(definition.statement);
    if (!definition.statement.whole || definition.isImported) return;
    const prefix = `${text}.`;
    this.trials.push(prefix);
    const ports = definition.statement.ports.map((port) => ({
      port: { ...port, text: prefix + port.text, prefix },
      net: { ...port, text: `${prefix}${port.text}'` },
    }));
    this.flat.push({ kind: "instance", name: null, ports, whole: true, from, to });
    this.unfold(definition, definition.statement, prefix, ports, () => null);
  }

  private unfold(
    definition: BlockDefinition,
    at: Span,
    prefix: string,
    ports: InstanceStatement["ports"],
    given: (knob: string) => Pick<Setting, "value" | "tolerance"> | null,
  ): void {
    const { statement, isImported } = definition;
    this.used.add(statement);
    this.rewriter.nodes += 1 + ports.length;
    const scope = new Scope(prefix, definition.scope);
    for (const [i, { port, net }] of ports.entries()) {
      const through = [port.text, ...(net.through ?? [])];
      scope.set(statement.ports[i]!.text, { name: net.text, through });
    }
    scope.fill(statement.statements, isImported, () => {
      this.rewriter.nodes += 1;
    });
    if (this.active.length === 0) this.outermost = at;
    this.active.push(statement);
    this.body(statement.statements, scope, (inner) => {
      const flat = this.rewriter.statement(inner, scope);
      if (flat?.kind !== "knob") return flat;
      const { name, value, tolerance, range, from, to, whole } = flat;
      const own = given(name.text.slice(prefix.length));
      const base = { kind: "parameter", name, range, whole, from, to } as const;
      return own === null
        ? { ...base, value, tolerance, standard: null }
        : { ...base, ...own, standard: value };
    });
    this.active.pop();
  }

  /** Whether the blocks have unfolded to more than is kept; reported once, where it happened. */
  private full(): boolean {
    if (!this.isFull && this.rewriter.nodes > this.most) {
      this.isFull = true;
      const message = `The blocks unfold to more than ${count(this.most)} words and values; use fewer instances.`;
      this.report.error("CAP3", this.outermost ?? { from: 0, to: 0 }, message);
    }
    return this.isFull;
  }
}
