"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { type ListState, PAGE_SIZE, writeListState } from "./list-state";

export interface NetlistRow {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly owner: string;
  /** ISO 8601. */
  readonly updatedAt: string;
  readonly revision: number;
  readonly lastRun: {
    readonly id: string;
    readonly number: number;
    readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
    readonly verdict: "holds" | "broken" | "no data" | null;
    readonly pointsFailed: number;
    readonly points: number;
  } | null;
}

export interface Found {
  readonly rows: readonly NetlistRow[];
  readonly total: number;
}

async function fetchNetlists(workspace: string, state: ListState): Promise<Found> {
  const search = new URLSearchParams({
    workspace,
    query: state.query,
    which: state.which,
    sort: state.sort,
    direction: state.direction,
    page: String(state.page),
    size: String(PAGE_SIZE),
  });
  const response = await fetch(`/api/v1/netlists?${search}`, { headers: { accept: "application/json" } });
  if (response.ok) return response.json();
  const problem = await response.json().catch(() => null);
  throw new Error(problem?.detail ?? `The service answered with status ${response.status}.`);
}

/** Rows for a state of the table: the server's own for the first one, the route's for every other, the old ones meanwhile. */
export function useNetlists(
  workspace: string,
  state: ListState,
  first: { readonly state: ListState; readonly found: Found },
) {
  const isFirst = writeListState(state) === writeListState(first.state);
  return useQuery({
    queryKey: ["netlists", workspace, state],
    queryFn: () => fetchNetlists(workspace, state),
    placeholderData: keepPreviousData,
    ...(isFirst ? { initialData: first.found } : {}),
    refetchInterval: (query) => (query.state.data?.rows.some(isMoving) ? 2000 : false),
  });
}

function isMoving(row: NetlistRow): boolean {
  return row.lastRun?.status === "queued" || row.lastRun?.status === "running";
}
