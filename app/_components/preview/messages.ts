import type { AxisDocument, Failure, ReadingDocument, RequirementDocument } from "@/lib/analyses/result";

/** What the preview is asked to show: the newest question alone counts. */
export interface PreviewQuestion {
  readonly number: number;
  readonly text: string;
  /** Knobs turned by hand, and the settings of outer sweeps: coherent SI values by name. */
  readonly turned: ReadonlyMap<string, number>;
  /** The place along the first sweep at which all values are read. */
  readonly place: number;
}

/** A knob of the text as a control shows it; values in coherent `unit`. */
export interface KnobOutline {
  readonly name: string;
  readonly unit: string;
  /** As the text has it. */
  readonly value: number;
  /** Where the text says it must stay; null where it says nothing. */
  readonly range: { readonly low: number; readonly high: number } | null;
  /** "first" where it is the horizontal axis, "outer" where it is another sweep, null where it is not swept. */
  readonly sweep: "first" | "outer" | null;
}

/** An element with the names of the figures that are known of it, such as `v` or `c.i`. */
export interface ElementOutline {
  readonly name: string;
  readonly model: string | null;
  readonly figures: readonly string[];
}

/** What a text without errors is about. `figures` below are in this order: nets, elements figure by figure, knobs, lets. */
export interface Outline {
  readonly title: string;
  readonly axes: readonly AxisDocument[];
  readonly traces: readonly { readonly name: string; readonly unit: string }[];
  readonly knobs: readonly KnobOutline[];
  readonly nets: readonly string[];
  readonly elements: readonly ElementOutline[];
  readonly lets: readonly { readonly name: string; readonly unit: string }[];
  readonly unknowns: number;
  readonly junctions: number;
  /** Operating points that a run looks for at each point; null for one. */
  readonly seek: number | null;
}

/**
 * How far a row is: "coarse" has some of its places alone, "unproved" all values without the proof of each, and "whole" is bit for bit what a
 * queued run comes to.
 */
export type Stage = "coarse" | "unproved" | "whole";

/** Curves at one setting, nominal. Columns have one value a place of `x`; NaN where unsolved. */
export interface Row {
  readonly stage: Stage;
  /** The first axis with the places solved, then the outer axes with one value each. */
  readonly axes: readonly AxisDocument[];
  /** Places that the whole row has. */
  readonly length: number;
  readonly traces: readonly {
    readonly name: string;
    readonly unit: string;
    readonly values: Float64Array;
  }[];
  /** Index into OUTCOMES and RUNGS. */
  readonly outcome: Float64Array;
  readonly rung: Float64Array;
  readonly iterations: Float64Array;
  /** V; NaN where not proved. */
  readonly bound: Float64Array;
  readonly failures: readonly Failure[];
  readonly readings: readonly ReadingDocument[];
  readonly requirements: readonly RequirementDocument[];
  /** Readings and requirements of other settings than this one, by their names. */
  readonly elsewhere: readonly string[];
  /** Kelvin. */
  readonly temperature: number;
  /** Time that solving took, ms. */
  readonly taken: number;
}

/** Every figure at one place of the row, in the order of the outline; NaN where it is not solved. */
export interface Figures {
  readonly place: number;
  readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
  readonly values: Float64Array;
}

/** Why a sweep is not shown whole. `pace` is the time of a point, ms; `points` those of the row. */
export interface TooLarge {
  readonly points: number;
  readonly pace: number;
}

export type PreviewAnswer = { readonly number: number } & (
  | { readonly kind: "wrong"; readonly errors: number }
  | { readonly kind: "outline"; readonly outline: Outline }
  | { readonly kind: "row"; readonly row: Row }
  | { readonly kind: "figures"; readonly figures: Figures }
  | { readonly kind: "too large"; readonly why: TooLarge }
  /** Nothing more comes for this question. */
  | { readonly kind: "done" }
);
