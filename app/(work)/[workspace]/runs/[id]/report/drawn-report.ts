import { decodeColumns } from "@/lib/analyses/columns-document";
import type { RunDocument } from "@/lib/analyses/result";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import type { RunSummary } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { getRunOverview } from "@/lib/services/runs/get-run-overview";
import { type DrawnFigure, drawFigure } from "./report-figure";

/** What of a run's document is printed. */
export type Printed = Pick<RunDocument, "requirements" | "readings" | "branches" | "unstable" | "failures">;

export interface DrawnReport {
  readonly printed: Printed;
  /** Null for a run without a sweep. */
  readonly figure: DrawnFigure | null;
  /** What is left out of a run too large to be read whole; null otherwise. */
  readonly remark: string | null;
}

/**
 * The report of a run: its points are read, drawn and let go before the page is written. Of a run too large for that, what was kept when
 * it was judged, and its curves from afar. Where neither can be had at present, the sentence that says why.
 */
export async function drawnReport(
  actor: Actor,
  run: RunSummary,
): Promise<DrawnReport | { readonly refusal: string }> {
  try {
    return await whole(actor, run);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    const afar = error.code === "too large" ? await fromAfar(actor, run) : null;
    if (afar !== null) return afar;
    if (error.code === "too large" || error.code === "too many") return { refusal: error.message };
    throw error;
  }
}

async function whole(actor: Actor, run: RunSummary): Promise<DrawnReport> {
  const { document, release } = await getRunDocument(actor, run.id);
  try {
    const { requirements, readings, branches, unstable, failures } = document;
    const more = { ...(branches && { branches }), ...(unstable && { unstable }) };
    return {
      printed: { requirements, readings, failures, ...more },
      figure: drawFigure(run, document, requirements),
      remark: null,
    };
  } finally {
    release();
  }
}

/** Null where the run has no judgement or no overview. */
async function fromAfar(actor: Actor, run: RunSummary): Promise<DrawnReport | null> {
  const { judgement, plan } = run;
  if (judgement === null) return null;
  const bytes = await getRunOverview(actor, run.id).catch((error: unknown) => {
    if (error instanceof AppError && error.code === "not found") return null;
    throw error;
  });
  if (bytes === null) return null;
  const { requirements, readings } = judgement;
  const { axes, traces, points } = decodeColumns(bytes.buffer);
  const source = {
    axes,
    traces: traces.slice(0, plan.traces.length),
    read: traces.slice(plan.traces.length),
    points,
  };
  return {
    printed: { requirements, readings, failures: [] },
    figure: drawFigure(run, source, requirements),
    remark:
      "This run is too large to be read whole for a report. Its verdicts and readings are those of every point; the curves are the nominal ones, lowest and highest values kept, without the band of the draws, and failed points are counted but not listed.",
  };
}
