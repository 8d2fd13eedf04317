import type { Metadata } from "next";
import { actorFor } from "@/lib/auth/actor";
import { can } from "@/lib/permissions/can";
import { listNetlists } from "@/lib/services/netlists/list-netlists";
import { answered } from "../../../answered";
import { PAGE_SIZE, readListState, writeListState } from "./list-state";
import { NetlistsView } from "./netlists-view";

export const metadata: Metadata = { title: "Netlists" };

interface Props {
  readonly params: Promise<{ readonly workspace: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function NetlistsPage({ params, searchParams }: Props) {
  const { workspace } = await params;
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    const first = Array.isArray(value) ? value[0] : value;
    if (first !== undefined) search.set(name, first);
  }
  const state = readListState(search);
  const path = `/${workspace}/netlists${writeListState(state)}`;
  const actor = await answered(actorFor(workspace), path);
  const found = await answered(listNetlists(actor, { ...state, size: PAGE_SIZE }), path);
  return (
    <NetlistsView
      workspace={workspace}
      mayWrite={can(actor, "netlist.write", { workspaceId: actor.workspaceId })}
      first={{ state, found }}
    />
  );
}
