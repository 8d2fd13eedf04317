import type { Failure, ShardResult } from "@/lib/analyses/result";
import type { PointRange } from "@/lib/analyses/strands";
import { OUTCOMES } from "@/lib/solver/outcome";
import { type Chunk, cut } from "./codec";

/** The columns beside the traces and unknowns, one value a point. */
export const ACCOUNT_COLUMNS = ["outcome", "iterations", "residual", "bound", "rung"] as const;

/** The name under which trace `i` of the plan is stored, and unknown `i`. */
export const traceColumn = (i: number) => `trace/${i}`;
export const unknownColumn = (i: number) => `unknown/${i}`;

/** The result of one shard, cut and encoded for the tables. */
export interface StoredShard {
  readonly columns: readonly { readonly column: string; readonly chunks: readonly Chunk[] }[];
  readonly pointsFailed: number;
  readonly failures: readonly Failure[];
  /** Flat points that are solved and not stable. */
  readonly unstable: readonly PointRange[];
}

/** Cuts every column of `result` into chunks of at most 4096 points. */
export function storedForm(result: ShardResult): StoredShard {
  const named: [string, Float64Array][] = [
    ...result.traces.map((values, i): [string, Float64Array] => [traceColumn(i), values]),
    ...result.unknowns.map((values, i): [string, Float64Array] => [unknownColumn(i), values]),
    ...ACCOUNT_COLUMNS.map((column): [string, Float64Array] => [column, result[column]]),
  ];
  const converged = OUTCOMES.indexOf("converged");
  return {
    columns: named.map(([column, values]) => ({ column, chunks: cut(values) })),
    pointsFailed: result.outcome.reduce((sum, outcome) => (outcome === converged ? sum : sum + 1), 0),
    failures: result.failures,
    unstable: result.unstable,
  };
}
