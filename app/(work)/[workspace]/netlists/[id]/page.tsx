import type { Metadata } from "next";
import { cache } from "react";
import { actorFor } from "@/lib/auth/actor";
import { can } from "@/lib/permissions/can";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { listRuns } from "@/lib/services/runs/list-runs";
import { answered } from "../../../answered";
import { ArchivedNotice } from "./archived-notice";
import { RUNS_SHOWN } from "./run-line";
import { Sheet } from "./sheet";

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

// Both the title of the page and the page ask for it; once a request is enough.
const load = cache(async (workspace: string, id: string) => {
  const path = `/${workspace}/netlists/${id}`;
  const actor = await answered(actorFor(workspace), path);
  return { actor, netlist: await answered(getNetlist(actor, id), path) };
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id } = await params;
  return { title: (await load(workspace, id)).netlist.title };
}

export default async function SheetPage({ params, searchParams }: Props) {
  const { workspace, id } = await params;
  const { actor, netlist } = await load(workspace, id);
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    for (const one of [value ?? []].flat()) search.append(name, one);
  }
  const runs = await listRuns(actor, { netlistId: id, page: 1, size: RUNS_SHOWN });
  const { number, title, text, revision, hash, owner, isArchived } = netlist;
  const mayWrite = can(actor, "netlist.write", { workspaceId: actor.workspaceId });
  return (
    <>
      <ArchivedNotice key={`archived ${id}`} netlistId={id} isArchived={isArchived} mayWrite={mayWrite} />
      <Sheet
        key={id}
        workspace={workspace}
        netlist={{ id, number, owner }}
        latest={{ title, text: text.replaceAll("\r\n", "\n"), revision, hash }}
        runs={runs}
        writer={actor.userId}
        role={actor.role}
        search={search.toString()}
        mayQueue={can(actor, "run.start", { workspaceId: actor.workspaceId })}
      />
    </>
  );
}
