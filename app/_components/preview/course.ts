import type { ShardResult } from "@/lib/analyses/result";

/** Points between two looks at the clock. */
const LOOK = 4;

/** A row being solved, which can be left and taken up again. */
export class Course {
  private done = 0;
  private spent = 0;
  result: ShardResult | null = null;

  /** `steps` takes a step a point; `points` is how many there are; `now` tells milliseconds. */
  constructor(
    private readonly steps: Generator<undefined, ShardResult, void>,
    readonly points: number,
    private readonly now: () => number,
  ) {}

  /** Time spent so far, ms. */
  get taken(): number {
    return this.spent;
  }

  /** Time of a point so far, ms. */
  get pace(): number {
    return this.spent / Math.max(1, this.done);
  }

  /** Goes on for about `budget` ms; true when the row is solved. */
  run(budget: number): boolean {
    const begun = this.now();
    let passed = 0;
    while (this.result === null && passed < budget) {
      for (let k = 0; k < LOOK && this.result === null; k++) this.step();
      passed = this.now() - begun;
    }
    this.spent += this.now() - begun;
    return this.result !== null;
  }

  private step(): void {
    const { value } = this.steps.next();
    if (value === undefined) this.done += 1;
    else this.result = value;
  }
}
