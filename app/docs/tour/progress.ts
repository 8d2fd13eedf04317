import type { StepName } from "./steps";

/** What the browser keeps of a tour. */
export interface Progress {
  /** The step that is open. */
  readonly at: StepName;
  /** What was said of the steps that were done. */
  readonly done: Partial<Record<StepName, string>>;
  /** The netlist that the tour's text has become. */
  readonly netlist: { readonly workspace: string; readonly id: string } | null;
}

export const BEGINNING: Progress = { at: "read", done: {}, netlist: null };

const NAME = "sweepwright tour";

/** How far the reader was when they left; the beginning where nothing is kept. */
export function keptProgress(): Progress {
  try {
    const kept = localStorage.getItem(NAME);
    return kept === null ? BEGINNING : { ...BEGINNING, ...JSON.parse(kept) };
  } catch {
    return BEGINNING;
  }
}

/** Keeps it; a browser that keeps nothing begins anew at each visit. */
export function keepProgress(progress: Progress): void {
  try {
    localStorage.setItem(NAME, JSON.stringify(progress));
  } catch {
    return;
  }
}
