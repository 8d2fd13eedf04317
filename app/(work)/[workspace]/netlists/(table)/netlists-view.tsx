"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useSearchParams } from "next/navigation";
import { Button } from "@/app/_components/ui/button";
import { formatCount } from "@/app/_components/ui/count";
import { SelectField } from "@/app/_components/ui/field";
import { PageHeader } from "@/app/_components/ui/page-header";
import { Pager } from "@/app/_components/ui/pager";
import { SearchBox } from "@/app/_components/ui/search-box";
import { EmptyState, FailedState } from "@/app/_components/ui/states";
import { CreateNetlist } from "./create-netlist";
import { type ListState, PAGE_SIZE, readListState, writeListState } from "./list-state";
import { MovedNotice } from "./moved-notice";
import { NetlistTable } from "./netlist-table";
import { UploadArea } from "./upload-area";
import { useArchive } from "./use-archive";
import { type Found, useNetlists } from "./use-netlists";

interface Props {
  readonly workspace: string;
  readonly mayWrite: boolean;
  readonly first: { readonly state: ListState; readonly found: Found };
}

/** The netlists of a workspace; search, order and page stand in the address. */
export function NetlistsView({ workspace, mayWrite, first }: Props) {
  const state = readListState(new URLSearchParams(useSearchParams()));
  const queries = useQueryClient();
  const { data, error, isPlaceholderData, refetch } = useNetlists(workspace, state, first);
  const show = (change: Partial<ListState>) => {
    const next = { ...state, page: 1, ...change };
    window.history.replaceState(null, "", writeListState(next) || window.location.pathname);
  };
  const { moved, busy, move, close } = useArchive(workspace);
  const isArchive = state.which === "archived";
  const total = data?.total ?? 0;
  const searching = state.query !== "";
  const where = isArchive ? "archived" : "in this workspace";
  const remark = `${formatCount(total)} ${searching ? "found" : where}`;
  return (
    <UploadArea
      workspace={workspace}
      mayWrite={mayWrite}
      onAdded={() => queries.invalidateQueries({ queryKey: ["netlists", workspace] })}
    >
      {(uploadButton, uploadReport) => (
        <>
          <PageHeader
            title="Netlists"
            remark={<span aria-live="polite">{data !== undefined && remark}</span>}
            actions={
              mayWrite ? (
                <>
                  {uploadButton}
                  <CreateNetlist workspace={workspace} />
                </>
              ) : (
                <p className="text-quiet text-sm">You read this workspace as a viewer.</p>
              )
            }
          />
          <div className="grid gap-4 px-4 py-4 md:px-6">
            {uploadReport}
            <div className="grid gap-3 sm:grid-cols-[minmax(0,28rem)_12rem]">
              <SearchBox label="Search netlists" value={state.query} onChange={(query) => show({ query })} />
              <SelectField
                label="Which netlists"
                labelHidden
                value={state.which}
                onChange={({ target }) =>
                  show({ which: target.value === "archived" ? "archived" : "in use" })
                }
              >
                <option value="in use">In use</option>
                <option value="archived">Archived</option>
              </SelectField>
            </div>
            {moved !== null && (
              <MovedNotice
                workspace={workspace}
                moved={moved}
                busy={busy}
                onUndo={() => void move(moved.row, moved.to === "archive" ? "bring-back" : "archive")}
                onClose={close}
              />
            )}
            {error !== null && (
              <FailedState
                title="The list could not be brought up to date"
                action={<Button onClick={() => refetch()}>Try again</Button>}
              >
                <p>{error.message}</p>
              </FailedState>
            )}
            {data !== undefined && total > 0 && (
              <NetlistTable
                workspace={workspace}
                rows={data.rows}
                sort={state.sort}
                direction={state.direction}
                stale={isPlaceholderData}
                onSort={(sort, direction) => show({ sort, direction })}
                move={
                  mayWrite
                    ? {
                        words: isArchive ? "Bring back" : "Archive",
                        onMove: (row) => void move(row, isArchive ? "bring-back" : "archive"),
                      }
                    : null
                }
              />
            )}
            {total > PAGE_SIZE && (
              <Pager page={state.page} size={PAGE_SIZE} total={total} onPage={(page) => show({ page })} />
            )}
            {data !== undefined && total === 0 && searching && (
              <EmptyState
                title={`No netlist matches “${state.query}”`}
                action={<Button onClick={() => show({ query: "" })}>Show all netlists</Button>}
              >
                <p>The search looks at titles, owners and the text of the latest revision.</p>
              </EmptyState>
            )}
            {data !== undefined && total === 0 && !searching && isArchive && (
              <EmptyState
                title="Nothing is archived"
                action={<Button onClick={() => show({ which: "in use" })}>Show those in use</Button>}
              >
                <p>What is archived leaves the list, keeps its revisions, runs and links, and stands here.</p>
              </EmptyState>
            )}
            {data !== undefined && total === 0 && !searching && !isArchive && (
              <EmptyState title="No netlists yet">
                <p>
                  A netlist holds a circuit, what to sweep and which traces to keep.
                  {mayWrite &&
                    " Make a new one, which starts with a small circuit that runs, or drop .swn files on this page."}
                </p>
              </EmptyState>
            )}
          </div>
        </>
      )}
    </UploadArea>
  );
}
