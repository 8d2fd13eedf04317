import type { OutcomeKind } from "@/lib/solver/outcome";
import { formatQuantity } from "@/lib/units/quantity";

/** Why a point has no value, for people. */
const WHY: Readonly<Record<Exclude<OutcomeKind, "converged">, string>> = {
  "did not settle": "Step after step the solution kept moving and came to no rest.",
  "came to a stand": "The steps stopped moving before the currents balanced.",
  undetermined: "The equations have no single solution here: some current or voltage is left undetermined.",
  "out of bounds": "A voltage or current grew too large to be calculated with.",
};

/** "solved", "did not settle", …; "not solved yet" for a point that is still to come. */
export function outcomeInWords(outcome: OutcomeKind | null): string {
  return outcome === null ? "not solved yet" : outcome === "converged" ? "solved" : outcome;
}

/** One sentence why a point has no value, with what would not settle; null for a point that is solved. */
export function reasonOf(outcome: OutcomeKind, unsettled: readonly string[]): string | null {
  if (outcome === "converged") return null;
  const why = WHY[outcome];
  return unsettled.length === 0 ? why : `${why} Farthest from settled: ${unsettled.join(", ")}.`;
}

/** "1 965, source ramp": the linear systems solved for a point and the rung at which it was left. */
export function effortInWords(iterations: number, rung: string | null): string {
  const count = formatQuantity(iterations, "1", Math.max(1, String(iterations).length));
  return rung === null ? count : `${count}, ${rung.replace("newton", "Newton")}`;
}
