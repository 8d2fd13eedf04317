import { countRow, type RowCount } from "@/app/_components/preview/row-words";
import { branchesDocument } from "@/lib/analyses/branches-document";
import { compile } from "@/lib/analyses/compile";
import { type DocumentFrame, frameOf } from "@/lib/analyses/document";
import { solveRange } from "@/lib/analyses/sweep";

/** Points, and kept figures, that a page solves; what is more is for a queued run. A figure takes 8 bytes. */
const MOST_POINTS = 100_000;
const MOST_FIGURES = 8_000_000;

/** What a whole plan comes to, without its columns. */
export interface WholeResult {
  readonly frame: DocumentFrame;
  readonly count: RowCount;
  /** Time that it took, ms. */
  readonly taken: number;
}

export type WholeAnswer =
  | { readonly kind: "progress"; readonly done: number; readonly points: number }
  | { readonly kind: "result"; readonly result: WholeResult }
  | { readonly kind: "wrong"; readonly errors: number }
  | { readonly kind: "too large"; readonly points: number };

/** Solves every point of a text's plan, all settings and all draws, as the worker of the service does it; `watch` hears how far it is. */
export function solveWhole(
  text: string,
  watch: (answer: WholeAnswer) => void,
  now: () => number,
): WholeAnswer {
  const begun = now();
  const { job, diagnostics } = compile(text);
  if (job === null) {
    const errors = diagnostics.filter(({ severity }) => severity === "error").length;
    return { kind: "wrong", errors };
  }
  const { plan, design } = job;
  const { points } = plan;
  if (points > MOST_POINTS || points * (plan.traces.length + plan.unknowns.length) > MOST_FIGURES) {
    return { kind: "too large", points };
  }
  const solved = solveRange(job, 0, points, (done) => watch({ kind: "progress", done, points }));
  const { traces, outcome, iterations, rung, bound, failures, unstable } = solved;
  const frame = frameOf({
    ...{ plan, design, text, diagnostics, traces, outcome, iterations, rung, bound, failures, unstable },
    branches: branchesDocument(job),
  });
  const result = { frame, count: countRow({ outcome, bound }), taken: now() - begun };
  return { kind: "result", result };
}
