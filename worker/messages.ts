import type { StoredShard } from "@/lib/services/chunks/columns";

/** What the main thread asks of a computing thread: the flat points [from, to) of the run of `text`. */
export interface Task {
  readonly text: string;
  readonly from: number;
  readonly to: number;
  /** Points of the whole run, as it was planned. */
  readonly points: number;
}

/** What a computing thread answers. A task ends with "solved" or "broken". */
export type Reply =
  /** The thread has solved its warm-up and waits for tasks. */
  | { readonly kind: "ready" }
  | { readonly kind: "progress"; readonly pointsDone: number }
  | { readonly kind: "solved"; readonly result: StoredShard }
  /** The solver threw, which it never should; `reason` is for the log. */
  | { readonly kind: "broken"; readonly reason: string };
