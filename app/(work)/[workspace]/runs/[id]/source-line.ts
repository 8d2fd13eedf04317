import type { RunState } from "./run-shapes";

/** Where a figure comes from, to stand below it. */
export function sourceLine({
  netlistNumber,
  revision,
  hash,
  number,
  engineVersion,
}: Pick<RunState, "netlistNumber" | "revision" | "hash" | "number" | "engineVersion">): string {
  return `Netlist ${netlistNumber}, revision ${revision} (${hash.slice(0, 12)}), run ${number}; Sweepwright, engine ${engineVersion}`;
}
