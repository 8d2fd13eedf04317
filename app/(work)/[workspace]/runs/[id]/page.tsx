import type { Metadata } from "next";
import { cache } from "react";
import { outlineOf } from "@/lib/analyses/plan";
import { actorFor } from "@/lib/auth/actor";
import { can } from "@/lib/permissions/can";
import { findVoltageSpan } from "@/lib/services/runs/find-voltage-span";
import { getPoint } from "@/lib/services/runs/get-point";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunContext } from "@/lib/services/runs/get-run-context";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { hasRunOverview } from "@/lib/services/runs/get-run-overview";
import { waitForPoints } from "@/lib/services/runs/wait-for-points";
import { answered } from "../../../answered";
import { columnsPath, overviewPath } from "./fetch-run";
import { readPageState } from "./page-state";
import { isLive, type RunState } from "./run-shapes";
import { RunView } from "./run-view";
import { listedOnly, numbersIn } from "./spread/subjects";

/** Numbers in a document that is sent with the page; a larger one is fetched by the page once it stands. */
const SENT_ALONG = 20_000;
/** A run queued less than this long ago, ms, may have its first points in a moment: the page waits so long for them, ms. */
const JUST_QUEUED = 2000;
const MOMENT = 150;

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const runFor = cache(async (workspace: string, id: string) => {
  const path = `/${workspace}/runs/${id}`;
  const actor = await answered(actorFor(workspace), path);
  const run = await answered(getRun(actor, id, "outline"), path);
  const fresh =
    run.pointsDone === 0 && isLive(run.status) && Date.now() - Date.parse(run.queuedAt) < JUST_QUEUED;
  if (!fresh || !isSmall(run)) return { actor, run };
  await waitForPoints(actor, id, MOMENT);
  return { actor, run: await answered(getRun(actor, id, "outline"), path) };
});

function isSmall({ points, plan }: RunState): boolean {
  return points * (plan.traces.length + 3) <= SENT_ALONG;
}

/** A run as it is sent with its page: a large one without long axes, and of very many readings what is listed. */
function lightOf(run: RunState): RunState {
  const { judgement, plan } = run;
  const isLong = judgement !== null && numbersIn(judgement.readings) > SENT_ALONG;
  return {
    ...run,
    plan: isSmall(run) ? plan : outlineOf(plan),
    judgement: isLong ? { ...judgement, readings: listedOnly(judgement.readings) } : judgement,
  };
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id } = await params;
  const { run } = await runFor(workspace, id);
  return { title: `${run.title}, run ${run.number}` };
}

export default async function RunPage({ params, searchParams }: Props) {
  const { workspace, id } = await params;
  const { actor, run } = await runFor(workspace, id);
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    for (const one of [value ?? []].flat()) search.append(name, one);
  }
  const state = readPageState(search);
  const [found, point, span, context, hasOverview] = await Promise.all([
    isSmall(run) ? getRunDocument(actor, id) : null,
    state.point === null || state.point >= run.points ? null : getPoint(actor, id, state.point),
    findVoltageSpan(actor, id),
    getRunContext(actor, id),
    !isSmall(run) && hasRunOverview(actor, id),
  ]);
  // Readings may hold far more than the points that they are of.
  const sent = found !== null && numbersIn(found.document.readings) <= SENT_ALONG ? found : null;
  // What is drawn first of a large document sets out together with the page, not after it.
  const ahead = !isSmall(run) && run.pointsDone > 0;
  const path = hasOverview ? overviewPath(workspace, id) : columnsPath(id);
  return (
    <>
      {ahead && <link rel="preload" as="fetch" href={path} crossOrigin="anonymous" />}
      <RunView
        key={run.id}
        workspace={workspace}
        first={lightOf(run)}
        hasOverview={hasOverview}
        found={sent && { document: sent.document, etag: sent.columnsEtag }}
        context={context}
        point={point}
        span={span}
        search={search.toString()}
        mayStart={can(actor, "run.start", { workspaceId: actor.workspaceId })}
        mayCancel={can(actor, "run.cancel", { workspaceId: actor.workspaceId })}
      />
    </>
  );
}
