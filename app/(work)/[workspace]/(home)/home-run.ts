import type { SparklineData } from "@/app/_components/ui/sparkline";

/** A run as the home page lists it. */
export interface HomeRun {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly revision: number;
  readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
  readonly verdict: "holds" | "broken" | "no data" | null;
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** ISO 8601. */
  readonly queuedAt: string;
  readonly requestedBy: string;
  /** Why it failed; null otherwise. */
  readonly error: string | null;
  readonly sparkline: SparklineData | null;
}
