import type { Diagnostic } from "@/lib/language/diagnostic";
import type { OutcomeKind, Rung } from "@/lib/solver/outcome";
import type { BranchesDocument } from "./branches-document";
import type { PointRange } from "./strands";
import type { Yield } from "./yield";

/** One axis of a run: the first sweep first. `values` in coherent SI units (temperature in K). */
export interface AxisDocument {
  readonly knob: string;
  readonly unit: string;
  readonly scale: "logarithmic" | "linear" | "list";
  readonly values: readonly number[];
  /** In the outline of a plan: how many values there are, where `values` has but the first and the last of them. */
  readonly count?: number;
}

export interface TraceDocument {
  readonly name: string;
  readonly unit: string;
  /** Flat, the first axis fastest, then the outer axes, then draws; null where unsolved. */
  readonly values: readonly (number | null)[];
}

export type Verdict = "holds" | "broken" | "no data";

/** A reading: one value a sweep of the first knob (then the outer axes, then draws), or one a point where it is a trace itself. */
export interface ReadingDocument {
  readonly name: string;
  readonly unit: string;
  readonly per: "sweep" | "point";
  readonly values: readonly (number | null)[];
}

export interface RequirementDocument {
  readonly label: string;
  readonly verdict: Verdict;
  /** Distance to what would break it, in `unit`, below 0 where it is broken; null where nothing is known. */
  readonly margin: number | null;
  readonly unit: string;
  /** Where the margin was found. With a share of the draws, the draw that decides the share. */
  readonly worst: {
    readonly draw: number;
    readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
    /** The branch of that row on which it lies, counted from 0, where the sweep does not follow it. */
    readonly branch?: number;
  } | null;
  /**
   * Where the text seeks several operating points, the above is over all stable ones that were found; this is what it comes to at those alone
   * that the sweep follows.
   */
  readonly followed?: { readonly verdict: Verdict; readonly margin: number | null };
  /** What a reader must know besides, in sentences: that it is broken where the sweep does not go, or that points are unknown. */
  readonly remark?: string;
  /** The random draws in which it holds, where there are any. */
  readonly yield?: Yield;
  /** The share of the draws in which it must hold, 0 to 1; null: in every one. */
  readonly share: number | null;
  /** The limits of what it compares, in `unit`, at the worst place; null on a side without one, or where they are not known. */
  readonly allowed: { readonly low: number | null; readonly high: number | null };
  /**
   * What it compares, in `unit`: at the worst place of the nominal design and of all, and the least and the most over points and
   * draws. Where the limits differ from point to point, as those of the worst place show it (spread.ts). Null where not known.
   */
  readonly value: {
    readonly nominal: number | null;
    readonly worst: number | null;
    readonly low: number | null;
    readonly high: number | null;
  };
  /** What it compares at the worst place of each draw, the nominal design first, likewise. */
  readonly drawn: readonly (number | null)[];
  /** The parts of the sweeps that it looks at; ends in coherent SI units, both the same for a single value. */
  readonly windows: readonly { readonly knob: string; readonly low: number; readonly high: number }[];
  /** The trace, or reading per point, whose own values it bounds, with the bounds that hold at all its points; null otherwise. */
  readonly bounds: {
    readonly trace: string;
    readonly low: number | null;
    readonly high: number | null;
  } | null;
  /** The reading per sweep that it bounds, with its limits at each setting of the outer axes, null where it has none; else null. */
  readonly reading: {
    readonly name: string;
    readonly limits: readonly { readonly low: number | null; readonly high: number | null }[];
  } | null;
}

/** A failed point with its reason, for people. */
export interface Failure {
  readonly point: number;
  readonly outcome: Exclude<OutcomeKind, "converged">;
  readonly unsettled: readonly string[];
}

/** The run document of product.md. Before all shards are in, points not yet solved have outcome null and values null. */
export interface RunDocument {
  readonly format: "sweepwright-run/1";
  readonly title: string;
  readonly verdict: Verdict;
  readonly axes: readonly AxisDocument[];
  /** Random draws of the tolerances; draw 0, nominal, comes before them. */
  readonly draws: number;
  readonly traces: readonly TraceDocument[];
  readonly points: {
    readonly outcome: readonly (OutcomeKind | null)[];
    /** V; null where the point is not solved or not proved. */
    readonly bound: readonly (number | null)[];
    readonly iterations: readonly number[];
    readonly rung: readonly (Rung | null)[];
  };
  readonly readings: readonly ReadingDocument[];
  readonly requirements: readonly RequirementDocument[];
  readonly diagnostics: readonly (Diagnostic & { readonly line: number; readonly column: number })[];
  readonly failures: readonly Failure[];
  /**
   * Flat points [from, to) that are solved, and that the circuit would leave: an odd number of modes grows there. Absent where there are none.
   * That a point is not among them does not prove it stable; the branches of a text that seeks say so.
   */
  readonly unstable?: readonly PointRange[];
  /** All operating points, where the text asks for several. */
  readonly branches?: readonly BranchesDocument[];
}

/**
 * What one shard computes, for the flat points [from, to). Columns are Float64Array of length to − from, NaN where unsolved.
 * `outcome` and `rung` hold the index into OUTCOMES and RUNGS.
 */
export interface ShardResult {
  readonly from: number;
  readonly to: number;
  /** One column a trace, in the order of the plan. */
  readonly traces: readonly Float64Array[];
  /** One column an unknown of the circuit (net voltages in V, then branch currents in A), in the order of the plan. */
  readonly unknowns: readonly Float64Array[];
  readonly outcome: Float64Array;
  readonly iterations: Float64Array;
  readonly residual: Float64Array;
  /** V within which a true solution is proved to lie of each net voltage; NaN where not solved or not proved. */
  readonly bound: Float64Array;
  readonly rung: Float64Array;
  readonly failures: readonly Failure[];
  /** Those of its points that the circuit would leave. */
  readonly unstable: readonly PointRange[];
}
