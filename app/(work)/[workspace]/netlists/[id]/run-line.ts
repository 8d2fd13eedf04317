/** Runs that the sheet lists. */
export const RUNS_SHOWN = 6;

/** A run of this netlist as the sheet lists it. */
export interface RunLine {
  readonly id: string;
  readonly number: number;
  readonly revision: number;
  readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** ISO 8601. */
  readonly queuedAt: string;
  readonly requestedBy: string;
  readonly error: string | null;
}

export interface RunLines {
  readonly rows: readonly RunLine[];
  readonly total: number;
}
