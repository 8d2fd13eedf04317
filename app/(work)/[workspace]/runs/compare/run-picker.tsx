"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import { SearchBox } from "@/app/_components/ui/search-box";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { FailedState, LoadingState } from "@/app/_components/ui/states";
import { When } from "@/app/_components/ui/when";
import type { Found } from "../(list)/use-runs";

interface Props {
  readonly workspace: string;
  readonly chosen: readonly string[];
  /** Of the first run: its other runs come first while nothing is searched for. */
  readonly netlistId: string | null;
  readonly open: boolean;
  readonly onAdd: (id: string) => void;
}

/** Runs that are listed at once. */
const LISTED = 8;

/** Adds a run to those compared: the newest of the same netlist, or what a search finds. */
export function RunPicker({ workspace, chosen, netlistId, open, onAdd }: Props) {
  const [query, setQuery] = useState("");
  const [everywhere, setEverywhere] = useState(false);
  const own = netlistId !== null && query === "" && !everywhere;
  const { data, error, isPending, refetch } = useQuery({
    queryKey: ["runs to compare", workspace, own ? netlistId : null, query],
    queryFn: () => fetchRuns(workspace, query, own ? netlistId : null),
    placeholderData: keepPreviousData,
  });
  const rows = (data?.rows ?? []).filter(({ id }) => !chosen.includes(id)).slice(0, LISTED);
  return (
    <details open={open} className="border-y py-2">
      <summary className="min-h-7 w-fit font-semibold text-sm leading-7">Add a run</summary>
      <div className="grid gap-3 py-2">
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <div className="w-full max-w-md">
            <SearchBox label="Search runs to compare" value={query} onChange={setQuery} />
          </div>
          {netlistId !== null && (
            <label className="inline-flex min-h-7 items-center gap-2 text-sm">
              <input
                type="checkbox"
                checked={everywhere}
                onChange={({ target }) => setEverywhere(target.checked)}
                className="size-3.5 accent-accent"
              />
              Of other netlists too
            </label>
          )}
        </div>
        {error !== null && (
          <FailedState
            title="The runs could not be listed"
            action={<Button onClick={() => refetch()}>Try again</Button>}
          >
            <p>{error.message}</p>
          </FailedState>
        )}
        {data !== undefined && rows.length === 0 && (
          <p className="text-quiet text-sm">
            {own
              ? "The netlist has no other run. Search for one of another netlist, or queue this one again."
              : "No run matches."}
          </p>
        )}
        {isPending && <LoadingState>Looking for runs…</LoadingState>}
        <ul aria-label="Runs to add" className="grid gap-x-8 lg:grid-cols-2">
          {rows.map((row) => (
            <li key={row.id} className="flex items-baseline gap-3 border-b py-1.5 text-sm">
              <span className="figures w-8 shrink-0 text-right text-quiet">{row.number}</span>
              <span className="min-w-0 grow">
                <span className="break-words">{row.title}</span>
                <span className="block text-quiet text-xs">
                  revision {row.revision}, {counted(row.points, "point")}, <When iso={row.queuedAt} />
                </span>
              </span>
              <StateBadge state={shownState(row)} failed={row.pointsFailed} />
              <Button size="small" aria-label={`Add run ${row.number}`} onClick={() => onAdd(row.id)}>
                Add
              </Button>
            </li>
          ))}
        </ul>
      </div>
    </details>
  );
}

async function fetchRuns(workspace: string, query: string, netlistId: string | null): Promise<Found> {
  const search = new URLSearchParams({ workspace, query, page: "1", size: "25" });
  if (netlistId !== null) search.set("netlistId", netlistId);
  const response = await fetch(`/api/v1/runs?${search}`, { headers: { accept: "application/json" } });
  if (response.ok) return response.json();
  const problem = await response.json().catch(() => null);
  throw new Error(problem?.detail ?? `The service answered with status ${response.status}.`);
}
