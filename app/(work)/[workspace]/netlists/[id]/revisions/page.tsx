import type { Metadata } from "next";
import { cache } from "react";
import { actorFor } from "@/lib/auth/actor";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { listRevisions } from "@/lib/services/netlists/list-revisions";
import { answered } from "../../../../answered";
import { REVISIONS_SHOWN } from "./revision-line";
import { RevisionsView } from "./revisions-view";

interface Props {
  readonly params: Promise<{ readonly workspace: string; readonly id: string }>;
  readonly searchParams: Promise<{ readonly page?: string | string[] }>;
}

const load = cache(async (workspace: string, id: string) => {
  const path = `/${workspace}/netlists/${id}/revisions`;
  const actor = await answered(actorFor(workspace), path);
  return { actor, netlist: await answered(getNetlist(actor, id), path) };
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { workspace, id } = await params;
  return { title: `History of ${(await load(workspace, id)).netlist.title}` };
}

export default async function RevisionsPage({ params, searchParams }: Props) {
  const { workspace, id } = await params;
  const { actor, netlist } = await load(workspace, id);
  const asked = Number((await searchParams).page ?? 1);
  const pages = Math.ceil(netlist.revision / REVISIONS_SHOWN);
  const page = Number.isInteger(asked) && asked >= 1 && asked <= pages ? asked : 1;
  const first = await listRevisions(actor, { netlistId: id, page, size: REVISIONS_SHOWN });
  return (
    <RevisionsView
      key={`${id} ${page}`}
      workspace={workspace}
      netlist={{ id, number: netlist.number, title: netlist.title }}
      page={page}
      first={first}
    />
  );
}
