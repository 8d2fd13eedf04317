import type { Plan } from "@/lib/analyses/plan";
import type { Verdict } from "@/lib/analyses/result";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import type { OutcomeKind } from "@/lib/solver/outcome";

export type RunStatus = "queued" | "running" | "done" | "failed" | "cancelled";

/** The part of a run that changes while it is computed; an event of the stream carries it whole. */
export interface Progress {
  readonly status: RunStatus;
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
}

/** A run as its page shows it. Times are ISO 8601. */
export interface RunState extends Progress {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  readonly netlistId: string;
  readonly netlistNumber: number;
  readonly revision: number;
  readonly hash: string;
  readonly queuedAt: string;
  readonly startedAt: string | null;
  readonly finishedAt: string | null;
  /** One sentence why the whole run could not be computed; null otherwise. */
  readonly error: string | null;
  readonly requestedBy: string;
  readonly engineVersion: string;
  readonly lastEvent: number;
  readonly plan: Plan;
  /** Of the requirements; null before they are judged and where there are none. */
  readonly verdict: Verdict | null;
  readonly judgement: KeptJudgement | null;
  /** Rows of the outer sweeps whose operating points are looked for; null where the text asks for one alone. */
  readonly search?: { readonly rows: number; readonly rowsDone: number } | null;
}

/** Where a run's text says what (lines counted from 1), and what has come since. */
export interface RunContext {
  readonly latestRevision: number;
  /** By part and parameter with a blank between. */
  readonly toleranceLines: Readonly<Record<string, number>>;
  readonly readingLines: Readonly<Record<string, number>>;
  readonly requirementLines: readonly number[];
}

interface Figure {
  readonly name: string;
  readonly unit: string;
  readonly value: number | null;
}

/** The account of one point, as the service gives it. */
export interface PointAccount {
  readonly point: number;
  readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
  readonly outcome: OutcomeKind | null;
  readonly iterations: number | null;
  /** A. */
  readonly residual: number | null;
  /** V; null without a proof. */
  readonly bound: number | null;
  readonly rung: string | null;
  readonly unknowns: readonly Figure[];
  readonly traces: readonly Figure[];
  readonly failure: string | null;
}

export function isLive(status: RunStatus): boolean {
  return status === "queued" || status === "running";
}
