/** Where something stands in the list of "Find or do…", and in this order: what the page in hand offers comes first. */
export const GROUPS = ["here", "places", "reading", "self", "netlists", "runs"] as const;
export type Group = (typeof GROUPS)[number];

export const GROUP_NAMES: Readonly<Record<Group, string>> = {
  here: "On this page",
  places: "Go to",
  reading: "Read",
  self: "For you",
  netlists: "Netlists",
  runs: "Runs",
};

/** Something that can be done or opened. */
export interface Deed {
  /** One of a kind within its group. */
  readonly id: string;
  /** What it does, as the button for it says: "Queue run". */
  readonly words: string;
  /** What tells it apart from others of these words. */
  readonly note?: string;
  /** Other words that find it. */
  readonly also?: string;
  /** Left out while nothing is typed: one of very many. */
  readonly onlyAsked?: boolean;
  /** Keys that do the same, by their names on a usual keyboard. */
  readonly keys?: string;
  /** Does it, or the page to open. */
  readonly does: (() => void) | string;
}

/** A deed at its place in the list. */
export interface Entry extends Deed {
  readonly group: Group;
  /** One of a kind in the whole list. */
  readonly key: string;
}

const NO_MATCH = Number.POSITIVE_INFINITY;

/**
 * How well a deed answers to what was typed: 0 where its words begin with it, 1 where each typed word begins a word of them, 2
 * where each occurs in them, 3 where another word had to help; infinite where it does not answer.
 */
export function rank({ words, note = "", also = "", onlyAsked }: Deed, query: string): number {
  const typed = plain(query);
  if (typed === "") return onlyAsked ? NO_MATCH : 0;
  const own = plain(words);
  if (own.startsWith(typed)) return 0;
  const parts = typed.split(" ");
  const begins = own.split(" ");
  if (parts.every((part) => begins.some((word) => word.startsWith(part)))) return 1;
  if (parts.every((part) => own.includes(part))) return 2;
  const all = `${own} ${plain(note)} ${plain(also)}`;
  return parts.every((part) => all.includes(part)) ? 3 : NO_MATCH;
}

/** The deeds of a group that answer, the best first, otherwise in their own order. */
export function answering(group: Group, deeds: readonly Deed[], query: string): Entry[] {
  return deeds
    .map((deed) => ({ deed, at: rank(deed, query) }))
    .filter(({ at }) => at !== NO_MATCH)
    .sort((a, b) => a.at - b.at)
    .map(({ deed }) => ({ ...deed, group, key: `${group} ${deed.id}` }));
}

function plain(text: string): string {
  return text
    .toLowerCase()
    .replaceAll(/[\s\u202f]+/g, " ")
    .trim();
}
