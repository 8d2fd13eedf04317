import type { OutcomeKind } from "@/lib/solver/outcome";

const REASONS: Readonly<Record<Exclude<OutcomeKind, "converged">, string>> = {
  "iteration limit": "The iteration came to no rest within its limit of steps.",
  "step too small": "The iteration stopped moving before the currents balanced.",
  singular: "The equations have no single solution here: some current or voltage is left undetermined.",
  "not finite": "A voltage or current grew beyond every number.",
};

/** One sentence why a point has no value, for people; null for a point that converged. */
export function reasonOf(outcome: OutcomeKind, unsettled: readonly string[]): string | null {
  if (outcome === "converged") return null;
  const reason = REASONS[outcome];
  return unsettled.length === 0 ? reason : `${reason} Farthest from settled: ${unsettled.join(", ")}.`;
}
