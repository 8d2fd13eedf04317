import type { Circuit } from "@/lib/circuit/circuit";
import { advance } from "@/lib/circuit/state";
import { isAccepted } from "./acceptance";
import { type Attempt, type Bench, polish } from "./newton";

const FIRST = 0.01;
const LEAST = 1e-8;
/** A reduction of the damping factor keeps at least this part of it. */
const CLAMP = 0.1;
/** V: voltages below it are judged in absolute terms. */
const UNIT_VOLTAGE = 0.1;

/**
 * Newton's method with affine-covariant damping (Deuflhard, Newton Methods for Nonlinear Problems, 2004, algorithm NLEQ-ERR, from
 * memory): a step part·d is kept where the next correction with the same Jacobian is shorter than d. Lengths are of voltages, so
 * that the test does not see how rows are scaled. From the present unknowns, at most `most` iterations.
 */
export function damped(bench: Bench, most: number): Attempt {
  const { system, linear, step } = bench;
  const { state, circuit } = system;
  const x = new Float64Array(state.x.length);
  const low = new Float64Array(state.x.length);
  const taken = new Float64Array(circuit.size);
  const next = new Float64Array(circuit.size);
  let part = FIRST;
  for (let iterations = 1; iterations <= most; iterations++) {
    system.settle();
    system.assemble();
    if (!linear.solve(state.jacobian, state.residual, step)) {
      const isNumber = state.residual.every(Number.isFinite);
      return { kind: isNumber ? "undetermined" : "out of bounds", iterations, wasSingular: isNumber };
    }
    if (isAccepted(circuit, state, step)) {
      const polished = polish(bench);
      if (polished >= 0) return { kind: "converged", iterations: iterations + polished, wasSingular: false };
      continue;
    }
    x.set(state.x);
    low.set(state.low);
    const whole = length(circuit, x, step);
    for (;;) {
      for (let j = 0; j < taken.length; j++) taken[j] = part * step[j]!;
      advance(state, taken);
      system.settle();
      system.assemble();
      linear.solveAgain(state.residual, next);
      const contraction = length(circuit, x, next) / whole;
      // What the simplified correction is off from that of a linear system tells how far the Jacobian can be trusted.
      for (let j = 0; j < next.length; j++) next[j]! -= (1 - part) * step[j]!;
      const bend = length(circuit, x, next);
      const trusted = (0.5 * whole * part * part) / bend;
      if (contraction < 1) {
        part = Math.min(1, trusted > 0 ? Math.max(trusted, part) : 1);
        break;
      }
      state.x.set(x);
      state.low.set(low);
      part = Math.max(CLAMP * part, Math.min(0.5 * part, Number.isNaN(trusted) ? 0 : trusted));
      if (part < LEAST) return { kind: "came to a stand", iterations, wasSingular: false };
    }
  }
  return { kind: "did not settle", iterations: most, wasSingular: false };
}

/** The length of a step over the voltages, each in units of the voltage it starts from. */
function length({ unknowns }: Circuit, x: Float64Array, step: Float64Array): number {
  let sum = 0;
  for (let j = 0; j < unknowns.length; j++) {
    if (unknowns[j]!.unit === "V") sum += (step[j]! / (UNIT_VOLTAGE + Math.abs(x[j]!))) ** 2;
  }
  return Math.sqrt(sum);
}
