import { advance } from "@/lib/circuit/state";
import type { Bench } from "./newton";

/** V: the distance at which a solution that is known begins to push away. */
const REACH = 0.3;
/** V: a step moves no net farther. */
const FARTHEST = 0.25;
const MOST_STEPS = 120;
/** V: Newton's own step that is shorter has arrived somewhere. */
const ARRIVED = 1e-5;

/**
 * Newton's method from the present unknowns on F(x)·Π(1/ρ_k + 1), ρ_k the squared distance from the k-th known solution in units of 0.3 V:
 * deflation (Farrell, Birkisson and Funke, SIAM J. Sci. Comput. 37, 2015). The factor only stretches or turns round Newton's step,
 * d → d/(1 − ∇ln(factor)·d). True where a zero of F is near; `spent` counts the steps.
 */
export function deflated(
  bench: Bench,
  known: readonly Float64Array[],
  spent: { iterations: number },
): boolean {
  const { system, linear, step } = bench;
  const { state, circuit } = system;
  const isVoltage = circuit.unknowns.map(({ unit }) => unit === "V");
  for (let n = 0; n < MOST_STEPS; n++) {
    spent.iterations += 1;
    system.settle();
    system.assemble();
    if (!linear.solve(state.jacobian, state.residual, step)) return false;
    let turn = 1;
    for (const solution of known) {
      let distance = 0;
      let along = 0;
      for (let j = 0; j < isVoltage.length; j++) {
        if (!isVoltage[j]) continue;
        const apart = (state.x[j]! - solution[j]!) / REACH;
        distance += apart * apart;
        along += (apart * step[j]!) / REACH;
      }
      if (distance === 0) return false;
      turn += (2 * along) / (distance * (1 + distance));
    }
    let farthest = 0;
    for (let j = 0; j < isVoltage.length; j++) {
      if (isVoltage[j] && !(Math.abs(step[j]!) <= farthest)) farthest = Math.abs(step[j]!);
    }
    if (!(farthest < Number.POSITIVE_INFINITY)) return false;
    if (farthest < ARRIVED) return true;
    const stretch = 1 / turn;
    const part = Math.sign(stretch) * Math.min(Math.abs(stretch), FARTHEST / farthest);
    for (let j = 0; j < step.length; j++) step[j]! *= part;
    advance(state, step);
  }
  return false;
}
