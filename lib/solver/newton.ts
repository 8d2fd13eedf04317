import { advance, type State } from "@/lib/circuit/state";
import type { System } from "@/lib/circuit/system";
import { balances, isAccepted, isLast } from "./acceptance";
import type { Linear } from "./linear";
import type { OutcomeKind } from "./outcome";

/** Steps that follow acceptance at most, with the Jacobian at hand, so that closed forms agree to the last digits. */
const POLISHING = 3;

/** V, A. While steps are limited, unknowns beyond this are dropped: their rounding would hide what the junctions have reached. */
const WILD = 1e4;

/** What one run of Newton's method came to; `iterations` counts every linear system solved, polishing included. */
export interface Attempt {
  readonly kind: OutcomeKind;
  readonly iterations: number;
  /** Its last matrix was singular, whatever the outcome is called. */
  readonly wasSingular: boolean;
}

/** A system with its linear solver and the array its steps are written to. */
export interface Bench {
  readonly system: System;
  readonly linear: Linear;
  readonly step: Float64Array;
  /**
   * Fills residual, scale and Jacobian at the present unknowns, with whatever aids are on. At rest every junction is first linearised
   * at its actual voltage.
   */
  readonly assemble: (isAtRest: boolean) => void;
  /** Assembles and solves for the step, where the two are one; false where the matrix is singular or not finite. */
  readonly solve?: (isAtRest: boolean) => boolean;
  /** Adds the step to the unknowns, where that has a way of its own. */
  readonly advance?: () => void;
}

/**
 * Newton's method from the present unknowns with the junction step, J·d = −F(x), x ← x + d, at the present share of the sources.
 * `exact` tells whether every junction is linearised at its actual voltage now. Ends with the unknowns accepted and polished, or
 * as they were when it failed. At most `most` iterations.
 */
export function newton(bench: Bench, exact: boolean, most: number): Attempt {
  const { system, step } = bench;
  const { state, circuit } = system;
  let isExact = exact;
  for (let iterations = 1; iterations <= most; iterations++) {
    if (!solved(bench, isExact)) {
      const areNumbers = state.residual.every(Number.isFinite) && state.jacobian.every(Number.isFinite);
      return { kind: areNumbers ? "undetermined" : "out of bounds", iterations, wasSingular: areNumbers };
    }
    if (isExact && isAccepted(circuit, state, step)) {
      const polished = polish(bench);
      if (polished >= 0) {
        return { kind: "converged", iterations: iterations + polished, wasSingular: false };
      }
    } else go(bench);
    isExact = system.follow();
    if (!isExact) tame(state);
  }
  return { kind: "did not settle", iterations: most, wasSingular: false };
}

function go({ advance: ownAdvance, system, step }: Bench): void {
  if (ownAdvance === undefined) advance(system.state, step);
  else ownAdvance();
}

function solved(bench: Bench, isAtRest: boolean): boolean {
  if (bench.solve !== undefined) return bench.solve(isAtRest);
  const { state } = bench.system;
  bench.assemble(isAtRest);
  return bench.linear.solve(state.jacobian, state.residual, bench.step);
}

/**
 * The linear model of a blocked junction asks for voltages of 1e13 V and more, and a step back from there has no digits left.
 * The solution of the next linear model depends on its junctions only, so it may as well be sought from 0.
 */
function tame({ x, low }: State): void {
  if (x.every((value) => Math.abs(value) <= WILD)) return;
  x.fill(0);
  low.fill(0);
}

/**
 * Takes the accepted step, and more with the Jacobian at hand until one is so short that it is the last. Leaves the system assembled at the
 * unknowns. The count of further steps weighed, or −1 where the unknowns then fail the test that they passed.
 */
export function polish(bench: Bench): number {
  const { system, linear, step, assemble } = bench;
  const { state, circuit } = system;
  for (let more = 0; ; more++) {
    const ends = more === POLISHING || isLast(circuit, state, step);
    go(bench);
    system.settleFurther();
    assemble(true);
    if (ends) return balances(circuit.size, state) ? more : -1;
    linear.solveAgain(state.residual, step);
  }
}
