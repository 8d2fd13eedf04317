import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Ladder } from "@/lib/solver/ladder";
import type { Outcome } from "@/lib/solver/outcome";
import { distance } from "./answers";
import { textOf } from "./circuit";
import { randomCircuit } from "./generate";

/** How the engine did on one random circuit from a cold start. */
export interface Score {
  readonly seed: number;
  readonly outcome: Outcome;
  /** V: the farthest that a net voltage stands from the 50-digit answer. */
  readonly error: number;
  /** V, NaN where not proved. */
  readonly bound: number;
}

export function scoreOf(seed: number, answers: readonly bigint[]): Score {
  const circuit = randomCircuit(seed);
  const { job, diagnostics } = compile(textOf(circuit));
  if (job === null)
    throw new Error(`Circuit ${seed}: ${diagnostics.map(({ message }) => message).join(" ")}`);
  const system = new System(job.design, job.circuit);
  const outcome = new Ladder(system).solve(false);
  const bound = outcome.kind === "converged" ? outcome.bound : Number.NaN;
  const errors = circuit.nets.map((net, k) =>
    distance(system.state.x[system.circuit.nets.get(net)!]!, answers[k]!),
  );
  return { seed, outcome, error: Math.max(...errors), bound };
}

/** The value below which a part of the values lies, 0.5 for the median. */
export function quantile(values: readonly number[], part: number): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(part * sorted.length))]!;
}
