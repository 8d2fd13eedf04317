import { readFileSync } from "node:fs";
import { LuDecomposition, Matrix } from "ml-matrix";
import { compile, type Job } from "@/lib/analyses/compile";
import { Predictor } from "@/lib/analyses/predictor";
import { solveRange } from "@/lib/analyses/sweep";
import { System } from "@/lib/circuit/system";
import type { SparseShape } from "@/lib/solver/elimination";
import { type Linear, LinearSolver } from "@/lib/solver/linear";
import { newton } from "@/lib/solver/newton";

/** How often the sweep is solved; the first runs warm the compiler up and are shown apart. */
const TIMES = 300;
const BASELINE_TIMES = 30;
const SOLUTIONS = 20_000;

/** The baseline: a dense pivoted LU of the package ml-matrix, built afresh for every step. */
class Afresh implements Linear {
  private factors: LuDecomposition | null = null;

  constructor(private readonly shape: SparseShape) {}

  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    const { size, rows, columns } = this.shape;
    const matrix = Matrix.zeros(size, size);
    for (let k = 1; k < jacobian.length; k++) matrix.set(rows[k]!, columns[k]!, jacobian[k]!);
    this.factors = new LuDecomposition(matrix);
    if (this.factors.isSingular()) return false;
    this.solveAgain(residual, step);
    return true;
  }

  /** Newton's method asks for none. */
  solveTransposed(): void {}

  solveAgain(residual: Float64Array, step: Float64Array): void {
    const size = step.length;
    const right = Matrix.zeros(size, 1);
    for (let i = 0; i < size; i++) right.set(i, 0, -residual[i]!);
    const solution = this.factors!.solve(right);
    for (let i = 0; i < size; i++) step[i] = solution.get(i, 0);
  }
}

/** The multiplier of the examples over its first axis alone: 301 points. */
function multiplier(): Job {
  const text = readFileSync("examples/one-quadrant-multiplier.swn", "utf8").replace(/^sweep V_y.*$/m, "");
  const { job } = compile(text);
  if (job === null) throw new Error("The multiplier does not compile.");
  return job;
}

/** The whole sweep with the baseline's linear algebra: the same steps from the same predictions, no traces. */
function sweepWith(job: Job, linearOf: (shape: SparseShape, system: System) => Linear): number {
  const { knob, values } = job.plan.axes[0]!;
  const system = new System(job.design, job.circuit);
  const { pattern, state, circuit } = system;
  system.turn(knob, values[0]!);
  system.startCold();
  system.assemble();
  const shape = { size: circuit.size, rows: pattern.rows, columns: pattern.columns };
  const bench = {
    system,
    linear: linearOf(shape, system),
    step: new Float64Array(circuit.size),
    assemble: () => system.assemble(),
  };
  const predictor = new Predictor(state);
  let iterations = 0;
  for (const value of values) {
    system.turn(knob, value);
    const isWarm = predictor.predict();
    if (isWarm) system.settle();
    else system.startCold();
    const attempt = newton(bench, isWarm, 60);
    if (attempt.kind !== "converged") throw new Error(`The baseline fails at ${value} V: ${attempt.kind}.`);
    iterations += attempt.iterations;
    predictor.learn(true);
  }
  return iterations;
}

/** Times of `n` runs, s, in order. */
function timesOf(n: number, work: () => void): number[] {
  return Array.from({ length: n }, () => {
    const begun = performance.now();
    work();
    return (performance.now() - begun) / 1000;
  });
}

function median(times: readonly number[]): number {
  return times.toSorted((a, b) => a - b)[times.length >> 1]!;
}

/** Microseconds that one solution of a warm multiplier's linear system takes. */
function microsecondsPerSolution(job: Job, linearOf: (shape: SparseShape, system: System) => Linear): number {
  let linear: Linear | null = null;
  let solved: System | null = null;
  sweepWith(job, (shape, system) => {
    linear = linearOf(shape, system);
    solved = system;
    return linear;
  });
  const { jacobian, residual, x } = solved!.state;
  const step = new Float64Array(x.length - 1);
  const [time] = timesOf(1, () => {
    for (let k = 0; k < SOLUTIONS; k++) linear!.solve(jacobian, residual, step);
  });
  return (time! / SOLUTIONS) * 1e6;
}

/**
 * Measures the engine on the 301-point multiplier sweep against the same engine with a dense LU built afresh for every step.
 * Prints figures and ratios, with `--json` as one line of JSON; asserts nothing.
 */
function measure(): void {
  const job = multiplier();
  const { points } = job.plan;
  const { iterations } = solveRange(job, 0, points);
  const first = timesOf(1, () => solveRange(job, 0, points))[0]!;
  const whole = median(timesOf(TIMES, () => solveRange(job, 0, points)).slice(TIMES / 3));
  const sparse = (shape: SparseShape, system: System) => new LinearSolver(shape, system.state.jacobian);
  const afresh = (shape: SparseShape) => new Afresh(shape);
  const baseline = median(timesOf(BASELINE_TIMES, () => sweepWith(job, afresh)).slice(BASELINE_TIMES / 3));
  const bare = median(timesOf(TIMES, () => sweepWith(job, sparse)).slice(TIMES / 3));
  const [ours, theirs] = [microsecondsPerSolution(job, sparse), microsecondsPerSolution(job, afresh)];
  const figures = {
    points,
    unknowns: job.circuit.size,
    stepsPerPoint: iterations.reduce((sum, count) => sum + count) / points,
    pointsPerSecond: points / whole,
    pointsPerSecondOfASecondRun: points / first,
    baselinePointsPerSecond: points / baseline,
    speedOverBaseline: baseline / bare,
    microsecondsPerSolution: ours,
    baselineMicrosecondsPerSolution: theirs,
    solutionOverBaseline: theirs / ours,
  };
  if (process.argv.includes("--json")) {
    console.log(JSON.stringify(figures));
    return;
  }
  const n = (value: number, digits = 0) => value.toFixed(digits);
  console.log(
    `Multiplier, ${points} points, ${figures.unknowns} unknowns, ${n(figures.stepsPerPoint, 2)} steps a point`,
  );
  console.log(
    `whole sweep with traces: ${n(figures.pointsPerSecond)} points/s warm, ${n(figures.pointsPerSecondOfASecondRun)} in the second run`,
  );
  console.log(
    `dense LU afresh for every step: ${n(figures.baselinePointsPerSecond)} points/s; ours ${n(figures.speedOverBaseline, 1)} times as fast`,
  );
  console.log(
    `one linear solution: ${n(ours, 2)} µs, afresh ${n(theirs, 2)} µs; ${n(figures.solutionOverBaseline, 1)} times`,
  );
}

measure();
