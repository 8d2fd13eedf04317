import { asMessage } from "@/lib/language/changes/change";
import { changesOfChecked } from "@/lib/language/changes/of-texts";
import { type Checked, check } from "@/lib/language/checker";

interface Written {
  readonly text: string;
  readonly hash: string;
}

/** UTF-16 units of both texts up to which a list compares them: longer ones would hold up everybody who waits for this process. */
const MOST_COMPARED = 60_000;
/** Summaries that are remembered; a revision never changes, so they never do either. */
const MOST_KEPT = 2_000;
const kept = new Map<string, string>();

/** Says of pairs of texts what changed in a line; each text is checked once. */
export class Summaries {
  private readonly checked = new Map<string, Checked>();

  /** Null where the two are too long for a list. */
  of(before: Written, after: Written): string | null {
    if (before.text.length + after.text.length > MOST_COMPARED) return null;
    const key = before.hash + after.hash;
    const known = kept.get(key);
    if (known !== undefined) return known;
    const summary = this.summarise(before.text, after.text);
    const oldest = kept.keys().next();
    if (kept.size >= MOST_KEPT && !oldest.done) kept.delete(oldest.value);
    kept.set(key, summary);
    return summary;
  }

  private summarise(before: string, after: string): string {
    const [old, now] = [this.check(before), this.check(after)];
    const { state, changes, errors } = changesOfChecked(before === after, old, now);
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

  private check(text: string): Checked {
    const known = this.checked.get(text) ?? check(text);
    this.checked.set(text, known);
    return known;
  }
}
