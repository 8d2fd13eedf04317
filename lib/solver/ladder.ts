import type { System } from "@/lib/circuit/system";
import { largestResidual } from "./acceptance";
import { LinearSolver } from "./linear";
import { type Attempt, type Bench, newton } from "./newton";
import type { Outcome, Rung } from "./outcome";
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
    let iterations = 0;
    let rung: Rung = "warm start";
    let attempt: Attempt | null = null;
    const rungs: [Rung, () => Attempt][] = [
      ["newton", () => this.fromCold()],
      ["source ramp", () => ramp(bench)],
    ];
    if (isWarm) rungs.unshift(["warm start", () => this.fromPresent()]);
    for (const [name, run] of rungs) {
      system.state.share = 1;
      attempt = run();
      iterations += attempt.iterations;
      rung = name;
      if (attempt.kind === "converged") break;
    }
    const residual = largestResidual(system.circuit, system.state);
    const { kind } = attempt!;
    if (kind === "converged") return { kind, iterations, residual, rung };
    return { kind, iterations, residual, rung, unsettled: unsettled(bench) };
  }

  private fromPresent(): Attempt {
    this.system.settle();
    return newton(this.bench, true, WARM_STEPS);
  }

  private fromCold(): Attempt {
    this.system.startCold();
    return newton(this.bench, false, COLD_STEPS);
  }
}
