import { count } from "@/lib/language/limits";
import type { Claim } from "./claim-shard";

/** Why a run failed as a whole, for people. */

type Points = Pick<Claim, "from" | "to">;

/** "point 1" or "points 257 to 512", as people count them. */
function range({ from, to }: Points): string {
  return to - from === 1 ? `point ${count(to)}` : `points ${count(from + 1)} to ${count(to)}`;
}

export function outOfTime(points: Points, seconds: number): string {
  return `Solving ${range(points)} took longer than the limit of ${count(seconds)} s. Make the circuit smaller and queue it again.`;
}

export function outOfMemory(points: Points, memory: number): string {
  return `Solving ${range(points)} took more memory than the limit of ${count(memory)} MiB. Make the circuit smaller and queue it again.`;
}

export function brokenOff(points: Points, attempts: number): string {
  return `The solver broke off ${attempts} times at ${range(points)}. This is a fault of the service, not of the netlist: report it to whoever runs it.`;
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
