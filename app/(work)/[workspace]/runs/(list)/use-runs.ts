"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { type ListState, PAGE_SIZE, type RunStatus, writeListState } from "./list-state";

export interface RunRow {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly revision: number;
  readonly status: RunStatus;
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** ISO 8601. */
  readonly queuedAt: string;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
  readonly requestedBy: string;
}

export interface Found {
  readonly rows: readonly RunRow[];
  readonly total: number;
}

async function fetchRuns(workspace: string, state: ListState): Promise<Found> {
  const search = new URLSearchParams({
    workspace,
    query: state.query,
    page: String(state.page),
    size: String(PAGE_SIZE),
  });
  if (state.status !== null) search.set("status", state.status);
  const response = await fetch(`/api/v1/runs?${search}`, { headers: { accept: "application/json" } });
  if (response.ok) return response.json();
  const problem = await response.json().catch(() => null);
  throw new Error(problem?.detail ?? `The service answered with status ${response.status}.`);
}

/** Rows for a state of the table: the server's own for the first one, the route's for every other; anew while work is under way. */
export function useRuns(
  workspace: string,
  state: ListState,
  first: { readonly state: ListState; readonly found: Found },
) {
  const isFirst = writeListState(state) === writeListState(first.state);
  return useQuery({
    queryKey: ["runs", workspace, state],
    queryFn: () => fetchRuns(workspace, state),
    placeholderData: keepPreviousData,
    ...(isFirst ? { initialData: first.found } : {}),
    refetchInterval: (query) => (query.state.data?.rows.some(isMoving) ? 1000 : false),
  });
}

function isMoving({ status }: RunRow): boolean {
  return status === "queued" || status === "running";
}
