import type { Metadata } from "next";
import { actorFor } from "@/lib/auth/actor";
import { listRuns } from "@/lib/services/runs/list-runs";
import { answered } from "../../../answered";
import { PAGE_SIZE, readListState, writeListState } from "./list-state";
import { RunsView } from "./runs-view";

export const metadata: Metadata = { title: "Runs" };

interface Props {
  readonly params: Promise<{ readonly workspace: string }>;
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function RunsPage({ params, searchParams }: Props) {
  const { workspace } = await params;
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(await searchParams)) {
    const first = Array.isArray(value) ? value[0] : value;
    if (first !== undefined) search.set(name, first);
  }
  const state = readListState(search);
  const path = `/${workspace}/runs${writeListState(state)}`;
  const actor = await answered(actorFor(workspace), path);
  const { query, status, page } = state;
  const input = { query, page, size: PAGE_SIZE, ...(status === null ? {} : { status }) };
  const found = await answered(listRuns(actor, input), path);
  return <RunsView workspace={workspace} first={{ state, found }} />;
}
