import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { cache } from "react";
import { actorFor } from "@/lib/auth/actor";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import { can } from "@/lib/permissions/can";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { getRevision } from "@/lib/services/netlists/get-revision";
import { listRuns } from "@/lib/services/runs/list-runs";
import { answered } from "../../../../../answered";
import { RUNS_SHOWN } from "../../run-line";
import { RevisionView } from "./revision-view";

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string; readonly n: string }>;
}

const load = cache(async (workspace: string, id: string, n: string) => {
  if (!/^[1-9]\d{0,8}$/.test(n)) notFound();
  const path = `/${workspace}/netlists/${id}/revisions/${n}`;
  const actor = await answered(actorFor(workspace), path);
  const netlist = await answered(getNetlist(actor, id), path);
  return { actor, netlist, revision: await answered(getRevision(actor, id, Number(n)), path) };
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id, n } = await params;
  const { netlist, revision } = await load(workspace, id, n);
  return { title: `${netlist.title}, revision ${revision.number}` };
}

export default async function RevisionPage({ params }: Props) {
  const { workspace, id, n } = await params;
  const { actor, netlist, revision } = await load(workspace, id, n);
  const { number } = revision;
  const [before, runs] = await Promise.all([
    number === 1 ? null : getRevision(actor, id, number - 1),
    listRuns(actor, { netlistId: id, revision: number, size: RUNS_SHOWN }),
  ]);
  return (
    <RevisionView
      key={number}
      workspace={workspace}
      netlist={{
        id,
        number: netlist.number,
        title: netlist.title,
        latest: netlist.revision,
        latestHash: netlist.hash,
      }}
      revision={{ ...revision, text: revision.text.replaceAll("\r\n", "\n") }}
      changes={before === null ? null : changesOfTexts(before.text, revision.text)}
      runs={runs}
      mayWrite={can(actor, "netlist.write", { workspaceId: actor.workspaceId })}
      mayRun={can(actor, "run.start", { workspaceId: actor.workspaceId })}
      role={actor.role}
    />
  );
}
