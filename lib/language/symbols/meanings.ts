import { BOLTZMANN, ELEMENTARY_CHARGE } from "@/lib/units/constants";
import type { FunctionName } from "../ast";

/** What each statement says, in one line, as language.md has it. */
export const STATEMENT_MEANINGS: Readonly<Record<string, string>> = {
  title: "the name shown in lists",
  use: "brings in the models and blocks of another file",
  let: "a named value",
  knob: "a value that a sweep may turn",
  model: "parameters of a device, each with its unit",
  block: "a reusable part with its own nets; its knobs are its parameters",
  sweep: "turns a knob over a range; the first sweep is the horizontal axis",
  draws: "tolerance draws, repeatable from the seed",
  seek: "looks for several operating points at each setting; what is required must hold at every stable one",
  show: "traces to keep and to plot",
  read: "a number per sweep of the first knob",
  require: "what must hold, at every point and in every draw unless it says otherwise",
};

export const CLAUSE_MEANINGS: Readonly<Record<string, string>> = {
  from: "the range of a sweep, as in `from 1 nA to 1 mA, 20 per decade`",
  over: "the values of a sweep, as in `over 10 °C, 25 °C, 40 °C`",
  "±": "the tolerance, half its width: `± 1 %` of the value or `± 50 Ω`",
  to: "the end of a sweep, then `20 per decade`, `121 points` or `step 10 mV` after a comma",
  "per decade": "so many values a decade",
  points: "so many values in all, both ends among them",
  in: "the range of a knob or window, or `in 95 % of draws`",
  uniform: "every value within the tolerance is as likely, which is the law where none is given",
  normal: "a bell curve of which the tolerance is so many standard deviations, as in `normal 3 sigma`",
  track: "parts of one group share a draw and differ by a smaller one, as in `track ARRAY within 0.05 %`",
  within: "meets a value, as in `within 59.2 mV ± 1 %`",
  between: "lies between two values, as in `between 1 V and 2 V`",
  rising: "rises along the first sweep",
  falling: "falls along the first sweep",
  for: "the points at which a knob lies in a range, as in `for I_in in 1 nA .. 1 mA`",
  at: "the points at which a knob has a value, as in `at temperature = 25 °C`",
  as: "the name under which a requirement is told of",
  seed: "the number that the draws are made from",
  revision: "the revision of the file that is brought in",
};

export const FUNCTION_MEANINGS: Readonly<Record<FunctionName, string>> = {
  exp: "the exponential of a pure number",
  ln: "the natural logarithm of a pure number",
  log10: "the logarithm of a pure number to the base 10",
  sqrt: "the square root",
  abs: "the size without its sign",
  min: "the lowest of two or more values",
  max: "the highest of two or more values",
  tanh: "the hyperbolic tangent of a pure number",
  atan: "the arc tangent of a pure number, in radians",
  if: "the second value where the comparison holds, else the third",
};

export const CONSTANT_MEANINGS: Readonly<Record<string, string>> = {
  pi: `the ratio of a circle's circumference to its diameter, ${Math.PI}`,
  k_B: `the Boltzmann constant, ${BOLTZMANN} J/K (exact)`,
  q_e: `the elementary charge, ${ELEMENTARY_CHARGE} C (exact)`,
  V_T: "the thermal voltage k_B·T/q_e at the present temperature",
};

/** Parts of a signal after its last dot. */
export const SIGNAL_MEANINGS: Readonly<Record<"v" | "i" | "p", string>> = {
  v: "voltage: of a net to ground, of an element the left net less the right one, so that of a `voltage` element is minus its value",
  i: "current: through an element from left to right, or into a pin",
  p: "power that an element absorbs; below zero where it delivers",
};
