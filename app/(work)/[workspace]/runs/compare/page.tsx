import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { outlineOf } from "@/lib/analyses/plan";
import { actorFor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import type { Actor } from "@/lib/permissions/actor";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { getRun, type RunSummary } from "@/lib/services/runs/get-run";
import { listRuns } from "@/lib/services/runs/list-runs";
import { answered } from "../../../answered";
import type { RunState } from "../[id]/run-shapes";
import { listedOnly, settingsOf } from "../[id]/spread/subjects";
import { type ComparedRun, letterOf, readRuns } from "./compare-shapes";
import { CompareView } from "./compare-view";

export const metadata: Metadata = { title: "Compare runs" };

/** Runs of a netlist among which the one before is looked for. */
const FEW = 50;

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
  const before = search.get("with") === "before" ? await runBefore(actor, known) : null;
  // Under an address that names both, so that it shows the same to whoever gets it.
  if (before !== null) redirect(`/${workspace}/runs/compare?runs=${before},${asked.join(",")}`);
  const first = known[0];
  const runs = known.map(({ run, text }, index): ComparedRun => {
    const changes = index === 0 ? null : changesOfTexts(first!.text, text);
    const settings = settingsOf(run.plan.axes);
    return { letter: letterOf(index), run: lightOf(run), settings, changes };
  });
  search.delete("runs");
  search.delete("with");
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

/** Id of the finished run of the same netlist before the one that is named, which a reader most often measures it from. */
async function runBefore(actor: Actor, named: readonly { readonly run: RunSummary }[]) {
  const [only] = named;
  if (only === undefined || named.length > 1) return null;
  const { netlistId, number } = only.run;
  const { rows } = await listRuns(actor, { netlistId, status: "done", size: FEW });
  return rows.find((row) => row.number < number)?.id ?? null;
}

/** A run without what its comparison does not show: long axes and most of what its readings hold. */
function lightOf(run: RunState): RunState {
  const { judgement, plan } = run;
  const kept = judgement && { ...judgement, readings: listedOnly(judgement.readings) };
  return { ...run, plan: outlineOf(plan), judgement: kept };
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
