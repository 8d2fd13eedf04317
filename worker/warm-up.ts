import type { SolveTask } from "./messages";

const POINTS = 121;

/**
 * A small run that every thread solves before it takes work: by then the language and the solver are compiled to machine code,
 * and the first curve of the first real run comes as soon as that of any other.
 */
export const WARM_UP: SolveTask = {
  kind: "solve",
  text: `title "Warm-up"
knob I_in = 1 µA
model junction : diode { Is = 2 nA, n = 1.9, Rs = 4 Ω }
model array    : npn   { Is = 0.4 fA, beta_f = 240, Va_f = 80 V }
model amp      : opamp { gain = 1e6, offset = 50 µV, bias = 10 pA }
ground -- I1 : current I_in -- sum
sum -- D1 : junction -- out
A1 : amp { plus = ground, minus = sum, out = out }
out -- R1 : resistor 10 kΩ -- low
Q1 : array { c = low, b = low, e = ground }
sweep I_in from 1 nA to 1 mA, 20 per decade
show out = out.v
`,
  from: 0,
  to: POINTS,
  points: POINTS,
};
