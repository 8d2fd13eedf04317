import { advance } from "@/lib/circuit/state";
import type { Aided } from "./aided";
import { type Attempt, type Bench, newton } from "./newton";

/** S per net: capacitance over the first step of time. */
const FIRST = 1;
const LAST = 1e-14;
const MOST = 1e9;
/** Steps over which the sources rise. */
const RISE = 32;
const MOST_STEPS = 400;
const FINAL_STEPS = 25;
/** V: a step that moves a net farther is taken again with a quarter of the time; one that moves all much less is followed by a longer. */
const FAR = 0.5;
const NEAR = 0.05;
const SHORTER = 4;

/**
 * Pseudo-transient continuation (Kelley and Keyes, SIAM J. Numer. Anal. 35, 1998): from rest, capacitors at all nets charge, one Newton step
 * an implicit step of time. The sources rise over the first steps, since the nets that they hold do not wait; then time steps grow as
 * the circuit settles, and at last the capacitors go.
 */
export function pseudoTransient(bench: Bench, aided: Aided): Attempt {
  const { system, step } = bench;
  const { state, circuit } = system;
  const nets = circuit.unknowns.length - circuit.branchNets.length;
  state.x.fill(0);
  state.low.fill(0);
  let conductance = FIRST;
  for (let iterations = 1; iterations <= MOST_STEPS; iterations++) {
    aided.conductance = conductance;
    state.share = Math.min(1, iterations / RISE);
    for (let j = 0; j < nets; j++) aided.origin[j] = state.x[j]! + state.low[j]!;
    system.settle();
    aided.assemble();
    if (!aided.solve(state.jacobian, state.residual, step)) {
      const isNumber = state.residual.every(Number.isFinite);
      return { kind: isNumber ? "undetermined" : "out of bounds", iterations, wasSingular: isNumber };
    }
    let farthest = 0;
    for (let j = 0; j < nets; j++) farthest = Math.max(farthest, Math.abs(step[j]!));
    if (state.share < 1) {
      advance(state, step);
      continue;
    }
    if (farthest > FAR && conductance < MOST) {
      conductance *= SHORTER;
      continue;
    }
    advance(state, step);
    conductance /= farthest < NEAR ? SHORTER : Math.SQRT2;
    if (conductance > LAST) continue;
    system.settle();
    const last = newton(bench, true, FINAL_STEPS);
    return { ...last, iterations: iterations + last.iterations };
  }
  return { kind: "did not settle", iterations: MOST_STEPS, wasSingular: false };
}
