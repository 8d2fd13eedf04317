import { expm1, exponentials } from "@/lib/devices/exponential";
import { compiled, type Warmth } from "./compiled";
import type { State } from "./state";

/** Statements and entries of generated code at most: each takes up to 40 bytes of the 60 kB beyond which V8 no longer optimises. */
const MOST_STATEMENTS = 1500;

/** One term of a sum that ends up in an array; without operator, the whole of it. */
interface Sum {
  readonly array: "r" | "s" | "j";
  readonly index: number;
  readonly operator: "+" | "-" | "";
  readonly by: string;
}

/** An assembly as generated code. */
export interface WrittenAssembly {
  readonly run: () => void;
  readonly warmth: Warmth;
}

type Maker = (
  state: State,
  constantSlopes: Float64Array,
  objects: readonly object[],
  exponents: Float64Array,
  less: Float64Array,
  whole: Float64Array,
  together: typeof exponentials,
  one: typeof expm1,
) => () => void;

/**
 * The assembly of a system as straight code: every sum in a variable of its own, every place a number. Parts write themselves
 * into it, with the same operations in the same order as their `addTo`. Names in it are those of the program (no build may rename
 * properties); of the user's there is nothing, not even a number: figures are read from the parts.
 */
export class AssemblyCode {
  private readonly lines: (string | Sum)[] = [];
  private readonly objects: object[] = [];
  private readonly voltages = new Set<number>();
  private readonly early: string[] = [];
  private exponents = 0;
  private locals = 0;

  /** `ground` is the number of ground, one past the last unknown. */
  constructor(private readonly ground: number) {}

  /** The name of an object whose figures the code reads. */
  object(object: object): string {
    return `o${this.objects.push(object) - 1}`;
  }

  add(statement: string): void {
    if (!this.isFull) this.lines.push(statement);
  }

  /** A variable with the value of an expression. */
  let(expression: string): string {
    const name = `t${this.locals++}`;
    this.add(`let ${name}=${expression};`);
    return name;
  }

  /** A variable as of `let`, known before all exponentials are worked out. */
  first(expression: string): string {
    const name = `t${this.locals++}`;
    if (!this.isFull) this.early.push(`const ${name}=${expression};`);
    return name;
  }

  /**
   * Variables with e^y − 1 and e^y, in the same bytes as `expm1` and, below −1, `exp`; above −1 the second is the first plus 1. All
   * exponentials of a system are worked out together, so that y may hold nothing but what `first` gives.
   */
  exponentials(y: string): { less: string; whole: string } {
    const k = this.exponents++;
    if (!this.isFull) this.early.push(`Y[${k}]=${y};`);
    return { less: this.let(`E[${k}]`), whole: this.let(`T[${k}]`) };
  }

  private get isFull(): boolean {
    return this.lines.length > MOST_STATEMENTS;
  }

  /** As `across` of a state. */
  across(a: number, b: number): string {
    const x = (i: number) => (i === this.ground ? "0" : `x${this.known(i)}`);
    const low = (i: number) => (i === this.ground ? "0" : `l${this.known(i)}`);
    return `(${x(a)}-${x(b)}+(${low(a)}-${low(b)}))`;
  }

  /** The two parts of an unknown, for a branch current. */
  unknown(i: number): string {
    return `(x${this.known(i)}+l${i})`;
  }

  high(i: number): string {
    return i === this.ground ? "0" : `x${this.known(i)}`;
  }

  private known(i: number): number {
    if (!this.voltages.has(i)) this.add(`const x${i}=x[${i}],l${i}=l[${i}];`);
    this.voltages.add(i);
    return i;
  }

  /** As `flow` of a state; `amperes` is the name of a variable. */
  flow(a: number, b: number, amperes: string): void {
    const size = this.let(`Math.abs(${amperes})`);
    this.sum("r", a, "+", amperes);
    this.sum("s", a, "+", size);
    this.sum("r", b, "-", amperes);
    this.sum("s", b, "+", size);
  }

  /** Adds to the scale of a row. */
  widen(row: number, by: string): void {
    this.sum("s", row, "+", by);
  }

  /** The mismatch of a branch law, and the magnitudes that it sums. */
  law(row: number, mismatch: string, size: string): void {
    this.sum("r", row, "", mismatch);
    this.sum("s", row, "", size);
  }

  /** Adds to the Jacobian. */
  slope(place: number, operator: "+" | "-", expression: string): void {
    if (place !== 0) this.sum("j", place, operator, expression);
  }

  private sum(array: Sum["array"], index: number, operator: Sum["operator"], by: string): void {
    if (array !== "j" && index === this.ground) return;
    if (!this.isFull) this.lines.push({ array, index, operator, by });
  }

  /**
   * The code as a function over a state whose Jacobian holds the constant slopes wherever none but them is added; null where it
   * is too long, or none may be generated here.
   */
  compile(state: State, constantSlopes: Float64Array): WrittenAssembly | null {
    if (this.lines.length + constantSlopes.length > MOST_STATEMENTS) return null;
    const text = [
      "const {x,low:l,residual:r,scale:s,jacobian:j}=state;",
      ...this.objects.map((_, k) => `const o${k}=objects[${k}];`),
      "return function assemble(){",
      "const share=state.share;",
      ...this.early,
      this.exponents === 0 ? "" : `exponentials(Y,E,T,${this.exponents});`,
      ...this.written(),
      "};",
    ].join("\n");
    const found = compiled<Maker>("state,c,objects,Y,E,T,exponentials,expm1", text);
    if (found === null) return null;
    const array = () => new Float64Array(this.exponents);
    const run = found.made(
      state,
      constantSlopes,
      this.objects,
      array(),
      array(),
      array(),
      exponentials,
      expm1,
    );
    return { run, warmth: found.warmth };
  }

  /** The lines with each sum in a variable from its first to its last term, so that few are alive at a time. */
  private written(): string[] {
    const remaining = new Map<string, number>();
    const nameOf = ({ array, index }: Pick<Sum, "array" | "index">) => `${array}${index}`;
    for (const line of this.lines) {
      if (typeof line !== "string") remaining.set(nameOf(line), (remaining.get(nameOf(line)) ?? 0) + 1);
    }
    const begun = new Set<string>();
    const lines = this.lines.map((line) => {
      if (typeof line === "string") return line;
      const { array, index, operator, by } = line;
      const name = nameOf(line);
      const before = begun.has(name) ? name : array === "j" ? `c[${index}]` : "0";
      const value = operator === "" ? by : `${before}${operator}(${by})`;
      const left = remaining.get(name)! - 1;
      remaining.set(name, left);
      if (left === 0) return `${array}[${index}]=${value};`;
      if (begun.has(name)) return `${name}=${value};`;
      begun.add(name);
      return `let ${name}=${value};`;
    });
    for (let i = 0; i < this.ground; i++) {
      for (const array of ["r", "s"]) if (!remaining.has(`${array}${i}`)) lines.push(`${array}[${i}]=0;`);
    }
    return lines;
  }
}
