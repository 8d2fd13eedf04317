import { asMessage } from "@/lib/language/changes/change";
import { changesOfTexts } from "@/lib/language/changes/of-texts";

interface Written {
  readonly text: string;
  readonly hash: string;
}

/** UTF-16 units of both texts up to which a list compares them: longer ones would hold up everybody who waits for this process. */
const MOST_COMPARED = 60_000;
/** Summaries that are remembered; a revision never changes, so they never do either. */
const MOST_KEPT = 2_000;
const kept = new Map<string, string>();

/** What changed from one text to another in a line; null where they are too long for a list. */
export function summaryOf(before: Written, after: Written): string | null {
  if (before.text.length + after.text.length > MOST_COMPARED) return null;
  const key = before.hash + after.hash;
  const known = kept.get(key);
  if (known !== undefined) return known;
  const summary = summarise(before.text, after.text);
  const oldest = kept.keys().next();
  if (kept.size >= MOST_KEPT && !oldest.done) kept.delete(oldest.value);
  kept.set(key, summary);
  return summary;
}

function summarise(before: string, after: string): string {
  const { state, changes, errors } = changesOfTexts(before, after);
  switch (state) {
    case "same text":
    case "same meaning":
      return "Comments or layout only";
    case "not read":
      return errors.after > 0 ? "The text has errors" : "The text before it has errors";
    default:
      return asMessage(changes, 160);
  }
}
