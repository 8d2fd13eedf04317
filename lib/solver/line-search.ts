import type { State } from "@/lib/circuit/state";
import { advance } from "@/lib/circuit/state";
import type { System } from "@/lib/circuit/system";
import { isAccepted } from "./acceptance";
import { type Attempt, type Bench, polish } from "./newton";

/** Part of the linear model's decrease that is asked for (Armijo, Pacific J. Math. 16, 1966). */
const ASKED = 1e-4;
const LEAST = 1e-9;
/** A shortened step is at least this part of the one before. */
const CLAMP = 0.1;

/**
 * Newton's method on the laws themselves from the present unknowns, every step shortened until the sum of squares of the residual,
 * each row in units of what it sums and what the step changes in it, falls as Armijo's rule asks. At most `most` iterations.
 */
export function lineSearch(bench: Bench, most: number): Attempt {
  const { system, linear, step } = bench;
  const { state, circuit } = system;
  const x = new Float64Array(state.x.length);
  const low = new Float64Array(state.x.length);
  const weights = new Float64Array(circuit.size);
  system.settle();
  system.assemble();
  for (let iterations = 1; iterations <= most; iterations++) {
    if (!linear.solve(state.jacobian, state.residual, step)) {
      const isNumber = state.residual.every(Number.isFinite);
      return { kind: isNumber ? "undetermined" : "out of bounds", iterations, wasSingular: isNumber };
    }
    if (isAccepted(circuit, state, step)) {
      const polished = polish(bench);
      if (polished >= 0) return { kind: "converged", iterations: iterations + polished, wasSingular: false };
    }
    weigh(system, step, weights);
    const before = merit(state, weights);
    x.set(state.x);
    low.set(state.low);
    let part = 1;
    for (;;) {
      advance(state, step);
      system.settle();
      system.assemble();
      const after = merit(state, weights);
      if (after <= (1 - 2 * ASKED * part) * before) break;
      state.x.set(x);
      state.low.set(low);
      // The parabola through both merits and the slope −2·before at the beginning.
      const shrink = Number.isFinite(after) ? before / (after + before) : 0;
      const next = part * Math.min(0.5, Math.max(CLAMP, shrink));
      if (next < LEAST) return { kind: "came to a stand", iterations, wasSingular: false };
      for (let j = 0; j < step.length; j++) step[j]! *= next / part;
      part = next;
    }
  }
  return { kind: "did not settle", iterations: most, wasSingular: false };
}

/** What each row sums, and what the whole step would change in it; a row that does neither weighs nothing. */
function weigh({ state, pattern }: System, step: Float64Array, weights: Float64Array): void {
  const { rows, columns } = pattern;
  for (let i = 0; i < weights.length; i++) weights[i] = state.scale[i]!;
  for (let k = 1; k < rows.length; k++) {
    weights[rows[k]!]! += Math.abs(state.jacobian[k]! * step[columns[k]!]!);
  }
  for (let i = 0; i < weights.length; i++) weights[i] = weights[i] === 0 ? 0 : 1 / weights[i]!;
}

/** Σ (weight_i·F_i)². */
function merit({ residual }: State, weights: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < weights.length; i++) sum += (weights[i]! * residual[i]!) ** 2;
  return sum;
}
