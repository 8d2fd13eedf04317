import { advance } from "@/lib/circuit/state";
import type { System } from "@/lib/circuit/system";
import type { SparseShape } from "./elimination";
import { GeneratedStep, isLong } from "./kernel/generated";
import type { LinearSolver } from "./linear";

/** Steps before straight code is generated: a short sweep does not repay it. Loops are soon made. */
const BEFORE_STRAIGHT = 2000;
const BEFORE_LOOPS = 20;

/** Newton's step from the present unknowns: assembly and solution, after a while as generated code in one. */
export class Stepper {
  /** Where the step stands. */
  step: Float64Array;
  private generated: GeneratedStep | null = null;
  private steps = 0;
  private isTried = false;

  constructor(
    private readonly system: System,
    private readonly linear: LinearSolver,
    private readonly shape: SparseShape,
  ) {
    this.step = new Float64Array(shape.size);
  }

  /** Generates code when the time has come. The step and the arrays of the system's state are then others. */
  prepare(): void {
    if (this.isTried || this.steps < BEFORE_LOOPS) return;
    const plan = this.linear.samplePlan;
    if (plan === null || (this.steps < BEFORE_STRAIGHT && !isLong(this.shape, plan))) return;
    this.isTried = true;
    this.generated = GeneratedStep.of(this.system, this.shape, plan);
    if (this.generated === null) return;
    this.step = this.generated.step;
    this.linear.adopt(this.generated);
  }

  /** At rest every junction is first linearised at its actual voltage. Leaves the system assembled; false as of `LinearSolver.solve`. */
  solve(isAtRest: boolean): boolean {
    const { system, linear, step, generated } = this;
    this.steps += 1;
    if (isAtRest && generated !== null && linear.samplePlan !== null) return linear.take(generated);
    if (isAtRest) system.assembleAtRest();
    else system.assemble();
    const { jacobian, residual } = system.state;
    return linear.solve(jacobian, residual, step);
  }

  /** Adds the step to the unknowns. */
  advance(): void {
    if (this.generated === null) advance(this.system.state, this.step);
    else this.generated.advance();
  }
}
