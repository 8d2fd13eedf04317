import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { AxisDocument, Failure, Verdict } from "@/lib/analyses/result";
import type { OutcomeKind } from "@/lib/solver/outcome";
import type { Column } from "./columns";

export interface CurveTrace {
  readonly name: string;
  readonly unit: string;
  /** Flat, the first axis fastest, then the outer axes, then draws. */
  readonly values: Column;
}

/** A sweep; one whose values are no quantities, such as the runs laid over each other, has a name for each. */
export interface CurveAxis extends AxisDocument {
  readonly names?: readonly string[];
}

/** A requirement as far as a plot shows it: which draw is its worst. */
export interface CurveRequirement {
  readonly label: string;
  readonly verdict: Verdict;
  readonly worst: { readonly draw: number } | null;
}

/**
 * What curves are drawn from. A run document is one as it stands, and so is its binary form, whose columns are Float64Array with NaN
 * where unsolved; while nothing is solved, a plan with empty columns serves.
 */
export interface CurveSource {
  readonly axes: readonly CurveAxis[];
  readonly traces: readonly CurveTrace[];
  readonly points: {
    readonly outcome: readonly (OutcomeKind | null)[];
    /** A true solution lies within so many volts; null or NaN without a proof. Absent while nothing is solved. */
    readonly bound?: Column;
  };
  /** Random draws; draw 0, nominal, comes before them. */
  readonly draws?: number;
  /** Those per point are drawn below the traces. */
  readonly readings?: readonly (CurveTrace & { readonly per: "sweep" | "point" })[];
  /** The same, where they come as columns by themselves. */
  readonly read?: readonly CurveTrace[];
  readonly requirements?: readonly CurveRequirement[];
  readonly failures?: readonly Failure[];
  readonly branches?: readonly BranchesDocument[];
  /** Said about the curves as a whole, such as how a difference was formed. */
  readonly note?: string;
  /** How the settings of the outer axes are to be told apart, where their order does not say: `dash` by source, `colour` by setting. */
  readonly styles?: readonly { readonly colour: number; readonly dash: number }[];
  /** By setting: 1 where the first axis has a value that the setting's own source did not sweep; null where it has all. */
  readonly absent?: readonly (Uint8Array | null)[];
}
