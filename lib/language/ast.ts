import type { Dimension } from "@/lib/units/dimension";
import type { Span } from "./span";

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
  | Reduced
);

/**
 * What is worked out from the traces of a run and not at a point being solved: a trace by the name of its show, a reading by its
 * name, a reduction of traces. `at` is the binding of `at(trace, KNOB = value)`. Only in readings and requirements, which have
 * no signals of their own: what they name is kept as a trace.
 */
export type Reduced =
  | {
      readonly op: "reduce";
      readonly reduction: ReductionName;
      readonly args: readonly Typed[];
      readonly at: { readonly knob: string; readonly value: number } | null;
    }
  | { readonly op: "trace" | "reading"; readonly name: string };

/** `deviation` and `error_from` give one value a point, the others one a sweep. */
export type ReductionName =
  | "highest"
  | "lowest"
  | "mean"
  | "span"
  | "per_decade"
  | "per_unit"
  | "intercept"
  | "deviation"
  | "error_from"
  | "reach"
  | "decades_where"
  | "at";

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

export type TwoTerminalKind = "resistor" | "voltage" | "current" | "diode" | "law";
export type ModelKind = "diode" | "npn" | "pnp" | "opamp";
export type ElementKind = TwoTerminalKind | ModelKind | "gain";

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
  /**
   * Of a law alone: the voltage of plus above minus in V, or the current from plus to minus through the element in A, as an expression
   * that may use signals.
   */
  readonly law: { readonly quantity: "volts" | "amps"; readonly value: Typed } | null;
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

/** Points at which a knob lies between `low` and `high` (coherent SI, `low` ≤ `high`); `at KNOB = A` has both the same. */
export interface Window extends Span {
  readonly knob: string;
  readonly low: number;
  readonly high: number;
}

/** A number per sweep of the first knob. */
export interface Reading extends Span {
  readonly name: string;
  readonly value: Typed;
  readonly windows: readonly Window[];
}

export type Relation =
  | { readonly kind: "compare"; readonly operator: "<=" | ">=" | "<" | ">"; readonly bound: Typed }
  /** `half` in the unit of the target, or, where `relative`, a pure number that multiplies it. */
  | { readonly kind: "within"; readonly target: Typed; readonly half: Typed; readonly relative: boolean }
  | { readonly kind: "between"; readonly low: Typed; readonly high: Typed }
  | { readonly kind: "rising" | "falling" };

export interface Requirement extends Span {
  /** The text given after `as`, or the requirement as the formatter writes it. */
  readonly label: string;
  readonly value: Typed;
  readonly relation: Relation;
  readonly windows: readonly Window[];
  /** The share of the draws in which it must hold, 0 to 1; null: in every one. */
  readonly share: number | null;
}

/**
 * The whole meaning of a netlist without errors. Blocks are taken apart: what stands inside an instance `S` has a dotted name
 * (`S.Q`, `S.x`). `ground` is not among `nets`; `temperature` is always among `knobs`. The value
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
  /** Random draws of the tolerances beside the nominal one; null where none are asked for. */
  readonly draws: { readonly count: number; readonly seed: number } | null;
  /** Operating points to look for at each setting; null where one is enough. */
  readonly seek: number | null;
  readonly reads: readonly Reading[];
  readonly requirements: readonly Requirement[];
}
