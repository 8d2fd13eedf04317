import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Certificate } from "@/lib/solver/certificate";
import { Ladder } from "@/lib/solver/ladder";
import { LinearSolver } from "@/lib/solver/linear";
import type { Outcome } from "@/lib/solver/outcome";
import { distance } from "./answers";
import { textOf } from "./circuit";
import type { RandomSet } from "./sets";

/** How the engine did on one random circuit from a cold start. */
export interface Score {
  readonly seed: number;
  readonly outcome: Outcome;
  /** V: the farthest that a net voltage stands from the 50-digit answer. */
  readonly error: number;
  /** V, NaN where not proved. */
  readonly bound: number;
}

export function scoreOf({ circuitOf }: RandomSet, seed: number, answers: readonly bigint[]): Score {
  const circuit = circuitOf(seed);
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

/** A planted wrong answer: one net 1 nV off its solution. What is still proved of it (V, NaN for nothing), and how far it is off. */
export function plantedAt(
  { circuitOf }: RandomSet,
  seed: number,
  answers: readonly bigint[],
  k: number,
): { bound: number; error: number } {
  const circuit = circuitOf(seed);
  const { job } = compile(textOf(circuit));
  const system = new System(job!.design, job!.circuit);
  new Ladder(system, false).solve(false);
  const { state } = system;
  const numbers = circuit.nets.map((net) => system.circuit.nets.get(net)!);
  state.x[numbers[k % numbers.length]!]! += 1e-9;
  state.low.fill(0);
  system.settle();
  system.assemble();
  const linear = new LinearSolver(system.pattern, state.jacobian);
  const step = new Float64Array(job!.circuit.size);
  linear.solve(state.jacobian, state.residual, step);
  const bound = new Certificate(system, linear).prove();
  const error = Math.max(...numbers.map((number, i) => distance(state.x[number]!, answers[i]!)));
  return { bound, error };
}
