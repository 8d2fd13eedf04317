import type { Metadata } from "next";
import { cache } from "react";
import { ButtonLink } from "@/app/_components/ui/button";
import { FailedState } from "@/app/_components/ui/states";
import { actorFor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { findVoltageSpan } from "@/lib/services/runs/find-voltage-span";
import { getRun, type RunSummary } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { answered } from "../../../../answered";
import { PrintButton } from "./print-button";
import "./report.css";
import { drawFigure } from "./report-figure";
import { ReportView } from "./report-view";

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string }>;
}

const runFor = cache(async (workspace: string, id: string) => {
  const path = `/${workspace}/runs/${id}/report`;
  const actor = await answered(actorFor(workspace), path);
  return { actor, run: await answered(getRun(actor, id), path) };
});

/** The title is the name that a browser gives the PDF file. */
export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id } = await params;
  const { run } = await runFor(workspace, id);
  return { title: `${run.title}, report of run ${run.number}` };
}

export default async function ReportPage({ params }: Props) {
  const { workspace, id } = await params;
  const { actor, run } = await runFor(workspace, id);
  const [drawn, revision, span] = await Promise.all([
    drawnOf(actor, run),
    getRevision(actor, run.netlistId, run.revision),
    findVoltageSpan(actor, id),
  ]);
  return (
    <>
      <div className="flex flex-wrap gap-2 border-b px-4 py-3 md:px-6" data-print="never">
        <ButtonLink href={`/${workspace}/runs/${id}`} prefetch={false}>
          Back to the run
        </ButtonLink>
        {"refusal" in drawn ? null : <PrintButton />}
      </div>
      {"refusal" in drawn ? (
        <div className="px-4 py-6 md:px-6">
          <FailedState title="This report cannot be drawn">
            <p>
              {drawn.refusal} The{" "}
              <a className="link" href={`/${workspace}/runs/${id}/points.csv`}>
                points as CSV
              </a>{" "}
              come for a run of any size.
            </p>
          </FailedState>
        </div>
      ) : (
        <ReportView
          run={run}
          {...drawn}
          text={revision.text}
          savedBy={revision.author}
          savedAt={revision.savedAt}
          span={span}
        />
      )}
    </>
  );
}

/** What of a run's document is printed, and its curves drawn: the points themselves are let go before the page is written. */
async function drawnOf(actor: Actor, run: RunSummary) {
  try {
    const { document, release } = await getRunDocument(actor, run.id);
    try {
      const { requirements, readings, branches, unstable, failures } = document;
      const found = {
        requirements,
        readings,
        failures,
        ...(branches && { branches }),
        ...(unstable && { unstable }),
      };
      return { document: found, figure: drawFigure(run, document) };
    } finally {
      release();
    }
  } catch (error) {
    if (error instanceof AppError && (error.code === "too large" || error.code === "too many"))
      return { refusal: error.message };
    throw error;
  }
}
