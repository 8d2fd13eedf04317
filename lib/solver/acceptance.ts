import type { Circuit } from "@/lib/circuit/circuit";
import type { State } from "@/lib/circuit/state";

/** Part of the currents at a net that may be left over; no coarser floor, since these circuits work down to picoamperes. */
const RESIDUAL = 1e-10;
/** A of a net, V of a branch law. */
const RESIDUAL_FLOOR = 1e-18;
const STEP = 1e-9;
/** V. */
const STEP_FLOOR = 1e-9;
/** Newton's error after a step of d is d²/(2·n·V_T): after 2e-10 V, less than 1e-18 V. */
const LAST_STEP = 2e-10;

/**
 * The acceptance test. `state` must be assembled with every junction linearised at its actual voltage; `step` is the undamped
 * Newton step from it. All must hold: at every net |F_i| ≤ 1e-10·Σ|branch currents| + 1e-18 A, likewise each branch law in V; every
 * voltage's step ≤ 1e-9 V + 1e-9·|x_j|; every branch current's step ≤ 1e-9 of it and of the currents at its nets. A small step
 * alone is never enough. Anything not finite is refused.
 */
export function isAccepted(
  { unknowns, branchNets, size }: Circuit,
  state: State,
  step: Float64Array,
): boolean {
  if (!balances(size, state)) return false;
  const { x, scale } = state;
  const nets = unknowns.length - branchNets.length;
  for (let j = 0; j < nets; j++) {
    if (!(Math.abs(step[j]!) <= STEP_FLOOR + STEP * Math.abs(x[j]!))) return false;
  }
  for (let j = nets; j < size; j++) {
    const [from, to] = branchNets[j - nets]!;
    const currents = Math.abs(x[j]!) + (from < size ? scale[from]! : 0) + (to < size ? scale[to]! : 0);
    if (!(Math.abs(step[j]!) <= STEP * currents + RESIDUAL_FLOOR)) return false;
  }
  return true;
}

/** The part of the test that does not look at a step: what is left over at every net and branch law. */
export function balances(size: number, { residual, scale }: State): boolean {
  for (let i = 0; i < size; i++) {
    if (!(Math.abs(residual[i]!) <= RESIDUAL * scale[i]! + RESIDUAL_FLOOR)) return false;
  }
  return true;
}

/** Whether an accepted step is so short that what it leaves is below the rounding of the unknowns. */
export function isLast({ unknowns, branchNets }: Circuit, { x }: State, step: Float64Array): boolean {
  for (let j = unknowns.length - branchNets.length - 1; j >= 0; j--) {
    if (!(Math.abs(step[j]!) <= LAST_STEP * (1 + Math.abs(x[j]!)))) return false;
  }
  return true;
}

/** The largest |F_i| over the nets, A. */
export function largestResidual({ unknowns, branchNets }: Circuit, { residual }: State): number {
  let largest = 0;
  for (let i = unknowns.length - branchNets.length - 1; i >= 0; i--) {
    const size = Math.abs(residual[i]!);
    if (!(size <= largest)) largest = size;
  }
  return largest;
}
