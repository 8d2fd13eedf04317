import { outcomeInWords } from "@/lib/analyses/reasons";
import type { Failure } from "@/lib/analyses/result";
import type { OutcomeKind } from "@/lib/solver/outcome";
import type { CurveSource } from "./curve-source";

const known = new WeakMap<readonly Failure[], ReadonlyMap<number, Failure>>();

/** Nets and elements named in a reason; where there are more their number says so. */
const NAMED = 4;

/** Why there is no value at a point, in words: "not solved", "failed: came to a stand; out, S.A would not settle". */
export function whyMissing(source: CurveSource, point: number): string {
  const outcome = source.points.outcome[point] ?? null;
  if (outcome === null) return "not solved";
  if (outcome === "converged") return "no value";
  return `failed: ${reasonOf(source, point, outcome)}`;
}

/** The reason of a failed point, without the word. */
export function reasonOf(
  { failures }: Pick<CurveSource, "failures">,
  point: number,
  outcome: OutcomeKind,
): string {
  const unsettled = failures === undefined ? [] : (indexed(failures).get(point)?.unsettled ?? []);
  const words = outcomeInWords(outcome);
  if (unsettled.length === 0) return words;
  const more = unsettled.length > NAMED ? ` and ${unsettled.length - NAMED} more` : "";
  return `${words}; ${unsettled.slice(0, NAMED).join(", ")}${more} would not settle`;
}

function indexed(failures: readonly Failure[]): ReadonlyMap<number, Failure> {
  let map = known.get(failures);
  if (map === undefined) {
    map = new Map(failures.map((failure) => [failure.point, failure]));
    known.set(failures, map);
  }
  return map;
}
