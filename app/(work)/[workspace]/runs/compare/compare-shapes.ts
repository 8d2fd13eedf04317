import type { TextChanges } from "@/lib/language/changes/of-texts";
import type { RunState } from "../[id]/run-shapes";

/** Runs that are compared at once, at most: more lines than these nobody can tell apart. */
export const MOST = 6;

/** A run among those compared. The first one is what the others are measured from. */
export interface ComparedRun {
  /** "A", "B", … in the order of the address. */
  readonly letter: string;
  /** Its plan is an outline: what lies between the ends of long axes is in `settings`, or not needed. */
  readonly run: RunState;
  /** Its first settings in words, in the order in which readings are kept. */
  readonly settings: readonly string[];
  /** What changed in its text against that of the first run; null for the first. */
  readonly changes: TextChanges | null;
}

/** The ids that an address names, each once, at most `MOST`. */
export function readRuns(text: string | null): string[] {
  const ids = (text ?? "").split(",").filter((id) => /^[0-9a-f-]{36}$/.test(id));
  return [...new Set(ids)].slice(0, MOST);
}

export function letterOf(index: number): string {
  return String.fromCharCode(65 + index);
}

/** "A, run 12" and, where they are of different netlists or revisions, what tells them apart. */
export function nameOf({ letter, run }: ComparedRun, among: readonly ComparedRun[]): string {
  const parts = [`${letter}, run ${run.number}`];
  if (among.some((one) => one.run.revision !== run.revision)) parts.push(`revision ${run.revision}`);
  if (among.some((one) => one.run.netlistId !== run.netlistId)) parts.push(run.title);
  return parts.join(", ");
}
