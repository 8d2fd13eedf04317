import type { PageState } from "../[id]/page-state";
import { readPageState, writePageState } from "../[id]/page-state";

/** What the address of the page keeps beside the runs: how curves are shown, and what differences are measured from. */
export interface CompareState extends PageState {
  readonly mode: "overlay" | "difference";
  /** Setting that all differences are measured from, in words; null: each curve's own. */
  readonly origin: string | null;
}

export function readCompareState(search: URLSearchParams): CompareState {
  return {
    ...readPageState(search),
    mode: search.get("show") === "difference" ? "difference" : "overlay",
    origin: search.get("origin") || null,
  };
}

/** The address part for runs and a state, without what is usual. */
export function writeCompareState(runs: readonly string[], state: CompareState): string {
  const search = new URLSearchParams(writePageState(state));
  if (state.mode === "difference") search.set("show", "difference");
  if (state.origin !== null) search.set("origin", state.origin);
  const rest = search.toString();
  // Commas between ids stay readable: they mean nothing else in an address.
  const named = runs.length === 0 ? "" : `runs=${runs.join(",")}`;
  const text = [named, rest].filter(Boolean).join("&");
  return text === "" ? "" : `?${text}`;
}
