import { get, NUMBER, number, OPCODE, unsigned } from "./module";

/** The number of the function e^y − 1 in every module. */
export const EXPM1 = 0;

/** A word of an expression: a number, a variable as `z12`, `abs`, `expm1`, or a sign. */
const WORD = /\d+(?:\.\d+)?(?:e[+-]?\d+)?|[a-z]+\d*|<=|[-+*/()?:>]/g;

/** The variables that an expression reads. */
export function variablesOf(expression: string): readonly string[] {
  return expression.match(/\b[a-z]\d+\b/g) ?? [];
}

/**
 * The bytes that leave the value of an expression on the stack: the four operations, signs, abs(…), expm1(…), brackets, and `a>b?c:d` or
 * a comparison alone, which leaves an integer. Operations of one rank go from the left, as written.
 */
export function bytesOf(expression: string, localOf: (variable: string) => number): number[] {
  return new Reader(expression.match(WORD) ?? [], localOf).whole();
}

class Reader {
  private at = 0;
  private readonly bytes: number[] = [];

  constructor(
    private readonly words: readonly string[],
    private readonly localOf: (variable: string) => number,
  ) {}

  whole(): number[] {
    this.choice();
    if (this.at !== this.words.length)
      throw new Error(`Generated code has a word too many: ${this.words.join("")}`);
    return this.bytes;
  }

  private is(word: string): boolean {
    if (this.words[this.at] !== word) return false;
    this.at += 1;
    return true;
  }

  private choice(): void {
    this.sum();
    const isGreater = this.is(">");
    if (!isGreater && !this.is("<=")) return;
    this.sum();
    this.bytes.push(isGreater ? OPCODE.greater : OPCODE.lessOrEqual);
    if (!this.is("?")) return;
    this.bytes.push(OPCODE.if, NUMBER);
    this.sum();
    this.is(":");
    this.bytes.push(OPCODE.else);
    this.choice();
    this.bytes.push(OPCODE.end);
  }

  private sum(): void {
    this.product();
    for (;;) {
      const isPlus = this.is("+");
      if (!isPlus && !this.is("-")) return;
      this.product();
      this.bytes.push(isPlus ? OPCODE.add : OPCODE.subtract);
    }
  }

  private product(): void {
    this.factor();
    for (;;) {
      const isTimes = this.is("*");
      if (!isTimes && !this.is("/")) return;
      this.factor();
      this.bytes.push(isTimes ? OPCODE.multiply : OPCODE.divide);
    }
  }

  private factor(): void {
    if (this.is("-")) {
      this.factor();
      this.bytes.push(OPCODE.negate);
      return;
    }
    const isAbs = this.is("abs");
    const isExpm1 = this.is("expm1");
    if (this.is("(")) {
      this.choice();
      this.is(")");
      if (isAbs) this.bytes.push(OPCODE.abs);
      if (isExpm1) this.bytes.push(OPCODE.call, ...unsigned(EXPM1));
      return;
    }
    const word = this.words[this.at++]!;
    this.bytes.push(...(/^\d/.test(word) ? number(Number(word)) : get(this.localOf(word))));
  }
}
