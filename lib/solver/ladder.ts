import type { System } from "@/lib/circuit/system";
import { largestResidual } from "./acceptance";
import { Certificate } from "./certificate";
import { freeUnknowns } from "./dense";
import type { SparseShape } from "./elimination";
import { LinearSolver } from "./linear";
import { type Attempt, type Bench, newton } from "./newton";
import { type Outcome, RUNGS, type Rung } from "./outcome";
import { ramp } from "./ramp";
import { unsettled } from "./unsettled";

const WARM_STEPS = 12;
const COLD_STEPS = 100;
/** Singular points of a strand whose matrix is decomposed; each may cost as much as a hundred points. */
const MOST_DIAGNOSES = 16;

/** Solves a system point by point, each by the first rung of the ladder that leads to an accepted solution. */
export class Ladder {
  private readonly bench: Bench;
  private readonly linear: LinearSolver;
  private readonly shape: SparseShape;
  private readonly certificate: Certificate;
  /** Diagnoses that the present strand may still have. */
  private diagnoses = MOST_DIAGNOSES;

  /** The pivots are chosen on a cold start at the point to which `system` is turned. Without `isProving` no bound is sought. */
  constructor(
    private readonly system: System,
    private readonly isProving = true,
  ) {
    const { pattern, state, circuit } = system;
    system.startCold();
    system.assemble();
    this.shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
    };
    this.linear = new LinearSolver(this.shape, state.jacobian);
    this.bench = { system, linear: this.linear, step: new Float64Array(circuit.size) };
    this.certificate = new Certificate(system, this.linear);
  }

  /** Forgets what was solved before, so that the next point does not depend on it. */
  reset(): void {
    this.linear.reset();
    this.certificate.reset();
    this.diagnoses = MOST_DIAGNOSES;
  }

  /** Solves the point to which the system is turned; with `isWarm` from the present unknowns first. */
  solve(isWarm: boolean): Outcome {
    const { bench, system } = this;
    const { circuit, state } = system;
    let iterations = 0;
    let last: Attempt = { kind: "iteration limit", iterations: 0, wasSingular: false };
    let rung: Rung = "newton";
    for (rung of RUNGS) {
      if (rung === "warm start" && !isWarm) continue;
      state.share = 1;
      last = this.attempt(rung);
      iterations += last.iterations;
      if (last.kind === "converged") break;
    }
    const { kind, wasSingular } = last;
    const residual = largestResidual(circuit, state);
    if (kind === "converged") {
      const bound = this.isProving ? this.certificate.prove() : Number.NaN;
      return { kind, iterations, residual, bound, rung };
    }
    const free = wasSingular && this.diagnoses-- > 0 ? freeUnknowns(this.shape, state.jacobian) : [];
    return { kind, iterations, residual, rung, unsettled: unsettled(bench, free) };
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
