/** The clauses that may follow a tolerance. */
export const TOLERANCES: readonly { readonly id: string; readonly form: string; readonly says: string }[] = [
  {
    id: "tolerance.relative",
    form: "± 1 %",
    says: "Half the width, as a part of the value. Of a value of zero it is nothing (UNI10).",
  },
  {
    id: "tolerance.absolute",
    form: "± 50 Ω",
    says: "Half the width, in the unit of the value; of a temperature in K.",
  },
  {
    id: "tolerance.uniform",
    form: "± 1 % uniform",
    says: "Every value within is as likely. This is the law where none is given.",
  },
  {
    id: "tolerance.normal",
    form: "± 1 % normal 3 sigma",
    says: "A bell curve of which the half-width is three standard deviations. It has no ends: some draws lie outside.",
  },
  {
    id: "tolerance.track",
    form: "± 1 % track ARRAY within 0.05 %",
    says: "Values of one group share one draw of the first width, and each differs from it by a draw of the second.",
  },
];

export const TOLERANCE_SAMPLE = `title "A matched pair"
let R_a = 10 kΩ ± 5 % track PAIR within 0.05 %
let R_b = 10 kΩ ± 5 % track PAIR within 0.05 %
ground -- V1 : voltage 1 V -- in -- R1 : resistor R_a -- out -- R2 : resistor R_b -- ground
draws 100 seed 2
show out.v
require out.v within 0.5 V ± 0.1 % as "the pair divides by two"`;
