"use client";

import { Button } from "./button";
import { formatCount } from "./count";

/** Which rows stand on this page of `size`, and the way to the others. `page` counts from 1; `label` names the row of buttons. */
export function Pager({
  label = "Pages of the table",
  page,
  size,
  total,
  onPage,
}: {
  readonly label?: string;
  readonly page: number;
  readonly size: number;
  readonly total: number;
  readonly onPage: (page: number) => void;
}) {
  const pages = Math.max(1, Math.ceil(total / size));
  const from = Math.min(total, (page - 1) * size + 1);
  const to = Math.min(total, page * size);
  return (
    <nav aria-label={label} className="flex flex-wrap items-center gap-3">
      <p className="grow text-quiet text-sm" aria-live="polite">
        {formatCount(from)}–{formatCount(to)} of {formatCount(total)}
      </p>
      <Button size="small" disabled={page <= 1} onClick={() => onPage(Math.min(pages, page - 1))}>
        Previous
      </Button>
      <Button size="small" disabled={page >= pages} onClick={() => onPage(page + 1)}>
        Next
      </Button>
    </nav>
  );
}
