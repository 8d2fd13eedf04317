/** A formula as it is set: rows of names, numbers and signs, with scripts, fractions and roots. */
export type Term =
  | { readonly kind: "row"; readonly terms: readonly Term[] }
  | { readonly kind: "name" | "number" | "sign" | "words"; readonly text: string }
  | { readonly kind: "scripts"; readonly base: Term; readonly under: Term | null; readonly over: Term | null }
  | { readonly kind: "fraction"; readonly top: Term; readonly bottom: Term }
  | { readonly kind: "root" | "brackets"; readonly of: Term };

const NAME = /(?:(?!Σ)\p{L})+/uy;
const NUMBER = /\d+(?:\.\d+)?/uy;
const WORDS = /"([^"]*)"/uy;

/**
 * Reads a formula from a line of text: `V_T = frac{k T}{q}`, `I_s (e^{V/η} − 1)`, `sqrt{1 + x}`, `big{…}` in brackets as high as it is, `"words"`. A run of letters is one
 * name, so a product wants a blank; braces group without being seen. Throws a SyntaxError, which only a mistake in this folder can cause.
 */
export function parseFormula(text: string): Term {
  const reader = new Reader(text);
  const row = reader.row();
  if (!reader.isDone) throw new SyntaxError(`The formula has a brace too many: ${text}`);
  return row;
}

class Reader {
  private at = 0;

  constructor(private readonly text: string) {}

  get isDone(): boolean {
    return this.at >= this.text.length;
  }

  row(): Term {
    const terms: Term[] = [];
    for (;;) {
      this.blank();
      if (this.isDone || this.text[this.at] === "}") break;
      terms.push(this.scripted());
    }
    return terms.length === 1 ? terms[0]! : { kind: "row", terms };
  }

  private scripted(): Term {
    const base = this.atom();
    let under: Term | null = null;
    let over: Term | null = null;
    for (;;) {
      if (this.accept("_")) under = this.atom();
      else if (this.accept("^")) over = this.atom();
      else break;
    }
    return under === null && over === null ? base : { kind: "scripts", base, under, over };
  }

  private atom(): Term {
    if (this.accept("{")) return this.closed();
    const words = this.match(WORDS);
    if (words !== null) return { kind: "words", text: words[1]! };
    const number = this.match(NUMBER);
    if (number !== null) return { kind: "number", text: number[0] };
    const name = this.match(NAME);
    if (name === null) {
      const sign = String.fromCodePoint(this.text.codePointAt(this.at) ?? 32);
      this.at += sign.length;
      return { kind: "sign", text: sign };
    }
    if (name[0] === "frac") return { kind: "fraction", top: this.group(), bottom: this.group() };
    if (name[0] === "big") return { kind: "brackets", of: this.group() };
    if (name[0] === "sqrt") return { kind: "root", of: this.group() };
    return { kind: "name", text: name[0] };
  }

  private group(): Term {
    if (!this.accept("{")) throw new SyntaxError(`A brace is wanted at ${this.at}: ${this.text}`);
    return this.closed();
  }

  private closed(): Term {
    const row = this.row();
    if (!this.accept("}")) throw new SyntaxError(`A brace is not closed: ${this.text}`);
    return row;
  }

  private accept(mark: string): boolean {
    const is = this.text[this.at] === mark;
    if (is) this.at += 1;
    return is;
  }

  private blank(): void {
    while (this.text[this.at] === " ") this.at += 1;
  }

  private match(pattern: RegExp): RegExpExecArray | null {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text);
    if (found !== null) this.at += found[0].length;
    return found;
  }
}

/** The formula read aloud in signs, for those to whom mathematics is text. */
export function spoken(text: string): string {
  return text
    .replace(/\bbig\{([^{}]*(?:\{[^{}]*\}[^{}]*)*)\}/gu, "($1)")
    .replace(/frac\{([^{}]*)\}\{([^{}]*)\}/gu, "($1)/($2)")
    .replace(/[{}"]/gu, "");
}
