import { type Checked, check } from "../checker";
import type { Change } from "./change";
import { changesBetween } from "./changes";

/** What became of one text in another. */
export interface TextChanges {
  /**
   * "same text" to the letter; "same meaning" where layout, comments or spellings differ; "not read" where a text has errors, so that
   * nothing can be said of its values.
   */
  readonly state: "same text" | "same meaning" | "changed" | "not read";
  /** Empty unless "changed". */
  readonly changes: readonly Change[];
  /** Errors of the two texts. */
  readonly errors: { readonly before: number; readonly after: number };
}

/** Checks two texts and says what changed from the first to the second. Never throws. */
export function changesOfTexts(before: string, after: string): TextChanges {
  return changesOfChecked(before === after, check(before), check(after));
}

/** As `changesOfTexts`, of texts that are checked already; `isSameText` where they are the same to the letter. */
export function changesOfChecked(isSameText: boolean, before: Checked, after: Checked): TextChanges {
  const errors = { before: errorsOf(before), after: errorsOf(after) };
  if (isSameText) return { state: "same text", changes: [], errors };
  if (before.design === null || after.design === null) return { state: "not read", changes: [], errors };
  const changes = changesBetween(before.design, after.design);
  return { state: changes.length === 0 ? "same meaning" : "changed", changes, errors };
}

function errorsOf({ diagnostics }: Checked): number {
  return diagnostics.filter(({ severity }) => severity === "error").length;
}
