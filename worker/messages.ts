import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import type { StoredRow } from "@/lib/services/chunks/branch-columns";
import type { StoredShard } from "@/lib/services/chunks/columns";

/** What the main thread asks of a computing thread. */
export type Task = SolveTask | SeekTask | JudgeTask;

/** The flat points [from, to) of the run of `text`. */
export interface SolveTask {
  readonly kind: "solve";
  readonly text: string;
  readonly from: number;
  readonly to: number;
  /** Points of the whole run, as it was planned. */
  readonly points: number;
}

/** The operating points of one sweep of the first knob of the run of `text`, as branches. */
export interface SeekTask {
  readonly kind: "seek";
  readonly text: string;
  /** Which sweep, counted from 0 over the settings of the outer knobs. */
  readonly row: number;
  /** Points of the whole run, as it was planned. */
  readonly points: number;
}

/** The requirements and error budgets of the run of `text`, all of whose points are stored. */
export interface JudgeTask {
  readonly kind: "judge";
  readonly text: string;
  /** One column a trace, in the order of the plan. */
  readonly traces: readonly Float64Array[];
  /** The branches, one document a row; null where the text does not ask for several operating points. */
  readonly branches: readonly (BranchesDocument | null)[] | null;
  /** Points of the whole run, as it was planned. */
  readonly points: number;
}

/** What a computing thread answers. A task ends with "solved", "sought", "judged" or "broken". */
export type Reply =
  /** The thread has solved its warm-up and waits for tasks. */
  | { readonly kind: "ready" }
  | { readonly kind: "progress"; readonly pointsDone: number }
  | { readonly kind: "solved"; readonly result: StoredShard }
  | { readonly kind: "sought"; readonly result: StoredRow }
  /** With what the run looks like from afar; null where it needs no overview. */
  | {
      readonly kind: "judged";
      readonly judgement: KeptJudgement;
      readonly overview: Uint8Array<ArrayBuffer> | null;
    }
  /** The solver threw, which it never should; `reason` is for the log. */
  | { readonly kind: "broken"; readonly reason: string };
