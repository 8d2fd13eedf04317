import type { Metadata } from "next";
import { cache } from "react";
import { ButtonLink } from "@/app/_components/ui/button";
import { FailedState } from "@/app/_components/ui/states";
import { actorFor } from "@/lib/auth/actor";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { findVoltageSpan } from "@/lib/services/runs/find-voltage-span";
import { getRun } from "@/lib/services/runs/get-run";
import { answered } from "../../../../answered";
import { drawnReport } from "./drawn-report";
import { PrintButton } from "./print-button";
import "./report.css";
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
    drawnReport(actor, run),
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
