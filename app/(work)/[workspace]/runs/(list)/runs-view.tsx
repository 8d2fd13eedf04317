"use client";

import { useSearchParams } from "next/navigation";
import { useState } from "react";
import { Button, ButtonLink } from "@/app/_components/ui/button";
import { counted, formatCount } from "@/app/_components/ui/count";
import { SelectField } from "@/app/_components/ui/field";
import { PageHeader } from "@/app/_components/ui/page-header";
import { Pager } from "@/app/_components/ui/pager";
import { SearchBox } from "@/app/_components/ui/search-box";
import { EmptyState, FailedState } from "@/app/_components/ui/states";
import { MOST } from "../compare/compare-shapes";
import { type ListState, PAGE_SIZE, readListState, STATUSES, writeListState } from "./list-state";
import { RunTable } from "./run-table";
import { type Found, useRuns } from "./use-runs";

/** The runs of a workspace, the newest first; search, state and page stand in the address. */
export function RunsView({
  workspace,
  first,
}: {
  readonly workspace: string;
  readonly first: { readonly state: ListState; readonly found: Found };
}) {
  const state = readListState(new URLSearchParams(useSearchParams()));
  const { data, error, isPlaceholderData, refetch } = useRuns(workspace, state, first);
  const show = (change: Partial<ListState>) => {
    const next = { ...state, page: 1, ...change };
    window.history.replaceState(null, "", writeListState(next) || window.location.pathname);
  };
  const [chosen, setChosen] = useState<readonly string[]>([]);
  const total = data?.total ?? 0;
  const narrowed = state.query !== "" || state.status !== null;
  const remark = `${formatCount(total)} ${narrowed ? "found" : "in this workspace"}`;
  return (
    <>
      <PageHeader title="Runs" remark={<span aria-live="polite">{data !== undefined && remark}</span>} />
      <div className="grid gap-4 px-4 py-4 md:px-6">
        <div className="grid gap-3 sm:grid-cols-[minmax(0,28rem)_12rem_auto]">
          <SearchBox label="Search runs" value={state.query} onChange={(query) => show({ query })} />
          <SelectField
            label="State"
            labelHidden
            value={state.status ?? ""}
            onChange={({ target }) =>
              show({ status: STATUSES.find((status) => status === target.value) ?? null })
            }
          >
            <option value="">In any state</option>
            {STATUSES.map((status) => (
              <option key={status}>{status}</option>
            ))}
          </SelectField>
          {total > 1 && <p className="self-center text-quiet text-xs">Tick runs to compare them.</p>}
        </div>
        {chosen.length > 0 && <Chosen workspace={workspace} chosen={chosen} onClear={() => setChosen([])} />}
        {error !== null && (
          <FailedState
            title="The list could not be brought up to date"
            action={<Button onClick={() => refetch()}>Try again</Button>}
          >
            <p>{error.message}</p>
          </FailedState>
        )}
        {data !== undefined && total > 0 && (
          <RunTable
            workspace={workspace}
            rows={data.rows}
            stale={isPlaceholderData}
            chosen={chosen}
            onChosen={setChosen}
          />
        )}
        {total > PAGE_SIZE && (
          <Pager page={state.page} size={PAGE_SIZE} total={total} onPage={(page) => show({ page })} />
        )}
        {data !== undefined && total === 0 && narrowed && (
          <EmptyState
            title="No run matches"
            action={<Button onClick={() => show({ query: "", status: null })}>Show all runs</Button>}
          >
            <p>The search looks at titles, at who queued the run and at its number.</p>
          </EmptyState>
        )}
        {data !== undefined && total === 0 && !narrowed && (
          <EmptyState
            title="No runs yet"
            action={
              <ButtonLink tone="primary" href={`/${workspace}/netlists`}>
                Go to netlists
              </ButtonLink>
            }
          >
            <p>
              Open a netlist and queue a run: each point of its sweep is solved and kept, and stands here.
            </p>
          </EmptyState>
        )}
      </div>
    </>
  );
}

/** The runs chosen, kept over pages and searches, and the way to compare them. */
function Chosen({
  workspace,
  chosen,
  onClear,
}: {
  readonly workspace: string;
  readonly chosen: readonly string[];
  readonly onClear: () => void;
}) {
  const tooMany = chosen.length > MOST;
  return (
    <div
      role="status"
      className="sticky top-0 z-10 flex flex-wrap items-center gap-x-3 gap-y-2 border-y bg-paper py-2"
    >
      <span className="text-sm">
        {counted(chosen.length, "run")} chosen{tooMany && `; ${MOST} are compared at once at most`}
      </span>
      {!tooMany && (
        <ButtonLink
          size="small"
          href={`/${workspace}/runs/compare?runs=${chosen.join(",")}`}
          prefetch={false}
        >
          {chosen.length === 1 ? "Compare with…" : "Compare"}
        </ButtonLink>
      )}
      <Button size="small" tone="quiet" onClick={onClear}>
        Choose none
      </Button>
    </div>
  );
}
