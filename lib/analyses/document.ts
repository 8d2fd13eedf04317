import type { Design } from "@/lib/language/ast";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { lineStarts, placeOf } from "@/lib/language/span";
import { OUTCOMES, RUNGS } from "@/lib/solver/outcome";
import type { BranchesDocument } from "./branches-document";
import { judge } from "./judge";
import type { Plan } from "./plan";
import type { Failure, RunDocument } from "./result";
import type { PointRange } from "./strands";
import { joined } from "./unstable";

/** What a run has so far. Columns have one value a point of the plan, NaN where nothing is known yet. */
export interface RunMatter {
  readonly plan: Plan;
  /** What the text means, for its contract; null where it can no longer be read. */
  readonly design: Design | null;
  /** The netlist, for the lines and columns of its diagnostics. */
  readonly text: string;
  /** One column a trace, in the order of the plan. */
  readonly traces: readonly Float64Array[];
  readonly outcome: Float64Array;
  readonly iterations: Float64Array;
  readonly rung: Float64Array;
  /** V; NaN where not proved. */
  readonly bound: Float64Array;
  readonly failures: readonly Failure[];
  /** Points that are solved and not stable, in any order. */
  readonly unstable?: readonly PointRange[];
  /** The branches, one document a row, null where a row is not in yet; null or absent where the text does not ask for several operating points. */
  readonly branches?: readonly (BranchesDocument | null)[] | null;
  readonly diagnostics: readonly Diagnostic[];
}

/** What a run document says beside its columns. */
export type DocumentFrame = Omit<RunDocument, "traces" | "points">;

/**
 * The run document of what is known: JSON without NaN, null where a point is not solved. A netlist without requirements breaks
 * none, so its verdict is "holds" as soon as one point is solved and "no data" before, as it is of one that can no longer be read.
 */
export function toDocument(matter: RunMatter): RunDocument {
  const { format, title, verdict, axes, draws, ...rest } = frameOf(matter);
  return {
    ...{ format, title, verdict, axes, draws },
    traces: matter.plan.traces.map(({ name, unit }, k) => ({
      name,
      unit,
      values: listOf(matter.traces[k]!, (value) => (Number.isFinite(value) ? value : null)),
    })),
    points: {
      outcome: listOf(matter.outcome, (index) => OUTCOMES[index] ?? null),
      bound: listOf(matter.bound, (bound) => (Number.isFinite(bound) ? bound : null)),
      iterations: listOf(matter.iterations, (count) => (Number.isNaN(count) ? 0 : count)),
      rung: listOf(matter.rung, (index) => RUNGS[index] ?? null),
    },
    ...rest,
  };
}

/** Judges what is known and says all but the columns themselves. */
export function frameOf(matter: RunMatter): DocumentFrame {
  const { plan, text, outcome } = matter;
  const solved = OUTCOMES.indexOf("converged");
  const solvedOrNot = outcome.every((kind) => kind === solved) ? "holds" : "no data";
  const starts = lineStarts(text);
  const unstable = joined(matter.unstable ?? []);
  const judgement = matter.design === null ? null : judge({ design: matter.design, plan }, matter);
  return {
    format: "sweepwright-run/1",
    title: plan.title,
    verdict: judgement === null ? "no data" : (judgement.verdict ?? solvedOrNot),
    axes: plan.axes,
    draws: plan.draws,
    readings: judgement?.readings ?? [],
    requirements: judgement?.requirements ?? [],
    diagnostics: matter.diagnostics.map((one) => ({ ...one, ...placeOf(starts, one.from) })),
    failures: [...matter.failures].sort((a, b) => a.point - b.point),
    ...(unstable.length > 0 ? { unstable } : {}),
    ...(matter.branches ? { branches: matter.branches.filter((row) => row !== null) } : {}),
  };
}

/** A column as a list. A plain loop: over millions of points `Array.from` takes several times as long, and others wait meanwhile. */
function listOf<T>(column: Float64Array, of: (value: number) => T): T[] {
  const list = new Array<T>(column.length);
  for (let k = 0; k < column.length; k++) list[k] = of(column[k]!);
  return list;
}
