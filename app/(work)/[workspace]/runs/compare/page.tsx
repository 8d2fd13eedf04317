import type { Metadata } from "next";
import { outlineOf } from "@/lib/analyses/plan";
import { actorFor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import type { Actor } from "@/lib/permissions/actor";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { getRun } from "@/lib/services/runs/get-run";
import { answered } from "../../../answered";
import { settingsOf } from "../[id]/spread/subjects";
import { type ComparedRun, letterOf, readRuns } from "./compare-shapes";
import { CompareView } from "./compare-view";

export const metadata: Metadata = { title: "Compare runs" };

interface Props {
  readonly params: Promise<{ readonly workspace: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function CompareRunsPage({ params, searchParams }: Props) {
  const { workspace } = await params;
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    for (const one of [value ?? []].flat()) search.append(name, one);
  }
  const path = `/${workspace}/runs/compare?${search}`;
  const actor = await answered(actorFor(workspace), path);
  const asked = readRuns(search.get("runs"));
  const found = await Promise.all(asked.map((id) => runWithText(actor, id)));
  const known = found.filter((one) => one !== null);
  const first = known[0];
  const runs = known.map(({ run, text }, index): ComparedRun => {
    const changes = index === 0 ? null : changesOfTexts(first!.text, text);
    const settings = settingsOf(run.plan.axes);
    return { letter: letterOf(index), run: { ...run, plan: outlineOf(run.plan) }, settings, changes };
  });
  search.delete("runs");
  return (
    <CompareView
      key={runs.map(({ run }) => run.id).join(" ")}
      workspace={workspace}
      runs={runs}
      lost={asked.length - known.length}
      search={search.toString()}
    />
  );
}

/** Null for a run that is not in the workspace: an old address still shows the others. */
async function runWithText(actor: Actor, id: string) {
  try {
    const run = await getRun(actor, id);
    const { text } = await getRevision(actor, run.netlistId, run.revision);
    return { run, text: text.replaceAll("\r\n", "\n") };
  } catch (error) {
    if (error instanceof AppError && error.code === "not found") return null;
    throw error;
  }
}
