import type { ReactNode } from "react";

export interface Row {
  /** The address of the row within the page. */
  readonly id: string;
  readonly cells: readonly ReactNode[];
}

/**
 * A table whose first column names its rows and is linked to. Columns named in `spare` give way on a narrow screen; what they say has
 * to stand in `small` then, under the cell of the second column.
 */
export function ReferenceTable({
  caption,
  heads,
  rows,
  spare = [],
  small,
}: {
  readonly caption: string;
  readonly heads: readonly string[];
  readonly rows: readonly Row[];
  readonly spare?: readonly number[];
  readonly small?: (row: Row) => ReactNode;
}) {
  const hidden = (k: number) => (spare.includes(k) ? "hidden sm:table-cell" : "");
  return (
    <table className="mt-3 w-full border-collapse text-left text-sm">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr className="border-b">
          {heads.map((head, k) => (
            <th key={head} scope="col" className={`caption py-1.5 pr-4 align-bottom ${hidden(k)}`}>
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.id} id={row.id} data-entry="" className="border-b align-top target:bg-wash">
            {row.cells.map((cell, k) =>
              k === 0 ? (
                <th key={heads[k]} scope="row" className="py-1.5 pr-4 font-normal">
                  <a href={`#${row.id}`} className="inline-flex min-h-6 items-center gap-2 hover:underline">
                    {cell}
                  </a>
                </th>
              ) : (
                <td key={heads[k]} className={`py-1.5 pr-4 last:pr-0 ${hidden(k)}`}>
                  {cell}
                  {k === 1 && small !== undefined && <div className="text-quiet sm:hidden">{small(row)}</div>}
                </td>
              ),
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
