import type { System } from "@/lib/circuit/system";
import type { Aided } from "./aided";
import { Curve, type Curved } from "./curve";
import { type Attempt, type Bench, newton } from "./newton";

/** S, as powers of ten: where the path begins and where the circuit is tried as it is. */
const FIRST = 1;
const LAST = -13;
const FIRST_STEP = 0.1;
const LONGEST_STEP = 1;
const GROWTH = 1.5;
const START_STEPS = 60;
const FINAL_STEPS = 25;
const MOST_STEPS = 1500;
/** V: the fixed voltages are spread over as much, so that the path meets no branching point (with probability one). */
const SPREAD = 0.5;

/**
 * Fixed-point homotopy with arclength (Melville, Trajković, Fang and Watson, IEEE Trans. CAD 12, 1993): F(x) + g·(x − a) = 0 is followed from a
 * large conductance g, where a is nearly the solution, to none, and the path may turn back on the way. The parameter is −lg g.
 */
export function homotopy(bench: Bench, aided: Aided): Attempt {
  const { system } = bench;
  aided.origin.forEach((_, j) => {
    // Fixed numbers that have nothing to do with each other: the fractions of multiples of the golden ratio.
    aided.origin[j] = SPREAD * (((j + 1) * 0.6180339887498949) % 1);
  });
  const curved = new Tied(system, aided);
  curved.turn(-FIRST);
  system.startCold();
  const start = newton(aided.bench(bench.step), false, START_STEPS);
  if (start.kind !== "converged") return start;
  const curve = new Curve(system, curved, -FIRST, 1);
  let length = FIRST_STEP;
  const spent = () => start.iterations + curve.iterations;
  while (spent() < MOST_STEPS) {
    const gone = curve.stride(length);
    if (gone === 0 || curve.parameter < -FIRST - 1) {
      return { kind: "step too small", iterations: spent(), wasSingular: false };
    }
    length = Math.min(LONGEST_STEP, gone * GROWTH);
    if (curve.parameter < -LAST) continue;
    system.settle();
    const last = newton(bench, true, FINAL_STEPS);
    return { ...last, iterations: spent() + last.iterations };
  }
  return { kind: "iteration limit", iterations: spent(), wasSingular: false };
}

class Tied implements Curved {
  readonly shape;

  constructor(
    private readonly system: System,
    private readonly aided: Aided,
  ) {
    this.shape = aided.shape;
  }

  turn(parameter: number): void {
    this.aided.conductance = 10 ** -parameter;
  }

  linearise(slope: Float64Array): Float64Array {
    const { system, aided } = this;
    aided.assemble();
    slope.fill(0);
    for (let k = 0; k < aided.aids.length; k++) {
      slope[aided.aids[k]!.row]! -= Math.LN10 * aided.conductance * aided.pull(k);
    }
    return aided.aidedValues(system.state.jacobian);
  }
}
