import { LuDecomposition, Matrix } from "ml-matrix";
import type { Job } from "@/lib/analyses/compile";
import { advance } from "@/lib/circuit/state";
import { System } from "@/lib/circuit/system";
import type { SparseShape } from "@/lib/solver/elimination";
import { Ladder } from "@/lib/solver/ladder";
import { LinearSolver } from "@/lib/solver/linear";
import { Stepper } from "@/lib/solver/stepper";

/** Points from which a step is taken in turn, so that no branch is learnt by heart. */
const POINTS = 16;

/** V. What the points differ by; a junction's current then changes by a thousandth. */
const APART = 1e-5;

/** A circuit at rest, and points close by from which Newton steps are taken. */
export class Steps {
  readonly size: number;
  /** The points one after another. */
  readonly points: Float64Array;
  private readonly system: System;
  private readonly linear: LinearSolver;
  private readonly stepper: Stepper;
  private readonly shape: SparseShape;
  private readonly each: readonly Float64Array[];

  constructor(job: Job) {
    this.system = new System(job.design, job.circuit);
    const { system } = this;
    const outcome = new Ladder(system, false).solve(false);
    if (outcome.kind !== "converged") throw new Error(`${job.plan.title} does not solve: ${outcome.kind}.`);
    const { state, pattern, circuit } = system;
    this.size = circuit.size;
    this.shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
      units: pattern.units,
    };
    this.points = new Float64Array(POINTS * this.size);
    for (let k = 0; k < POINTS; k++) {
      for (let j = 0; j < this.size; j++) {
        const isVoltage = circuit.unknowns[j]!.unit === "V";
        this.points[k * this.size + j] =
          state.x[j]! + (isVoltage ? APART : APART / 1e3) * Math.sin(j + 7 * k + 1);
      }
    }
    this.each = Array.from({ length: POINTS }, (_, k) =>
      this.points.subarray(k * this.size, (k + 1) * this.size),
    );
    state.low.fill(0);
    system.settle();
    system.assemble();
    this.linear = new LinearSolver(this.shape, state.jacobian);
    this.stepper = new Stepper(system, this.linear, this.shape);
  }

  get step(): Float64Array {
    return this.stepper.step;
  }

  /** One whole Newton step from point k: assembly, factors, solution, new unknowns. */
  take(k: number): void {
    const { stepper } = this;
    stepper.prepare();
    this.goTo(k);
    stepper.solve(true);
    stepper.advance();
  }

  /** The same by loops over tables and the list of operations. */
  takeListed(k: number): void {
    const { state } = this.arrive(k);
    this.linear.solve(state.jacobian, state.residual, this.step);
    advance(state, this.step);
  }

  /** The same with a dense pivoted LU of the package ml-matrix, built afresh. */
  takeAfresh(k: number): void {
    const { state } = this.arrive(k);
    const { size, rows, columns } = this.shape;
    const matrix = Matrix.zeros(size, size);
    for (let place = 1; place < state.jacobian.length; place++) {
      matrix.set(rows[place]!, columns[place]!, state.jacobian[place]!);
    }
    const right = Matrix.zeros(size, 1);
    for (let i = 0; i < size; i++) right.set(i, 0, -state.residual[i]!);
    const solution = new LuDecomposition(matrix).solve(right);
    for (let i = 0; i < size; i++) this.step[i] = solution.get(i, 0);
    advance(state, this.step);
  }

  /** Assembly alone. */
  arrive(k: number): System {
    this.goTo(k);
    this.system.assembleAtRest();
    return this.system;
  }

  private goTo(k: number): void {
    this.system.state.x.set(this.each[k % POINTS]!);
  }
}

/** Least nanoseconds of one `work`, over batches. */
export function nanoseconds(work: (k: number) => void, steps: number, batches: number): number {
  let least = Number.POSITIVE_INFINITY;
  for (let batch = 0; batch < batches; batch++) {
    const begun = performance.now();
    for (let k = 0; k < steps; k++) work(k);
    least = Math.min(least, (performance.now() - begun) / steps);
  }
  return least * 1e6;
}

/** Bytes by which the heap grows in one `work`, once it is warm: the least of several runs, since a collection hides what was before. */
export function bytesPerStep(work: (k: number) => void, steps: number): number {
  let least = Number.POSITIVE_INFINITY;
  for (let run = 0; run < 5; run++) {
    const before = process.memoryUsage().heapUsed;
    for (let k = 0; k < steps; k++) work(k);
    const grown = process.memoryUsage().heapUsed - before;
    if (grown >= 0) least = Math.min(least, grown / steps);
  }
  return least;
}
