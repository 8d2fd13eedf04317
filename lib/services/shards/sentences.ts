import { count } from "@/lib/language/limits";
import type { Claim } from "./claim-shard";

/** Why a run failed as a whole, for people. */

type Points = Pick<Claim, "from" | "to">;

/** "point 1" or "points 257 to 512", as people count them. */
function range({ from, to }: Points): string {
  return to - from === 1 ? `point ${count(to)}` : `points ${count(from + 1)} to ${count(to)}`;
}

export type GivenUp = "out of time" | "out of memory" | "broken";

/** Why a shard was given up, of points or of branches. */
export function givenUp(
  { kind, ...points }: Points & Pick<Claim, "kind">,
  why: GivenUp,
  {
    seconds,
    memory,
    attempts,
  }: { readonly seconds: number; readonly memory: number; readonly attempts: number },
): string {
  const work = kind === "points" ? `Solving ${range(points)}` : "Looking for the operating points";
  const mend =
    kind === "points"
      ? "Make the circuit smaller and queue it again."
      : "None is known here; sweep fewer points or make the circuit smaller.";
  switch (why) {
    case "out of time":
      return `${work} took longer than the limit of ${count(seconds)} s. ${mend}`;
    case "out of memory":
      return `${work} took more memory than the limit of ${count(memory)} MiB. ${mend}`;
    case "broken": {
      const what =
        kind === "points"
          ? `at ${range(points)}`
          : "looking for the operating points, so that none is known here";
      return `The solver broke off ${attempts} times ${what}. This is a fault of the service, not of the netlist: report it to whoever runs it.`;
    }
  }
}

export function engineChanged(): string {
  return "The service was updated with another engine while this run was under way, and a run is never mixed. Queue it again.";
}

export function judgementTooLong(seconds: number): string {
  return `All points are solved, but judging the requirements took longer than the limit of ${count(seconds)} s. Read fewer reductions or sweep fewer points.`;
}

export function judgementTooLarge(memory: number): string {
  return `All points are solved, but judging the requirements took more memory than the limit of ${count(memory)} MiB. Sweep fewer points.`;
}

export function judgementBroken(): string {
  return "All points are solved, but the requirements could not be judged. This is a fault of the service, not of the netlist: report it to whoever runs it.";
}
