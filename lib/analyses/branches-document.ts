import { branchesOf } from "./branches";
import type { Job } from "./compile";
import { type Plan, placeOnAxes, rowLength, soughtRows } from "./plan";
import type { TraceDocument } from "./result";

/** Neighbouring operating points, flat over the first axis; null where the branch does not reach. */
export interface BranchDocument {
  readonly stable: readonly (boolean | null)[];
  /** V; null where not proved too. */
  readonly bound: readonly (number | null)[];
  readonly traces: readonly TraceDocument[];
}

/** The operating points of one row of a run, as branches over its first axis: JSON without NaN, null where there is none. */
export interface BranchesDocument {
  /** The values of the outer axes. */
  readonly at: readonly { readonly knob: string; readonly value: number }[];
  /** Whether the indices of what was found add up at every value of the first axis; where they do not, an operating point is missing. */
  readonly complete: boolean;
  readonly branches: readonly BranchDocument[];
  /** Where branches turn back: the value of the first knob, and the traces there in the order of the plan. */
  readonly folds: readonly { readonly value: number; readonly traces: readonly (number | null)[] }[];
  /** One sentence why nothing was found in this row, where the search was broken off. */
  readonly fault?: string;
}

/** Every row of a job whose text asks for several operating points, at nominal values; null where it does not. */
export function branchesDocument(job: Job): readonly BranchesDocument[] | null {
  if (job.plan.seek === undefined) return null;
  return Array.from({ length: soughtRows(job.plan) }, (_, row) => branchesRow(job, row));
}

/** One row; it does not depend on what other rows were looked at before. */
export function branchesRow(job: Job, row: number): BranchesDocument {
  const { plan } = job;
  const { branches, folds, isComplete } = branchesOf(job, row * rowLength(plan));
  return {
    at: placeOfRow(plan, row),
    complete: isComplete,
    branches: branches.map(({ points }) => ({
      stable: points.map((point) => point?.isStable ?? null),
      bound: points.map((point) => known(point?.bound)),
      traces: plan.traces.map(({ name, unit }, k) => ({
        name,
        unit,
        values: points.map((point) => known(point?.traces[k])),
      })),
    })),
    folds: folds.map(({ value, traces }) => ({ value, traces: traces.map(known) })),
  };
}

/** The values of the outer knobs in a row. */
export function placeOfRow(plan: Plan, row: number): BranchesDocument["at"] {
  const place = placeOnAxes(plan, row * rowLength(plan));
  return plan.axes.slice(1).map(({ knob, values }, k) => ({ knob, value: values[place[k + 1]!]! }));
}

function known(value: number | undefined): number | null {
  return value !== undefined && Number.isFinite(value) ? value : null;
}
