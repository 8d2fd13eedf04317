import { backwardError } from "./backward-error";
import { DenseFactors } from "./dense";
import { type Elimination, eliminate, type SparseShape } from "./elimination";
import type { Kernel } from "./kernel/kernel";
import { ListedKernel } from "./kernel/listed";
import { WrittenKernel } from "./kernel/written";

/** A step whose backward error is larger asks for new pivots; one that keeps a large one with new pivots too is not to be had. */
const GOOD_BACKWARD_ERROR = 1e-9;
const WORST_BACKWARD_ERROR = 1e-3;

/** Solutions before code is generated for the sample's pivots: a short sweep does not repay it. */
const FIRST_LISTED = 2000;

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
}

/**
 * Solves J·d = −F for one structure many times. Pivots are chosen once on a sample, and from then on a factorisation is a list
 * of multiplications over reused arrays, after a while as generated code; both give the same bytes. Pivots stay while the
 * backward error of each solution is small, and are chosen anew on the values at hand when it is not.
 */
export class LinearSolver implements Linear {
  private readonly first: Elimination | null;
  private readonly firstListed: Kernel | null;
  private firstWritten: WrittenKernel | null = null;
  private solutions = 0;
  private plan: Elimination | null = null;
  private kernel: Kernel | null = null;
  /** The dense factors of the last matrix, where no pivots of ours served. */
  private dense: DenseFactors | null = null;
  private factors = new Float64Array(0);
  private readonly work: Float64Array;

  /** `sample` chooses the pivots with which every strand begins, so that results do not depend on what was solved before. */
  constructor(
    private readonly shape: SparseShape,
    sample: Float64Array,
  ) {
    this.first = eliminate(shape, sample);
    this.firstListed = this.first === null ? null : new ListedKernel(shape, this.first);
    this.work = new Float64Array(2 * shape.size);
    this.reset();
  }

  /** Goes back to the pivots of the sample. */
  reset(): void {
    this.use(this.first, this.firstListed);
  }

  /** Factorises `jacobian` and solves for `step`. False where the matrix is singular or not finite. */
  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    this.dense = null;
    if (++this.solutions === FIRST_LISTED) this.write();
    if (this.attempt(jacobian, residual, step, GOOD_BACKWARD_ERROR)) return true;
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
    // Generated code has constant factors in its text and does not keep them.
    const { constants, pivots, places } = plan;
    if (this.kernel === this.firstWritten) {
      for (let place = 0; place < places; place++) {
        if (constants[place] !== 0) factors[place] = constants[place]!;
      }
      for (let k = 0; k < pivots.length; k++) {
        if (constants[pivots[k]!] !== 0) factors[places + k] = constants[pivots[k]!]!;
      }
    }
    return { plan, values: factors };
  }

  private use(plan: Elimination | null, kernel: Kernel | null): void {
    this.plan = plan;
    this.kernel = kernel;
    const length = plan === null ? 0 : plan.places + this.shape.size;
    if (length !== this.factors.length) this.factors = new Float64Array(length);
  }

  /** Generates code for the sample's pivots. */
  private write(): void {
    if (this.first !== null) this.firstWritten = WrittenKernel.of(this.shape, this.first);
  }

  private attempt(jacobian: Float64Array, residual: Float64Array, step: Float64Array, most: number): boolean {
    const { firstWritten } = this;
    if (firstWritten !== null && this.plan === this.first) {
      this.kernel = firstWritten.warmth.isUsed() ? firstWritten : this.firstListed;
    }
    if (this.kernel === null) return false;
    if (this.kernel.solve(jacobian, residual, step, this.factors)) return true;
    return this.errorOf(jacobian, residual, step) <= most;
  }

  private errorOf(jacobian: Float64Array, residual: Float64Array, step: Float64Array): number {
    return backwardError(this.shape, jacobian, residual, step, this.work);
  }
}
