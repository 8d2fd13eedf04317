import { bytesOf, variablesOf } from "./expression";
import {
  type FunctionBody,
  get,
  INTEGER,
  integer,
  type Kind,
  load,
  NUMBER,
  OPCODE,
  set,
  store,
  unsigned,
} from "./module";

/** What a statement leaves in a variable; `name` null for a demand. */
interface Statement {
  readonly name: string | null;
  readonly expression: string;
}

/** Where the variables of a letter come from and go to: from the number `start` of the memory; those below `kept` are read by others too. */
export interface Home {
  readonly start: number;
  readonly kept: number;
}

/** The parameter of every function. */
const SHARE = "share";

/** The integer that tells whether all demands are met so far, and the first variable of a number. */
const MET = 1;
const FIRST_NUMBER = 2;

/**
 * Straight code over numbers in one memory: no loop, no jump, every number in a variable, which is a letter and the number's place, as
 * `z12`. A variable is fetched where it is first read and put back after it was last changed, so that few are alive at a time. Letters
 * without a home are for what nobody else reads. It gives 1, or 0 where a demand is not met.
 */
export class StraightCode {
  private readonly statements: Statement[] = [];
  private locals = 0;

  constructor(private readonly homes: Readonly<Record<string, Home>>) {}

  get length(): number {
    return this.statements.length;
  }

  /** The whole of it, as a name for what it becomes. */
  get text(): string {
    const homes = Object.entries(this.homes).map(([letter, { start, kept }]) => `${letter}:${start},${kept}`);
    const lines = this.statements.map(({ name, expression }) => `${name ?? ""}=${expression}`);
    return [...homes, ...lines].join("\n");
  }

  /** A new variable for the value of an expression. */
  let(expression: string): string {
    const name = `t${this.locals++}`;
    this.statements.push({ name, expression });
    return name;
  }

  /** Gives a variable a value. */
  set(name: string, expression: string): void {
    this.statements.push({ name, expression });
  }

  /** Asks for a comparison to hold. */
  demand(comparison: string): void {
    this.statements.push({ name: null, expression: comparison });
  }

  /** Calls another function of the module, numbered from 0, between two statements; what it needs must have been put back. */
  call(number: number): void {
    this.statements.push({ name: null, expression: `${number}` });
  }

  /** The code as a function of a module. */
  compile(name: string): FunctionBody {
    return new Compilation(name, this.statements, this.homes).body();
  }
}

/** Turns statements into bytes; variables of the function are used again for others once they are done with. */
class Compilation {
  private readonly bytes: number[] = [];
  private readonly lastUse = new Map<string, number>();
  private readonly lastChange = new Map<string, number>();
  private readonly locals = new Map<string, number>();
  private readonly free: number[] = [];
  private numbers = 0;

  constructor(
    private readonly name: string,
    private readonly statements: readonly Statement[],
    private readonly homes: Readonly<Record<string, Home>>,
  ) {
    for (const [k, { name: changed, expression }] of statements.entries()) {
      for (const read of variablesOf(expression)) this.lastUse.set(read, k);
      if (changed === null) continue;
      this.lastUse.set(changed, k);
      this.lastChange.set(changed, k);
    }
  }

  body(): FunctionBody {
    this.bytes.push(...integer(1), ...set(MET));
    for (const [k, { name, expression }] of this.statements.entries()) {
      if (name === null && /^\d+$/.test(expression)) {
        this.bytes.push(...get(0), OPCODE.call, ...unsigned(Number(expression)), OPCODE.drop);
        continue;
      }
      const read = variablesOf(expression);
      for (const variable of read) this.bring(variable);
      this.bytes.push(
        ...bytesOf(expression, (variable) => (variable === SHARE ? 0 : this.locals.get(variable)!)),
      );
      for (const variable of read) this.release(variable, k);
      if (name === null) this.bytes.push(...get(MET), OPCODE.and, ...set(MET));
      else this.keep(name, k);
    }
    this.bytes.push(...get(MET));
    const variables: Kind[] = [INTEGER, ...Array.from({ length: this.numbers }, () => NUMBER as Kind)];
    return { name: this.name, bytes: this.bytes, variables };
  }

  private bring(variable: string): void {
    if (this.locals.has(variable)) return;
    const local = this.take(variable);
    this.bytes.push(...integer(0), ...load(this.byteOf(variable)), ...set(local));
  }

  private keep(name: string, k: number): void {
    const local = this.locals.get(name) ?? this.take(name);
    this.bytes.push(...set(local));
    if (this.lastChange.get(name) === k && this.isKept(name)) {
      this.bytes.push(...integer(0), ...get(local), ...store(this.byteOf(name)));
    }
    this.release(name, k);
  }

  private take(variable: string): number {
    const local = this.free.pop() ?? FIRST_NUMBER + this.numbers++;
    this.locals.set(variable, local);
    return local;
  }

  private release(variable: string, k: number): void {
    const local = this.locals.get(variable);
    if (local === undefined || this.lastUse.get(variable)! > k) return;
    this.locals.delete(variable);
    this.free.push(local);
  }

  private isKept(name: string): boolean {
    const home = this.homes[name[0]!];
    return home !== undefined && Number(name.slice(1)) < home.kept;
  }

  private byteOf(name: string): number {
    return 8 * (this.homes[name[0]!]!.start + Number(name.slice(1)));
  }
}
