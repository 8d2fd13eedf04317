import type { OutcomeKind } from "@/lib/solver/outcome";

/** What became of a point, for people: a word or two, and why where it has no value. */
const WORDS: Readonly<Record<OutcomeKind, { readonly short: string; readonly why: string | null }>> = {
  converged: { short: "solved", why: null },
  "iteration limit": {
    short: "did not settle",
    why: "Step after step the solution kept moving and came to no rest.",
  },
  "step too small": {
    short: "came to a stand",
    why: "The steps stopped moving before the currents balanced.",
  },
  singular: {
    short: "undetermined",
    why: "The equations have no single solution here: some current or voltage is left undetermined.",
  },
  "not finite": { short: "out of bounds", why: "A voltage or current grew beyond every number." },
};

/** "solved", "did not settle", …; "not solved yet" for a point that is still to come. */
export function outcomeInWords(outcome: OutcomeKind | null): string {
  return outcome === null ? "not solved yet" : WORDS[outcome].short;
}

/** One sentence why a point has no value, with what would not settle; null for a point that is solved. */
export function reasonOf(outcome: OutcomeKind, unsettled: readonly string[]): string | null {
  const { why } = WORDS[outcome];
  return why === null || unsettled.length === 0
    ? why
    : `${why} Farthest from settled: ${unsettled.join(", ")}.`;
}
