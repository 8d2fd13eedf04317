import type { ReductionName } from "@/lib/language/ast";

/** How a reduction is written, what it is as a formula, and what it gives where there is little to go on. */
export interface ReductionText {
  readonly form: string;
  /** With y the trace and x the first knob at the n points of the windows. */
  readonly formula: string;
  readonly unit: string;
  readonly rules: readonly string[];
  /** A reading of the sweep in `readingNetlist`. */
  readonly sample: string;
}

/** Every reduction, in words and as a formula. */
export const REDUCTION_TEXTS: Readonly<Record<ReductionName, ReductionText>> = {
  highest: {
    form: "highest(TRACE)",
    formula: "max_k y_k",
    unit: "that of the trace",
    rules: ["The value of a point, not of a curve drawn between points."],
    sample: "read most = highest(out)",
  },
  lowest: {
    form: "lowest(TRACE)",
    formula: "min_k y_k",
    unit: "that of the trace",
    rules: ["The value of a point, not of a curve drawn between points."],
    sample: "read least = lowest(out)",
  },
  mean: {
    form: "mean(TRACE)",
    formula: "frac{1}{n} Σ_k y_k",
    unit: "that of the trace",
    rules: [
      "Every point counts the same, so the mean of a sweep per decade is one over the logarithm of the knob.",
    ],
    sample: "read middle = mean(out)",
  },
  span: {
    form: "span(TRACE)",
    formula: "max_k y_k − min_k y_k",
    unit: "that of the trace",
    rules: ["0 for a single point; never below 0."],
    sample: "read range_of_out = span(out)",
  },
  per_decade: {
    form: "per_decade(TRACE)",
    formula: "min_{a , b} Σ_k ( y_k − a − b log_{10} x_k )^2",
    unit: "that of the trace, for each decade of the knob",
    rules: [
      "The result is $b$: the line is that of least squares.",
      "Wants two points, and a knob whose sweep has one sign and is never zero (CON5).",
      "The knob counts in its coherent unit; of a negative one the size counts.",
    ],
    sample: "read slope = per_decade(out) for I_in in 10 nA .. 10 µA",
  },
  per_unit: {
    form: "per_unit(TRACE)",
    formula: "min_{a , b} Σ_k ( y_k − a − b x_k )^2",
    unit: "that of the trace over that of the knob",
    rules: ["The result is $b$: the line is that of least squares.", "Wants two points (CON5)."],
    sample: "read resistance = per_unit(out) for I_in in 100 µA .. 1 mA",
  },
  intercept: {
    form: "intercept(TRACE)",
    formula: "min_{a , b} Σ_k ( y_k − a − b x_k )^2",
    unit: "that of the trace",
    rules: [
      "The result is $a$, the value of the line where the knob is 0.",
      "Swept per decade, the line goes over $log_{10} x_k$, and $a$ is its value where the knob is 1 in its coherent unit.",
      "Wants two points (CON5).",
    ],
    sample: "read at_one_ampere = intercept(out) for I_in in 10 nA .. 10 µA",
  },
  deviation: {
    form: "deviation(TRACE)",
    formula: "d_k = y_k − a − b x_k",
    unit: "that of the trace",
    rules: [
      "One value a point: it is plotted, and reduced again by `highest(abs(…))` or `span(…)`.",
      "The line is that of `per_unit`, or of `per_decade` where the knob is swept so.",
      "It is drawn through the windows of this reading; outside them it has no value.",
    ],
    sample: "read bend = span(deviation(out)) for I_in in 10 nA .. 10 µA",
  },
  error_from: {
    form: "error_from(TRACE, IDEAL)",
    formula: "e_k = y_k − z_k",
    unit: "that of the trace",
    rules: [
      "One value a point. The ideal is any expression of one unit with the trace: a number, a knob, another trace.",
      "For an error in per cent divide by the ideal: `error_from(out, ideal) / ideal`.",
    ],
    sample: "read error = highest(abs(error_from(out, V_T * ln(I_in / 1 fA))))",
  },
  reach: {
    form: "reach(TRACE, LEVEL)",
    formula: "y ( x ) = L",
    unit: "that of the knob",
    rules: [
      "The first $x$ from the low end of the knob. Between two points by a straight line over the knob as it is swept: per decade, over its logarithm.",
      "No value where the level is never reached, or a point before it has no value.",
      "The level is one number a sweep (CON6).",
    ],
    sample: "read where = reach(out, 0.6 V)",
  },
  decades_where: {
    form: "decades_where(COMPARISON)",
    formula: 'log_{10} x_"last" − log_{10} x_"first"',
    unit: "pure",
    rules: [
      "From the first to the last of the widest run of neighbouring points at which it holds.",
      "A run of one point is 0 decades, and so is none at all.",
      "Wants a knob whose sweep has one sign and is never zero (CON5).",
    ],
    sample: "read dynamic_range = decades_where(abs(error_from(out, V_T * ln(I_in / 1 fA))) <= 1 mV)",
  },
  at: {
    form: "at(TRACE, KNOB = VALUE)",
    formula: "y ( x = x_0 )",
    unit: "that of the trace",
    rules: [
      "The value has to be a point of the plan; nothing is interpolated. A value beside one proposes the nearest (CON1).",
      "The knob may be of any sweep: `at(out, temperature = 25 °C)` compares a curve with that of 25 °C.",
    ],
    sample: "read low_end = at(out, I_in = 1 nA)",
  },
};

/** The sweep on which the readings of the page are shown. */
export function readingNetlist(read: string): string {
  return `title "A junction with a resistance"
knob I_in = 1 µA
model junction : diode { Is = 1 fA, Rs = 4 Ω }
ground -- I1 : current I_in -- anode -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 10 per decade
show out = anode.v
${read}`;
}
