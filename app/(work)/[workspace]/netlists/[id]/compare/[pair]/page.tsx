import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { cache } from "react";
import { actorFor } from "@/lib/auth/actor";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import type { Actor } from "@/lib/permissions/actor";
import { can } from "@/lib/permissions/can";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { getRun } from "@/lib/services/runs/get-run";
import { listRuns } from "@/lib/services/runs/list-runs";
import { answered } from "../../../../../answered";
import { listedOnly, settingCount, settingsOf } from "../../../../runs/[id]/spread/subjects";
import { readPair, type Side } from "./compare-shapes";
import { CompareView } from "./compare-view";
import { DraftView } from "./draft-view";

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string; readonly pair: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

const load = cache(async (workspace: string, id: string, pair: string) => {
  const numbers = readPair(pair);
  if (numbers === null) notFound();
  const path = `/${workspace}/netlists/${id}/compare/${pair}`;
  const actor = await answered(actorFor(workspace), path);
  const netlist = await answered(getNetlist(actor, id), path);
  const [first, second] = numbers;
  const [before, after] = await answered(
    Promise.all([sideOf(actor, id, first), second === "draft" ? null : sideOf(actor, id, second)]),
    path,
  );
  return { actor, netlist, before, after };
});

/** A revision with its newest run, and its newest finished one, which has the curves. */
async function sideOf(actor: Actor, netlistId: string, number: number): Promise<Side> {
  const { hash, text, message, author, savedAt } = await getRevision(actor, netlistId, number);
  const newest = (await listRuns(actor, { netlistId, revision: number, size: 1 })).rows[0] ?? null;
  const isDone = newest === null || newest.status === "done";
  const done = isDone
    ? newest
    : ((await listRuns(actor, { netlistId, revision: number, status: "done", size: 1 })).rows[0] ?? null);
  const run = done === null ? null : await getRun(actor, done.id);
  return {
    ...{ number, hash, message, author, savedAt, newest },
    text: text.replaceAll("\r\n", "\n"),
    run: run && {
      id: run.id,
      number: run.number,
      verdict: run.verdict,
      isJudged: run.judgement !== null,
      requirements: run.judgement?.requirements ?? [],
      readings: listedOnly(run.judgement?.readings ?? []),
      settings: settingsOf(run.plan.axes),
      settingCount: settingCount(run.plan.axes),
    },
  };
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id, pair } = await params;
  const { netlist, before, after } = await load(workspace, id, pair);
  const what =
    after === null
      ? `revision ${before.number} and your draft`
      : `revisions ${before.number} and ${after.number}`;
  return { title: `${netlist.title}, ${what}` };
}

export default async function ComparePage({ params, searchParams }: Props) {
  const { workspace, id, pair } = await params;
  const { actor, netlist, before, after } = await load(workspace, id, pair);
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    for (const one of [value ?? []].flat()) search.append(name, one);
  }
  const shown = { id, title: netlist.title, latest: netlist.revision };
  if (after === null)
    return (
      <DraftView
        key={before.number}
        workspace={workspace}
        netlist={shown}
        before={before}
        writer={actor.userId}
        search={search.toString()}
      />
    );
  return (
    <CompareView
      key={`${before.number} ${after.number}`}
      workspace={workspace}
      netlist={shown}
      before={before}
      after={after}
      changes={changesOfTexts(before.text, after.text)}
      search={search.toString()}
      mayRun={can(actor, "run.start", { workspaceId: actor.workspaceId })}
    />
  );
}
