"use client";

import { Button } from "@/app/_components/ui/button";
import { formatCount } from "@/app/_components/ui/count";
import { PAGE_SIZE } from "./list-state";

/** Which rows stand on this page, and the way to the others. `page` counts from 1. */
export function Pager({
  page,
  total,
  onPage,
}: {
  readonly page: number;
  readonly total: number;
  readonly onPage: (page: number) => void;
}) {
  const pages = Math.max(1, Math.ceil(total / PAGE_SIZE));
  const from = Math.min(total, (page - 1) * PAGE_SIZE + 1);
  const to = Math.min(total, page * PAGE_SIZE);
  return (
    <nav aria-label="Pages of the table" className="flex flex-wrap items-center gap-3">
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
