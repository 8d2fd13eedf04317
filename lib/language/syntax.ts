import type { Span } from "./span";

/* What the parser makes: the text as written. */

/** A word of the text with its place. */
export interface Word extends Span {
  readonly text: string;
  /** Where blocks were taken apart: what stands before its own name in `text`, such as `S.`. */
  readonly prefix?: string;
  /** For a net inside a block that is one of its ports: the port, such as `S.in`, and those of blocks around that it leads through. */
  readonly through?: readonly string[];
}

export type UnaryOperator = "-" | "+";
export type BinaryOperator = "+" | "-" | "*" | "/" | "^" | "<=" | ">=" | "<" | ">";

/** An expression as written. `hole` stands where the parser found none, so that later phases stay quiet. */
export type Expression =
  | (Span & { readonly kind: "number"; readonly value: number; readonly unit: Word | null })
  | (Span & { readonly kind: "name"; readonly path: readonly Word[] })
  | (Span & { readonly kind: "unary"; readonly operator: UnaryOperator; readonly operand: Expression })
  | (Span & {
      readonly kind: "binary";
      readonly operator: BinaryOperator;
      readonly left: Expression;
      readonly right: Expression;
    })
  /** `bindings` are arguments of the form `KNOB = value`, as in `at(trace, KNOB = value)`; they stand after the others. */
  | (Span & {
      readonly kind: "call";
      readonly callee: Word;
      readonly args: readonly Expression[];
      readonly bindings: readonly Binding[];
    })
  | (Span & { readonly kind: "hole" });

/** `KNOB = value` among the arguments of a call. */
export interface Binding extends Span {
  readonly name: Word;
  readonly value: Expression;
}

/** `± 1 %` or `± 50 Ω`, then `uniform` or `normal 3 sigma`, then `track GROUP within 0.05 %`. */
export interface ToleranceSyntax extends Span {
  readonly amount: Expression;
  readonly law: "uniform" | "normal";
  readonly sigmas: number | null;
  readonly track: { readonly group: Word; readonly within: Expression | null } | null;
}

/** `name = value [tolerance]` inside braces: a pin, a parameter. */
export interface Setting extends Span {
  readonly name: Word;
  readonly value: Expression;
  readonly tolerance: ToleranceSyntax | null;
}

/** One element of a path: `NAME : kind [MODEL] [value] [tolerance] [{ param = value, … }]`. */
export interface PathPart extends Span {
  readonly name: Word;
  readonly kind: Word;
  readonly value: Expression | null;
  readonly tolerance: ToleranceSyntax | null;
  readonly settings: readonly Setting[];
}

export type SweepRange =
  | {
      readonly kind: "range";
      readonly start: Expression;
      readonly stop: Expression;
      readonly spacing: "per decade" | "points" | "step";
      readonly amount: Expression;
    }
  | { readonly kind: "list"; readonly values: readonly Expression[] };

/** `for KNOB in low .. high`, or `at KNOB = low`, where `high` is null. */
export interface WindowSyntax extends Span {
  readonly knob: Word;
  readonly low: Expression;
  readonly high: Expression | null;
}

export type RelationSyntax =
  | { readonly kind: "compare"; readonly operator: "<=" | ">=" | "<" | ">"; readonly bound: Expression }
  | { readonly kind: "within"; readonly target: Expression; readonly half: Expression }
  | { readonly kind: "between"; readonly low: Expression; readonly high: Expression }
  | { readonly kind: "rising" | "falling" };

/** `whole` is false where something in the statement could not be read; what could be is kept. */
export type Statement = { readonly whole: boolean } & StatementForm;

export type StatementForm =
  | (Span & { readonly kind: "title"; readonly text: Word })
  | (Span & {
      readonly kind: "let" | "knob";
      readonly name: Word;
      readonly value: Expression;
      readonly tolerance: ToleranceSyntax | null;
      readonly range: { readonly low: Expression; readonly high: Expression } | null;
    })
  | (Span & {
      readonly kind: "model";
      readonly name: Word;
      readonly of: Word;
      readonly settings: readonly Setting[];
    })
  | (Span & { readonly kind: "path"; readonly nets: readonly Word[]; readonly parts: readonly PathPart[] })
  | (Span & {
      readonly kind: "device";
      readonly name: Word;
      readonly of: Word;
      readonly settings: readonly Setting[];
    })
  | (Span & { readonly kind: "sweep"; readonly knob: Word; readonly range: SweepRange })
  | (Span & {
      readonly kind: "show";
      readonly items: readonly (Span & { readonly name: Word | null; readonly value: Expression })[];
    })
  /** `use "shelf-name" revision 3`; null without a revision. */
  | (Span & { readonly kind: "use"; readonly shelf: Word; readonly revision: Expression | null })
  /** `block NAME(net, …) { … }`; its head ends at `headTo`. `isClosed` is false where its brace is missing. */
  | (Span & {
      readonly kind: "block";
      readonly name: Word;
      readonly ports: readonly Word[];
      readonly statements: readonly Statement[];
      readonly headTo: number;
      readonly isClosed: boolean;
    })
  | (Span & { readonly kind: "draws"; readonly count: Expression; readonly seed: Expression })
  | (Span & { readonly kind: "seek"; readonly count: Expression })
  | (Span & {
      readonly kind: "read";
      readonly name: Word;
      readonly value: Expression;
      readonly windows: readonly WindowSyntax[];
    })
  /** `require value relation [windows] [in share of draws] [as label]`; the label without its quotation marks. */
  | (Span & {
      readonly kind: "require";
      readonly value: Expression;
      readonly relation: RelationSyntax;
      readonly windows: readonly WindowSyntax[];
      readonly share: Expression | null;
      readonly label: Word | null;
    })
  /** What could not be read. `declares` is the name it would have introduced, so that its uses stay quiet. */
  | (Span & { readonly kind: "broken"; readonly declares: Word | null });

export interface Netlist {
  readonly statements: readonly Statement[];
}
