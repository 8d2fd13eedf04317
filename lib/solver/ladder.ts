import type { System } from "@/lib/circuit/system";
import { largestResidual } from "./acceptance";
import { LinearSolver } from "./linear";
import { type Attempt, type Bench, newton } from "./newton";
import { type Outcome, RUNGS, type Rung } from "./outcome";
import { ramp } from "./ramp";
import { unsettled } from "./unsettled";

const WARM_STEPS = 12;
const COLD_STEPS = 60;

/** Solves a system point by point, each by the first rung of the ladder that leads to an accepted solution. */
export class Ladder {
  private readonly bench: Bench;

  /** The pivots are chosen on a cold start at the point to which `system` is turned. */
  constructor(private readonly system: System) {
    const { pattern, state, circuit } = system;
    system.startCold();
    system.assemble();
    const shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
    };
    const linear = new LinearSolver(shape, state.jacobian);
    this.bench = { system, linear, step: new Float64Array(circuit.size) };
  }

  /** Forgets what was solved before, so that the next point does not depend on it. */
  reset(): void {
    this.bench.linear.reset();
  }

  /** Solves the point to which the system is turned; with `isWarm` from the present unknowns first. */
  solve(isWarm: boolean): Outcome {
    const { bench, system } = this;
    const { circuit, state } = system;
    let iterations = 0;
    let last: { kind: Attempt["kind"]; rung: Rung } = { kind: "iteration limit", rung: "newton" };
    for (const rung of RUNGS) {
      if (rung === "warm start" && !isWarm) continue;
      state.share = 1;
      const attempt = this.attempt(rung);
      iterations += attempt.iterations;
      last = { kind: attempt.kind, rung };
      if (attempt.kind === "converged") break;
    }
    const { kind, rung } = last;
    const residual = largestResidual(circuit, state);
    if (kind === "converged") return { kind, iterations, residual, rung };
    return { kind, iterations, residual, rung, unsettled: unsettled(bench) };
  }

  private attempt(rung: Rung): Attempt {
    switch (rung) {
      case "warm start":
        this.system.settle();
        return newton(this.bench, true, WARM_STEPS);
      case "newton":
        this.system.startCold();
        return newton(this.bench, false, COLD_STEPS);
      case "source ramp":
        return ramp(this.bench);
    }
  }
}
