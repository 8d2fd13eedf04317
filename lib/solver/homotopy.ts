import { power } from "@/lib/units/elementary";
import type { Aided } from "./aided";
import { Curve } from "./curve";
import { type Attempt, type Bench, newton } from "./newton";
import { scatter } from "./scatter";
import { type Fading, TiedCurve } from "./tied-curve";

/** S, as powers of ten: where the path begins and where the circuit is tried as it is. */
const FIRST = 1;
const LAST = -13;
const FIRST_STEP = 0.1;
const LONGEST_STEP = 1;
const GROWTH = 1.5;
const START_STEPS = 60;
const FINAL_STEPS = 25;
const MOST_STEPS = 1500;
const FADING: Fading = {
  conductance: (parameter) => power(10, -parameter),
  slope: (parameter) => -Math.LN10 * power(10, -parameter),
};

/**
 * Fixed-point homotopy with arclength (Melville, Trajković, Fang and Watson, IEEE Trans. CAD 12, 1993): F(x) + g·(x − a) = 0 is followed from a
 * large conductance g, where a is nearly the solution, to none, and the path may turn back on the way. The parameter is −lg g.
 */
export function homotopy(bench: Bench, aided: Aided): Attempt {
  const { system } = bench;
  scatter(aided.origin);
  const curved = new TiedCurve(system, aided, FADING);
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
      return { kind: "came to a stand", iterations: spent(), wasSingular: false };
    }
    length = Math.min(LONGEST_STEP, gone * GROWTH);
    if (curve.parameter < -LAST) continue;
    system.settle();
    const last = newton(bench, true, FINAL_STEPS);
    return { ...last, iterations: spent() + last.iterations };
  }
  return { kind: "did not settle", iterations: spent(), wasSingular: false };
}
