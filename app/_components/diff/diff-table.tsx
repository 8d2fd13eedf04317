"use client";

import type { linesOf } from "../editor/plain-lines";
import { classNames } from "../ui/class-names";
import { counted } from "../ui/count";
import { TableFrame } from "../ui/table";
import { GROUNDS, InkedLine, type LineSort } from "./inked-line";
import type { DiffLine, DiffRow } from "./line-diff";

/** A row of the two texts, or a fold that begins at one and hides `count`. */
export type Shown = { readonly row: number } | { readonly fold: number; readonly count: number };

type Coloured = ReturnType<typeof linesOf>;

interface Props {
  readonly rows: readonly DiffRow[];
  readonly shown: readonly Shown[];
  readonly coloured: { readonly before: Coloured; readonly after: Coloured };
  readonly labels: readonly [before: string, after: string];
  readonly form: "beside" | "inline";
  readonly onUnfold: (fold: number) => void;
}

/** The rows of a comparison as a table: each line with its number, its sign and its words. */
export function DiffTable({ rows, shown, coloured, labels, form, onUnfold }: Props) {
  const isBeside = form === "beside";
  return (
    <TableFrame label="Text, line by line" className="relative border bg-surface">
      <table
        className={classNames(
          "w-full border-collapse font-(family-name:--font-figures) text-[0.8125rem] leading-6",
          isBeside && "min-w-[640px] table-fixed",
        )}
      >
        <caption className="sr-only">
          {labels[0]} and {labels[1]}, line by line
        </caption>
        {isBeside && (
          <colgroup>
            <col className="w-11" />
            <col />
            <col className="w-11" />
            <col />
          </colgroup>
        )}
        <thead>
          <tr className="text-left font-(family-name:--font-text) text-quiet">
            {isBeside ? (
              labels.map((label) => (
                <th key={label} colSpan={2} scope="colgroup" className="border-b px-3 py-1.5 font-semibold">
                  {label}
                </th>
              ))
            ) : (
              <th colSpan={3} scope="colgroup" className="border-b px-3 py-1.5 font-semibold">
                − {labels[0]}, + {labels[1]}
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {shown.map((one) => {
            if ("fold" in one) {
              return (
                <tr key={`fold ${one.fold}`}>
                  <td colSpan={isBeside ? 4 : 3} className="border-y bg-wash">
                    <button
                      type="button"
                      onClick={() => onUnfold(one.fold)}
                      className="min-h-7 w-full px-3 text-left font-(family-name:--font-text) text-quiet hover:text-ink"
                    >
                      {counted(one.count, "line")} the same; show
                    </button>
                  </td>
                </tr>
              );
            }
            const row = rows[one.row]!;
            const focus = row.isSame ? {} : { tabIndex: -1, "data-row": one.row };
            if (isBeside) {
              return (
                <tr key={one.row} {...focus} className="align-top">
                  <Side line={row.before} sort={row.isSame ? "same" : "removed"} coloured={coloured.before} />
                  <Side
                    line={row.after}
                    sort={row.isSame ? "same" : "added"}
                    coloured={coloured.after}
                    edge
                  />
                </tr>
              );
            }
            return <InlineRows key={one.row} row={row} coloured={coloured} focus={focus} />;
          })}
        </tbody>
      </table>
    </TableFrame>
  );
}

const SIGNS: Record<LineSort, { sign: string; said: string }> = {
  same: { sign: " ", said: "" },
  removed: { sign: "−", said: "removed: " },
  added: { sign: "+", said: "added: " },
};

function Side({
  line,
  sort,
  coloured,
  edge = false,
}: {
  readonly line: DiffLine | null;
  readonly sort: LineSort;
  readonly coloured: Coloured;
  readonly edge?: boolean;
}) {
  if (line === null) {
    return <td colSpan={2} className={classNames("bg-wash", edge && "border-l")} />;
  }
  return (
    <>
      <td className={classNames("select-none pr-2 text-right text-quiet", GROUNDS[sort], edge && "border-l")}>
        {line.number}
      </td>
      <td className={classNames("pr-3", GROUNDS[sort])}>
        <LineText line={line} sort={sort} coloured={coloured} />
      </td>
    </>
  );
}

function InlineRows({
  row,
  coloured,
  focus,
}: {
  readonly row: DiffRow;
  readonly coloured: Props["coloured"];
  readonly focus: Readonly<Record<string, number>>;
}) {
  const parts: [DiffLine | null, LineSort][] = row.isSame
    ? [[row.after, "same"]]
    : [
        [row.before, "removed"],
        [row.after, "added"],
      ];
  return parts
    .filter((part): part is [DiffLine, LineSort] => part[0] !== null)
    .map(([line, sort], index) => (
      <tr key={sort} {...(index === 0 ? focus : {})} className="align-top">
        <td className={classNames("w-10 select-none pr-2 text-right text-quiet", GROUNDS[sort])}>
          {sort === "added" ? "" : (row.before?.number ?? "")}
        </td>
        <td className={classNames("w-10 select-none pr-2 text-right text-quiet", GROUNDS[sort])}>
          {sort === "removed" ? "" : (row.after?.number ?? "")}
        </td>
        <td className={classNames("pr-3", GROUNDS[sort])}>
          <LineText
            line={line}
            sort={sort}
            coloured={sort === "removed" ? coloured.before : coloured.after}
          />
        </td>
      </tr>
    ));
}

function LineText({
  line,
  sort,
  coloured,
}: {
  readonly line: DiffLine;
  readonly sort: LineSort;
  readonly coloured: Coloured;
}) {
  const { sign, said } = SIGNS[sort];
  const whole = coloured[line.number - 1];
  return (
    <div className="grid grid-cols-[1.25rem_minmax(0,1fr)]">
      <span aria-hidden="true" className="select-none text-quiet">
        {sign}
      </span>
      <span>
        {said !== "" && <span className="sr-only">{said}</span>}
        <InkedLine pieces={whole?.pieces ?? []} marks={line.marks} start={whole?.at ?? 0} sort={sort} />
      </span>
    </div>
  );
}
