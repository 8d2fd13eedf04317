import type { DiffForm } from "@/app/_components/diff/text-diff";
import type { ReadingDocument, RequirementDocument, Verdict } from "@/lib/analyses/result";

/** A finished run of a revision, as far as it is compared without its curves. */
export interface ComparedRun {
  readonly id: string;
  readonly number: number;
  readonly verdict: Verdict | null;
  /** False for a moment after it has finished. */
  readonly isJudged: boolean;
  readonly requirements: readonly RequirementDocument[];
  /** Those with one value a sweep. */
  readonly readings: readonly ReadingDocument[];
  /** The first settings of the outer sweeps in words, in the order in which readings are kept. */
  readonly settings: readonly string[];
  /** How many there are. */
  readonly settingCount: number;
}

/** One of the two revisions. */
export interface Side {
  readonly number: number;
  readonly hash: string;
  readonly text: string;
  readonly message: string | null;
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
  /** The newest run in whatever state; null where it never ran. */
  readonly newest: {
    readonly id: string;
    readonly number: number;
    readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
    readonly verdict: Verdict | null;
    readonly pointsFailed: number;
    readonly error: string | null;
  } | null;
  /** The newest one that finished; null where none did. */
  readonly run: ComparedRun | null;
}

/** What an address compares: two revisions, or one with the unsaved draft that this browser keeps. */
export type Pair = readonly [before: number, after: number | "draft"];

/** The pair that `3..5` or `3..draft` names, dots written as they are or as `%2E`; null for anything else. */
export function readPair(text: string): Pair | null {
  const [, a, b] = /^([1-9]\d{0,8})\.\.([1-9]\d{0,8}|draft)$/.exec(text.replaceAll(/%2e/gi, ".")) ?? [];
  return a === undefined || b === undefined ? null : [Number(a), b === "draft" ? b : Number(b)];
}

/** How the texts stand, as the search part of an address asks for; null where it asks for nothing. */
export function formIn(search: string): DiffForm | null {
  const asked = new URLSearchParams(search).get("text");
  return asked === "inline" || asked === "beside" ? asked : null;
}
