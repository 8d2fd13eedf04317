/** What a change is about, in the order in which changes are listed. */
export const CHANGE_SORTS = [
  "title",
  "value",
  "model",
  "element",
  "net",
  "sweep",
  "draws",
  "trace",
  "reading",
  "requirement",
] as const;

export type ChangeSort = (typeof CHANGE_SORTS)[number];

/** What happened to it; a requirement can become harder or easier to hold. */
export type Deed = "added" | "removed" | "changed" | "renamed" | "tightened" | "loosened";

/** One difference between the meanings of two texts. */
export interface Change {
  readonly sort: ChangeSort;
  readonly deed: Deed;
  /** Names of what changed, a requirement by its label; several where blocks made the same part more than once. */
  readonly subjects: readonly string[];
  /** What is said of them, without the names: `100 kΩ ± 0.1 % became 47 kΩ ± 0.1 %`. */
  readonly says: string;
  /** The same in few words, for a message: `47 kΩ instead of 100 kΩ`. */
  readonly brief: string;
}

/** Names listed of one change. */
const MOST_NAMED = 4;

/** A change as a sentence without a full stop: `R_out: 100 kΩ ± 0.1 % became 47 kΩ ± 0.1 %`. */
export function inWords({ sort, subjects, says }: Change): string {
  return isWhole(sort) ? says : `${named(sort, subjects)}: ${says}`;
}

/** A few changes as the message of a revision, about `most` characters long; empty where there are none. */
export function asMessage(changes: readonly Change[], most = 120): string {
  let message = "";
  for (const [index, change] of changes.entries()) {
    const { sort, subjects, brief } = change;
    const one = isWhole(sort) ? brief : `${named(sort, subjects)} ${brief}`;
    if (index > 0 && message.length + one.length > most) {
      const left = changes.length - index;
      return `${message}; ${left === 1 ? "1 more change" : `${left} more changes`}`;
    }
    message = index === 0 ? one : `${message}; ${one}`;
  }
  return Array.from(message).slice(0, 400).join("");
}

/** Whether what is said of such a change names its subject already. */
export function isWhole(sort: ChangeSort): boolean {
  return sort === "title" || sort === "draws";
}

const NAMES: Partial<Record<ChangeSort, (name: string) => string>> = {
  sweep: (name) => `sweep of ${name}`,
  trace: (name) => `trace ${name}`,
  reading: (name) => `reading ${name}`,
  requirement: (name) => `requirement “${name}”`,
};

function named(sort: ChangeSort, subjects: readonly string[]): string {
  return listed(subjects.map(NAMES[sort] ?? ((name) => name)));
}

/** Names with commas between, the last of many counted. */
export function listed(names: readonly string[]): string {
  if (names.length <= MOST_NAMED) return names.join(", ");
  return `${names.slice(0, MOST_NAMED - 1).join(", ")} and ${names.length - MOST_NAMED + 1} more`;
}
