export const STATUSES = ["queued", "running", "done", "failed", "cancelled"] as const;
export type RunStatus = (typeof STATUSES)[number];

/** What the address of the runs table keeps, so that a link or a reload shows the same rows. */
export interface ListState {
  readonly query: string;
  readonly status: RunStatus | null;
  /** Counted from 1. */
  readonly page: number;
}

/** Rows on one page of the table. */
export const PAGE_SIZE = 25;

/** The state an address names; what is missing or makes no sense takes its usual value. */
export function readListState(search: URLSearchParams): ListState {
  const page = Number(search.get("page") ?? 1);
  return {
    // What is no text, or was cut in half, cannot be searched for.
    query: (search.get("query") ?? "").slice(0, 200).replaceAll(/[\0\p{Surrogate}]/gu, ""),
    status: STATUSES.find((status) => status === search.get("status")) ?? null,
    page: Number.isInteger(page) && page > 0 && page < 1e6 ? page : 1,
  };
}

/** The address part for a state, without what is usual; begins with "?" unless empty. */
export function writeListState({ query, status, page }: ListState): string {
  const search = new URLSearchParams();
  if (query !== "") search.set("query", query);
  if (status !== null) search.set("status", status);
  if (page !== 1) search.set("page", String(page));
  const text = search.toString();
  return text === "" ? "" : `?${text}`;
}
