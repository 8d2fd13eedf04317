import { branchesOf } from "./branches";
import type { Job } from "./compile";
import { placeOnAxes } from "./plan";
import type { TraceDocument } from "./result";

/** The operating points of one row of a run, as branches over its first axis: JSON without NaN, null where there is none. */
export interface BranchesDocument {
  /** The values of the outer axes. */
  readonly at: readonly { readonly knob: string; readonly value: number }[];
  /** Whether the indices of what was found add up; where they do not, an operating point is missing. */
  readonly complete: boolean;
  readonly branches: readonly {
    /** Flat over the first axis, as are the bounds (V) and the traces. */
    readonly stable: readonly (boolean | null)[];
    readonly bound: readonly (number | null)[];
    readonly traces: readonly TraceDocument[];
  }[];
  /** Where branches turn back: the value of the first knob, and the traces there in the order of the plan. */
  readonly folds: readonly { readonly value: number; readonly traces: readonly (number | null)[] }[];
}

/** Every row of a job whose text asks for several operating points, at nominal values; null where it does not. */
export function branchesDocument(job: Job): readonly BranchesDocument[] | null {
  const { design, plan } = job;
  if (design.seek === null) return null;
  const length = plan.axes[0]?.values.length ?? 1;
  const rows = plan.points / (plan.draws + 1) / length;
  return Array.from({ length: rows }, (_, row) => {
    const { branches, folds, isComplete } = branchesOf(job, row * length);
    const place = placeOnAxes(plan, row * length);
    return {
      at: plan.axes.slice(1).map(({ knob, values }, k) => ({ knob, value: values[place[k + 1]!]! })),
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
  });
}

function known(value: number | undefined): number | null {
  return value !== undefined && Number.isFinite(value) ? value : null;
}
