"use client";

import {
  createColumnHelper,
  rowSortingFeature,
  type SortingState,
  tableFeatures,
  useTable,
} from "@tanstack/react-table";
import Link from "next/link";
import { Button } from "@/app/_components/ui/button";
import { classNames } from "@/app/_components/ui/class-names";
import { StateBadge, shownState } from "@/app/_components/ui/state-badge";
import { Cell, HeadCell, Table } from "@/app/_components/ui/table";
import { When } from "@/app/_components/ui/when";
import type { ListState, SortKey } from "./list-state";
import { SortHead } from "./sort-head";
import type { NetlistRow } from "./use-netlists";

const features = tableFeatures({ rowSortingFeature });
const helper = createColumnHelper<typeof features, NetlistRow>();

/** Columns beside the title fold into a line under it where the page is narrow. */
const WIDE = "hidden md:table-cell";

const columns = helper.columns([
  helper.accessor("number", { id: "number", header: "No.", enableSorting: false }),
  helper.accessor("title", { id: "title", header: "Title" }),
  helper.accessor("owner", { id: "owner", header: "Owner" }),
  helper.accessor("revision", { id: "revision", header: "Revision", enableSorting: false }),
  helper.accessor("updatedAt", { id: "updated", header: "Saved" }),
  helper.accessor((row) => row.lastRun?.status ?? null, { id: "status", header: "Latest run" }),
]);

const FIGURES: readonly string[] = ["number", "revision"];
const NARROW: readonly string[] = ["title", "status"];

interface Props {
  readonly workspace: string;
  readonly rows: readonly NetlistRow[];
  readonly sort: SortKey;
  readonly direction: ListState["direction"];
  /** The rows are of an earlier state while the new ones are fetched. */
  readonly stale: boolean;
  readonly onSort: (sort: SortKey, direction: ListState["direction"]) => void;
  /** Takes a netlist out of the list, or puts it back; null for those who may not. */
  readonly move: { readonly words: string; readonly onMove: (row: NetlistRow) => void } | null;
}

/** The table itself. The server sorts and pages; the table here only knows which order it shows. */
export function NetlistTable({ workspace, rows, sort, direction, stale, onSort, move }: Props) {
  const sorting: SortingState = [{ id: sort, desc: direction === "descending" }];
  const table = useTable({
    features,
    columns,
    data: rows,
    getRowId: (row) => row.id,
    manualSorting: true,
    enableSortingRemoval: false,
    state: { sorting },
    onSortingChange: (change) => {
      const [next] = typeof change === "function" ? change(sorting) : change;
      if (next !== undefined) onSort(next.id as SortKey, next.desc ? "descending" : "ascending");
    },
  });
  return (
    <Table aria-busy={stale} className={classNames("table-fixed md:table-auto", stale && "opacity-60")}>
      <caption className="sr-only">
        Netlists, sorted by {sort}, {direction}
      </caption>
      <thead>
        {table.getHeaderGroups().map((group) => (
          <tr key={group.id}>
            {group.headers.map((header) => {
              const { id } = header.column;
              const className = NARROW.includes(id) ? undefined : WIDE;
              const label = String(header.column.columnDef.header);
              return header.column.getCanSort() ? (
                <SortHead
                  key={id}
                  label={label}
                  sorted={header.column.getIsSorted()}
                  onPress={() => header.column.toggleSorting()}
                  className={classNames(className, id === "status" && "w-28 md:w-auto")}
                />
              ) : (
                <HeadCell key={id} figure={FIGURES.includes(id)} className={className}>
                  {label}
                </HeadCell>
              );
            })}
            {move !== null && (
              <HeadCell className={WIDE}>
                <span className="sr-only">What can be done</span>
              </HeadCell>
            )}
          </tr>
        ))}
      </thead>
      <tbody>
        {table.getRowModel().rows.map(({ id, original }) => (
          <Row key={id} workspace={workspace} row={original} move={move} />
        ))}
      </tbody>
    </Table>
  );
}

function Row({ workspace, row, move }: { readonly row: NetlistRow } & Pick<Props, "workspace" | "move">) {
  const { lastRun } = row;
  const moveButton = move !== null && (
    <Button
      size="small"
      tone="quiet"
      aria-label={`${move.words} ${row.title}`}
      onClick={() => move.onMove(row)}
      className="font-normal! text-quiet!"
    >
      {move.words}
    </Button>
  );
  return (
    <tr>
      <Cell figure className={classNames(WIDE, "w-12 text-quiet")}>
        {row.number}
      </Cell>
      <Cell>
        <Link
          href={`/${workspace}/netlists/${row.id}`}
          className="inline-block min-h-6 break-words font-semibold underline-offset-3 hover:underline"
        >
          {row.title}
        </Link>
        <p className="text-quiet text-xs md:hidden">
          {row.owner}, revision {row.revision}, <When iso={row.updatedAt} />
        </p>
        <div className="-ml-2 empty:hidden md:hidden">{moveButton}</div>
      </Cell>
      <Cell className={WIDE}>{row.owner}</Cell>
      <Cell figure className={WIDE}>
        {row.revision}
      </Cell>
      <Cell className={WIDE}>
        <When iso={row.updatedAt} />
      </Cell>
      <Cell>
        {lastRun === null ? (
          <StateBadge state="never run" />
        ) : (
          <Link
            href={`/${workspace}/runs/${lastRun.id}`}
            aria-label={`Run ${lastRun.number} of ${row.title}: ${lastRun.status}`}
            className="inline-block min-h-6 underline-offset-3 hover:underline"
          >
            <StateBadge state={shownState(lastRun)} failed={lastRun.pointsFailed} />
          </Link>
        )}
      </Cell>
      {move !== null && <Cell className={classNames(WIDE, "py-1! text-right")}>{moveButton}</Cell>}
    </tr>
  );
}
