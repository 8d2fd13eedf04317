import type { Dimension } from "@/lib/units/dimension";
import type { Span } from "./span";

/* ---------- what the parser makes: the text as written ---------- */

/** A word of the text with its place. */
export interface Word extends Span {
  readonly text: string;
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
  | (Span & { readonly kind: "call"; readonly callee: Word; readonly args: readonly Expression[] })
  | (Span & { readonly kind: "hole" });

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
  /** What could not be read. `declares` is the name it would have introduced, so that its uses stay quiet. */
  | (Span & { readonly kind: "broken"; readonly declares: Word | null });

export interface Netlist {
  readonly statements: readonly Statement[];
}

/* ---------- what the checker makes: names resolved, units checked, numbers in coherent SI ---------- */

/**
 * A checked expression; `dimension` is that of its value. Names of knobs and lets are resolved, `temperature` and
 * `V_T` are read at the point being solved. `pair` compares and chooses, for `if` and relations.
 */
export type Typed = { readonly dimension: Dimension } & (
  | { readonly op: "constant"; readonly value: number }
  | { readonly op: "knob"; readonly name: string }
  | { readonly op: "let"; readonly name: string }
  | { readonly op: "thermal voltage" }
  | { readonly op: "signal"; readonly signal: Signal }
  | { readonly op: "negate"; readonly operand: Typed }
  | {
      readonly op: "+" | "-" | "*" | "/" | "^" | "<=" | ">=" | "<" | ">";
      readonly left: Typed;
      readonly right: Typed;
    }
  | { readonly op: "call"; readonly callee: FunctionName; readonly args: readonly Typed[] }
);

export type FunctionName = "exp" | "ln" | "log10" | "sqrt" | "abs" | "min" | "max" | "tanh" | "atan" | "if";

/** What a trace can be made of: a net's voltage to ground; an element's voltage, current, power; a pin's current. */
export type Signal =
  | { readonly of: "net"; readonly net: string }
  | { readonly of: "element"; readonly element: string; readonly quantity: "v" | "i" | "p" }
  | { readonly of: "pin"; readonly element: string; readonly pin: string };

/** Half-width in the unit of the value it belongs to, or relative (a pure number) to it. */
export interface Tolerance {
  readonly amount: number;
  readonly relative: boolean;
  readonly law: "uniform" | "normal";
  /** How many standard deviations `amount` stands for; 1 for a uniform law. */
  readonly sigmas: number;
  readonly track: { readonly group: string; readonly within: number; readonly relative: boolean } | null;
}

export interface NamedValue extends Span {
  readonly name: string;
  readonly value: Typed;
  readonly tolerance: Tolerance | null;
}

export interface Knob extends NamedValue {
  readonly range: { readonly low: number; readonly high: number } | null;
}

export type TwoTerminalKind = "resistor" | "voltage" | "current" | "diode";
export type ModelKind = "diode" | "npn" | "pnp" | "opamp";
export type ElementKind = TwoTerminalKind | ModelKind;

export interface Model extends Span {
  readonly name: string;
  readonly kind: ModelKind;
  /** Only what the text gives; a parameter left out drops its term exactly. Keys as in kinds.ts. */
  readonly params: ReadonlyMap<string, NamedValue>;
}

/**
 * A wired element. `pins` holds a net name for every pin of its kind (kinds.ts); `value` is the ohms, volts or amperes of a
 * resistor, voltage or current element, null for those that follow a model. `params` holds what the text gives beyond it,
 * such as a resistor's `drift`.
 */
export interface Element extends Span {
  readonly name: string;
  readonly kind: ElementKind;
  readonly pins: Readonly<Record<string, string>>;
  readonly value: NamedValue | null;
  readonly model: string | null;
  readonly params: ReadonlyMap<string, NamedValue>;
}

/** A sweep with every value worked out, in coherent SI units and in the order to be solved. */
export interface Sweep extends Span {
  readonly knob: string;
  readonly dimension: Dimension;
  readonly scale: "logarithmic" | "linear" | "list";
  readonly values: readonly number[];
}

export interface Show extends Span {
  /** The name given, or the expression as the formatter writes it. */
  readonly name: string;
  readonly value: Typed;
}

/**
 * The whole meaning of a netlist without errors. `ground` is not among `nets`; `temperature` is always among `knobs`. The value
 * of a knob is always a constant, its default.
 */
export interface Design {
  readonly title: string;
  readonly knobs: readonly Knob[];
  /** In an order in which each uses only those before it. */
  readonly lets: readonly NamedValue[];
  readonly models: readonly Model[];
  readonly elements: readonly Element[];
  readonly nets: readonly string[];
  /** Where each net is first named. */
  readonly netPlaces: ReadonlyMap<string, Span>;
  readonly sweeps: readonly Sweep[];
  readonly shows: readonly Show[];
}
