/** Revisions on a page of the history. */
export const REVISIONS_SHOWN = 20;

/** A revision as the history lists it. */
export interface RevisionLine {
  readonly number: number;
  readonly hash: string;
  readonly message: string | null;
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
  readonly lastRun: {
    readonly id: string;
    readonly number: number;
    readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
    readonly verdict: "holds" | "broken" | "no data" | null;
    readonly points: number;
    readonly pointsFailed: number;
  } | null;
  /** What changed from the one before, in short; null where nothing is said of it. */
  readonly changes: string | null;
}

export interface RevisionLines {
  readonly rows: readonly RevisionLine[];
  readonly total: number;
}
