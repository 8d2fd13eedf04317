import { backwardError } from "./backward-error";
import { DenseFactors } from "./dense";
import { type Elimination, eliminate, type SparseShape } from "./elimination";
import type { GeneratedStep } from "./kernel/generated";
import { factorsOf, type Kernel } from "./kernel/kernel";
import { ListedKernel } from "./kernel/listed";

/** A step whose backward error is larger asks for new pivots; one that keeps a large one with new pivots too is not to be had. */
const GOOD_BACKWARD_ERROR = 1e-9;
const WORST_BACKWARD_ERROR = 1e-3;

const NO_FACTORS = new Float64Array(0);

/** What Newton's method asks of linear algebra: solve J·d = −F into `step`, then again with the same J. */
export interface Linear {
  /** False where the matrix is singular or not finite. */
  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean;
  solveAgain(residual: Float64Array, step: Float64Array): void;
  /** Solves Jᵀ·y = `right` into `solution` with the same J. */
  solveTransposed(right: Float64Array, solution: Float64Array): void;
}

/** The factors of the last matrix: `values` as a kernel keeps them, places as in `plan`. */
export interface Factors {
  readonly plan: Elimination;
  readonly values: Float64Array;
  /** The code that made them, where such did. */
  readonly generated: GeneratedStep | null;
}

/**
 * Solves J·d = −F for one structure many times. Pivots are chosen once on a sample, and from then on a factorisation is a list
 * of multiplications over reused arrays, or generated code; both give the same bytes. Pivots stay while the backward error of each
 * solution is small, and are chosen anew on the values at hand when it is not.
 */
export class LinearSolver implements Linear {
  private readonly first: Elimination | null;
  private firstKernel: Kernel | null;
  private generated: GeneratedStep | null = null;
  private plan: Elimination | null = null;
  private kernel: Kernel | null = null;
  /** The dense factors of the last matrix, where no pivots of ours served. */
  private dense: DenseFactors | null = null;
  private firstFactors: Float64Array;
  private factors: Float64Array = NO_FACTORS;
  private readonly work: Float64Array;

  /** `sample` chooses the pivots with which every strand begins, so that results do not depend on what was solved before. */
  constructor(
    private readonly shape: SparseShape,
    sample: Float64Array,
  ) {
    this.first = eliminate(shape, sample);
    this.firstKernel = this.first === null ? null : new ListedKernel(shape, this.first);
    this.firstFactors = this.first === null ? NO_FACTORS : factorsOf(this.first);
    this.work = new Float64Array(2 * shape.size);
    this.reset();
  }

  /** Goes back to the pivots of the sample. */
  reset(): void {
    this.use(this.first, this.firstKernel);
  }

  /** Factorises `jacobian` and solves for `step`. False where the matrix is singular or not finite. */
  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    this.dense = null;
    if (this.attempt(jacobian, residual, step, GOOD_BACKWARD_ERROR)) return true;
    return this.solveAnew(jacobian, residual, step);
  }

  /** As `solve` by generated code that assembles, too; only while the sample's pivots are in use. */
  take(generated: GeneratedStep): boolean {
    this.dense = null;
    if (generated.take()) return true;
    const { jacobian, residual } = generated.system.state;
    if (this.errorOf(jacobian, residual, generated.step) <= GOOD_BACKWARD_ERROR) return true;
    return this.solveAnew(jacobian, residual, generated.step);
  }

  /** From now on generated code serves the sample's pivots. */
  adopt(generated: GeneratedStep): void {
    const isInUse = this.plan === this.first;
    this.firstKernel = generated;
    this.generated = generated;
    this.firstFactors = generated.factors;
    if (isInUse) this.reset();
  }

  /** The sample's elimination, where it is in use. */
  get samplePlan(): Elimination | null {
    return this.plan === this.first ? this.first : null;
  }

  /** With pivots chosen on the values at hand. */
  private solveAnew(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    const plan = eliminate(this.shape, jacobian);
    this.use(plan, plan === null ? null : new ListedKernel(this.shape, plan));
    if (plan === null) return false;
    if (this.attempt(jacobian, residual, step, WORST_BACKWARD_ERROR)) return true;
    this.dense = DenseFactors.of(this.shape, jacobian);
    if (this.dense === null) return false;
    this.dense.solve(residual, step);
    return this.errorOf(jacobian, residual, step) <= WORST_BACKWARD_ERROR;
  }

  solveAgain(residual: Float64Array, step: Float64Array): void {
    if (this.dense !== null) this.dense.solve(residual, step);
    else this.kernel!.solveAgain(residual, step, this.factors);
  }

  solveTransposed(right: Float64Array, solution: Float64Array): void {
    if (this.dense !== null) this.dense.solveTransposed(right, solution);
    else this.kernel!.solveTransposed(right, solution, this.factors);
  }

  /** Null where the last matrix was factorised densely or not at all. Pivots stand as their inverses only. */
  get atHand(): Factors | null {
    const { plan, factors } = this;
    if (plan === null || this.dense !== null) return null;
    return { plan, values: factors, generated: plan === this.first ? this.generated : null };
  }

  private use(plan: Elimination | null, kernel: Kernel | null): void {
    this.plan = plan;
    this.kernel = kernel;
    this.factors = plan === this.first ? this.firstFactors : plan === null ? NO_FACTORS : factorsOf(plan);
  }

  private attempt(jacobian: Float64Array, residual: Float64Array, step: Float64Array, most: number): boolean {
    if (this.kernel === null) return false;
    if (this.kernel.solve(jacobian, residual, step, this.factors)) return true;
    return this.errorOf(jacobian, residual, step) <= most;
  }

  private errorOf(jacobian: Float64Array, residual: Float64Array, step: Float64Array): number {
    return backwardError(this.shape, jacobian, residual, step, this.work);
  }
}
