import type { System } from "@/lib/circuit/system";
import { largestResidual } from "./acceptance";
import { Aided } from "./aided";
import { Certificate } from "./certificate";
import { damped } from "./damped";
import { freeUnknowns } from "./dense";
import type { SparseShape } from "./elimination";
import { homotopy } from "./homotopy";
import { IndexWatch } from "./index-watch";
import { lineSearch } from "./line-search";
import { LinearSolver } from "./linear";
import { type Attempt, type Bench, newton } from "./newton";
import { type Outcome, RUNGS, type Rung } from "./outcome";
import { pseudoTransient } from "./pseudo-transient";
import { ramp } from "./ramp";
import { shuntRamp } from "./shunt-ramp";
import { Stepper } from "./stepper";
import { unsettled } from "./unsettled";

const WARM_STEPS = 12;
const COLD_STEPS = 50;
const SEARCH_STEPS = 60;
/** Singular points of a strand whose matrix is decomposed; each may cost as much as a hundred points. */
const MOST_DIAGNOSES = 16;

/** Rungs that cost a thousand steps; after so many failed points in a row the next is not tried on them. */
const DEAR: ReadonlySet<Rung> = new Set(["pseudo-transient", "shunt ramp", "homotopy"]);
const MOST_DEAR = 3;
/** A point that fails on every rung is reported as this one left it: at the largest part of the sources that it could bear. */
const REPORTED: Rung = "source ramp";

type Failed = Omit<Exclude<Outcome, { kind: "converged" }>, "iterations">;

/** Solves a system point by point, each by the first rung of the ladder that leads to an accepted solution. */
export class Ladder {
  private bench: Bench;
  private readonly linear: LinearSolver;
  private readonly stepper: Stepper;
  private readonly shape: SparseShape;
  private readonly certificate: Certificate;
  private readonly reported: Rung | undefined;
  private readonly watch: IndexWatch | null;
  /** Points that failed since one was solved. */
  private failures = 0;
  /** Where Newton's method gave up from a cold start: most of a circuit may stand right there, and only a part go to and fro. */
  private readonly left: { readonly x: Float64Array; readonly low: Float64Array };
  /** Diagnoses that the present strand may still have. */
  private diagnoses = MOST_DIAGNOSES;

  /**
   * The pivots are chosen on a cold start at the point to which `system` is turned. Without `isProving` no bound is sought, nor the
   * index. Some rungs may be left out.
   */
  constructor(
    private readonly system: System,
    private readonly isProving = true,
    private readonly rungs: readonly Rung[] = RUNGS,
  ) {
    const { pattern, state, circuit } = system;
    system.startCold();
    system.assemble();
    this.shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
      units: pattern.units,
    };
    this.linear = new LinearSolver(this.shape, state.jacobian);
    this.stepper = new Stepper(system, this.linear, this.shape);
    this.bench = {
      system,
      linear: this.linear,
      step: this.stepper.step,
      assemble: (isAtRest) => (isAtRest ? system.assembleAtRest() : system.assemble()),
      solve: (isAtRest) => this.stepper.solve(isAtRest),
      advance: () => this.stepper.advance(),
    };
    this.certificate = new Certificate(system, this.linear);
    this.reported = rungs.includes(REPORTED) ? REPORTED : rungs.at(-1);
    this.left = { x: new Float64Array(state.x.length), low: new Float64Array(state.x.length) };
    this.watch = isProving ? new IndexWatch(system, this.linear) : null;
  }

  /** Forgets what was solved before, so that the next point does not depend on it. */
  reset(): void {
    this.linear.reset();
    this.certificate.reset();
    this.watch?.reset();
    this.diagnoses = MOST_DIAGNOSES;
    this.failures = 0;
  }

  /** Solves the point to which the system is turned; with `isWarm` from the present unknowns first. */
  solve(isWarm: boolean): Outcome {
    this.stepper.prepare();
    if (this.bench.step !== this.stepper.step) this.bench = { ...this.bench, step: this.stepper.step };
    const { bench, system } = this;
    const { circuit, state } = system;
    let iterations = 0;
    let failed: Failed | null = null;
    for (const rung of this.rungs) {
      if (rung === "warm start" && !isWarm) continue;
      if (DEAR.has(rung) && this.failures >= MOST_DEAR) continue;
      state.share = 1;
      const { kind, wasSingular, ...spent } = this.attempt(rung);
      iterations += spent.iterations;
      if (kind === "converged") {
        this.failures = 0;
        const bound = this.isProving ? this.certificate.prove() : Number.NaN;
        const isUnstable = this.watch?.isOdd() ?? false;
        return { kind, iterations, residual: largestResidual(circuit, state), bound, rung, isUnstable };
      }
      if (rung !== this.reported) continue;
      const free = wasSingular && this.diagnoses-- > 0 ? freeUnknowns(this.shape, state.jacobian) : [];
      failed = { kind, rung, residual: largestResidual(circuit, state), unsettled: unsettled(bench, free) };
    }
    this.failures += 1;
    return { ...failed!, iterations };
  }

  /** Searches from where Newton's method gave up, and from rest where that leads nowhere. */
  private searched(by: (bench: Bench, most: number) => Attempt): Attempt {
    const { bench, left } = this;
    const { x, low } = this.system.state;
    x.set(left.x);
    low.set(left.low);
    const first = x.every((value) => value === 0) ? null : by(bench, SEARCH_STEPS);
    if (first?.kind === "converged") return first;
    x.fill(0);
    low.fill(0);
    const second = by(bench, SEARCH_STEPS);
    return { ...second, iterations: (first?.iterations ?? 0) + second.iterations };
  }

  private newton(): Attempt {
    const { system, left } = this;
    system.startCold();
    const attempt = newton(this.bench, false, COLD_STEPS);
    const { x, low } = system.state;
    const isNumber = x.every(Number.isFinite);
    for (let j = 0; j < x.length; j++) {
      left.x[j] = isNumber ? x[j]! : 0;
      left.low[j] = isNumber ? low[j]! : 0;
    }
    return attempt;
  }

  private attempt(rung: Rung): Attempt {
    switch (rung) {
      case "warm start":
        this.system.settle();
        return newton(this.bench, true, WARM_STEPS);
      case "newton":
        return this.newton();
      case "line search":
        return this.searched(lineSearch);
      case "damped newton":
        return this.searched(damped);
      case "pseudo-transient":
        return pseudoTransient(this.bench, new Aided(this.system));
      case "source ramp":
        return ramp(this.bench);
      case "shunt ramp":
        return shuntRamp(this.bench, new Aided(this.system));
      case "homotopy":
        return homotopy(this.bench, new Aided(this.system));
    }
  }
}
