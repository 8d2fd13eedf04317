import type { Span } from "./span";

/** Families of language.md: characters, form, names, units, wiring, plan, contract, size limits. */
export type Family = "TXT" | "FRM" | "NAM" | "UNI" | "WIR" | "PLN" | "CON" | "CAP";

/** A replacement that mends the problem: put `text` over [from, to). `title` is the button's label. */
export interface Fix extends Span {
  readonly title: string;
  readonly text: string;
}

/** A problem of the netlist text. Source problems are always data, never thrown. */
export interface Diagnostic extends Span {
  /** Stable, such as "NAM3": family and number, without a space. */
  readonly code: `${Family}${number}`;
  readonly severity: "error" | "warning";
  /** One sentence that says what is wrong and, where it can, how to mend it. */
  readonly message: string;
  readonly fix?: Fix;
}

/** The fix that takes a stretch of the text out. */
export function removal({ from, to }: Span): Fix {
  return { title: "Remove it", from, to, text: "" };
}
