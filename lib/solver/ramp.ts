import type { Attempt, Bench } from "./newton";
import { newton } from "./newton";

const FIRST_RISE = 1 / 16;
const LEAST_RISE = 1e-5;
const GROWTH = 2;
const RETREAT = 4;
const NEWTON_STEPS = 25;
/** Newton steps over the whole ramp. */
const MOST_STEPS = 400;

/**
 * Raises all sources together from nothing, where every unknown is 0, to their whole value, each stage starting from the one
 * before it; the rise doubles after a stage that converged and shrinks after one that failed. Ends with the sources whole.
 */
export function ramp(bench: Bench): Attempt {
  const { system } = bench;
  const { state } = system;
  const x = new Float64Array(state.x.length);
  const low = new Float64Array(state.x.length);
  state.x.fill(0);
  state.low.fill(0);
  let reached = 0;
  let rise = FIRST_RISE;
  let iterations = 0;
  while (reached < 1) {
    state.share = Math.min(1, reached + rise);
    system.settle();
    const attempt = newton(bench, true, NEWTON_STEPS);
    iterations += attempt.iterations;
    if (attempt.kind === "converged") {
      reached = state.share;
      rise *= GROWTH;
      x.set(state.x);
      low.set(state.low);
      continue;
    }
    // What fails at rest, where no source acts yet, fails at any rise.
    if (reached === 0 && attempt.iterations === 1) return { ...attempt, iterations };
    rise /= RETREAT;
    if (rise < LEAST_RISE || iterations > MOST_STEPS) {
      const kind = rise < LEAST_RISE ? "came to a stand" : "did not settle";
      return { kind, iterations, wasSingular: attempt.wasSingular };
    }
    state.x.set(x);
    state.low.set(low);
  }
  return { kind: "converged", iterations, wasSingular: false };
}
