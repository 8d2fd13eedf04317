/** What the address of the netlists table keeps, so that a link or a reload shows the same rows. */
export interface ListState {
  readonly query: string;
  readonly which: "in use" | "archived";
  readonly sort: SortKey;
  readonly direction: "ascending" | "descending";
  /** Counted from 1. */
  readonly page: number;
}

export const SORT_KEYS = ["title", "updated", "owner", "status"] as const;
export type SortKey = (typeof SORT_KEYS)[number];

/** Rows on one page of the table. */
export const PAGE_SIZE = 25;

const START: ListState = { query: "", which: "in use", sort: "updated", direction: "descending", page: 1 };

/** The state an address names; what is missing or makes no sense takes its usual value. */
export function readListState(search: URLSearchParams): ListState {
  const sort = SORT_KEYS.find((key) => key === search.get("sort")) ?? START.sort;
  const page = Number(search.get("page") ?? 1);
  return {
    // What is no text, or was cut in half, cannot be searched for.
    query: (search.get("query") ?? "").slice(0, 200).replaceAll(/[\0\p{Surrogate}]/gu, ""),
    which: search.get("which") === "archived" ? "archived" : "in use",
    sort,
    direction: search.get("direction") === "ascending" ? "ascending" : usualDirection(search, sort),
    page: Number.isInteger(page) && page > 0 && page < 1e6 ? page : 1,
  };
}

function usualDirection(search: URLSearchParams, sort: SortKey): ListState["direction"] {
  if (search.get("direction") === "descending") return "descending";
  return sort === "updated" ? "descending" : "ascending";
}

/** The address part for a state, without what is usual; begins with "?" unless empty. */
export function writeListState(state: ListState): string {
  const search = new URLSearchParams();
  if (state.query !== "") search.set("query", state.query);
  if (state.which !== START.which) search.set("which", state.which);
  if (state.sort !== START.sort || state.direction !== START.direction) {
    search.set("sort", state.sort);
    search.set("direction", state.direction);
  }
  if (state.page !== 1) search.set("page", String(state.page));
  const text = search.toString();
  return text === "" ? "" : `?${text}`;
}
