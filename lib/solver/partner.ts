import { power } from "@/lib/units/elementary";
import type { Aided } from "./aided";
import { Curve } from "./curve";
import type { Bench } from "./newton";
import { scatter } from "./scatter";
import { type Fading, TiedCurve } from "./tied-curve";

/** S: where the conductance begins to be felt by picoamperes, and how many decades above it the circuit has one solution. */
const FAINT = 1e-12;
const DECADES = 13;
const FADING: Fading = {
  conductance: (parameter) => FAINT * (power(10, parameter) - 1),
  slope: (parameter) => Math.LN10 * FAINT * power(10, parameter),
};
const FIRST_STEP = 0.05;
const LONGEST_STEP = 0.25;
const GROWTH = 1.5;
const MOST_STEPS = 2000;

/**
 * Follows F(x) + g·D·(x − a) = 0 from the solution at hand, g = 0, towards larger g. Of all these curves one alone reaches the large g at
 * which the circuit has one solution; each of the others turns back to g = 0 at another solution, whose index is the opposite
 * (the parity of solutions on a path; Garcia and Zangwill, Pathways to Solutions, Fixed Points, and Equilibria, 1981, from memory). So a
 * set whose indices do not add up leads to what it lacks. Each `variant` ties to other voltages and so pairs otherwise. True where the present unknowns are near such another solution.
 */
export function partner(bench: Bench, aided: Aided, variant: number, spent: { iterations: number }): boolean {
  const { system } = bench;
  scatter(aided.origin, variant);
  const curve = new Curve(system, new TiedCurve(system, aided, FADING), 0, 1);
  let length = FIRST_STEP;
  let isBack = false;
  while (!isBack && curve.iterations < MOST_STEPS && curve.parameter <= DECADES) {
    const gone = curve.stride(length);
    if (gone === 0) break;
    length = Math.min(LONGEST_STEP, gone * GROWTH);
    isBack = curve.parameter <= 0;
  }
  spent.iterations += curve.iterations;
  aided.conductance = 0;
  return isBack;
}
