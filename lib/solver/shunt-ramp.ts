import type { Aided } from "./aided";
import { type Attempt, type Bench, newton } from "./newton";

/** S: above what a milliampere of junction current makes. */
const FIRST = 0.1;
/** S: below it the circuit is tried as it is. */
const LAST = 1e-13;
const FIRST_PART = 0.1;
const SMALLEST_FALL = 0.98;
const NEWTON_STEPS = 25;
const MOST_STEPS = 600;

/**
 * Ties every net to ground by a conductance so large that the circuit is nearly linear, and lowers it, each stage starting from the one
 * before it; a stage that fails is tried again with a smaller fall. Ends with the conductances taken away.
 */
export function shuntRamp(bench: Bench, aided: Aided): Attempt {
  aided.origin.fill(0);
  return tied(bench, aided);
}

/** The same with every net tied to the voltage that the aid's origin gives it. */
export function tied(bench: Bench, aided: Aided): Attempt {
  const { system } = bench;
  const { state } = system;
  const helped = aided.bench(bench.step);
  const x = new Float64Array(state.x.length);
  const low = new Float64Array(state.x.length);
  system.startCold();
  let reached = FIRST / FIRST_PART;
  let part = FIRST_PART;
  let iterations = 0;
  let isWarm = false;
  while (iterations <= MOST_STEPS) {
    const isLast = reached * part < LAST;
    aided.conductance = isLast ? 0 : reached * part;
    if (isWarm) system.settle();
    const attempt = newton(isLast ? bench : helped, isWarm, NEWTON_STEPS);
    iterations += attempt.iterations;
    if (attempt.kind === "converged") {
      if (isLast) return { ...attempt, iterations };
      reached = aided.conductance;
      part = Math.max(part * part, 0.01);
      x.set(state.x);
      low.set(state.low);
      isWarm = true;
      continue;
    }
    if (!isWarm) return { ...attempt, iterations };
    part = Math.sqrt(part);
    if (part > SMALLEST_FALL)
      return { kind: "came to a stand", iterations, wasSingular: attempt.wasSingular };
    state.x.set(x);
    state.low.set(low);
  }
  return { kind: "did not settle", iterations, wasSingular: false };
}
