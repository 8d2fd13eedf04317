import { count, MOST_BLOCK_DEPTH, MOST_BRANCHES, MOST_POINTS } from "@/lib/language/limits";

/** How a statement is written and what it asks. Words between backticks are text of a netlist. */
export interface StatementText {
  readonly forms: readonly string[];
  readonly says: string;
  readonly rules: readonly string[];
  /** A whole netlist that uses it; null where more than one file is needed. */
  readonly sample: string | null;
}

/** The statements that declare and wire, in the order in which a file uses them. */
export const STATEMENTS: Readonly<Record<string, StatementText>> = {
  title: {
    forms: ['title "TEXT"'],
    says: "The name shown in lists, on plots and in reports.",
    rules: [
      "At most one in a file.",
      "The title is part of what random draws are made from: with another title the draws differ.",
    ],
    sample: `title "A voltage divider"
ground -- V1 : voltage 10 V -- in -- R1 : resistor 9 kΩ -- out -- R2 : resistor 1 kΩ -- ground
show out.v
read ratio = highest(out.v / in.v)`,
  },
  let: {
    forms: ["let NAME = VALUE [± TOLERANCE]"],
    says: "A named value. It may use other values, knobs and the temperature, wherever they stand in the file.",
    rules: [
      "It follows the knobs and values that it is made of.",
      "Each part that uses a value with a tolerance draws it for itself, unless the tolerance tracks.",
      "It may not use itself, directly or by way of others (NAM9), nor a signal (NAM4).",
    ],
    sample: `title "Two values"
let R_sum   = 20 kΩ ± 0.1 %
let R_first = 0.3 * R_sum
ground -- V1 : voltage 1 V -- in
in -- R1 : resistor R_first -- out -- R2 : resistor R_sum - R_first -- ground
show out.v
read share = highest(out.v / in.v)`,
  },
  knob: {
    forms: ["knob NAME = VALUE [± TOLERANCE] [in LOW .. HIGH]", "knob temperature = VALUE"],
    says: "A value that a sweep may turn and that a page shows as a control. `temperature` is a knob of every file, 25 °C unless set.",
    rules: [
      "Its value is a number, or made of numbers and constants; a knob may not follow another knob (NAM11).",
      "With a range, neither the value nor a sweep may leave it (PLN6).",
      "Inside a block a knob is a parameter: an instance may set it, else its own value holds.",
    ],
    sample: `title "A knob with its range"
knob V_in = 2 V in 0 V .. 5 V
ground -- V1 : voltage V_in -- in -- R1 : resistor 1 kΩ -- ground
sweep V_in from 0 V to 5 V, 6 points
show R1.i
read most = highest(R1.i)`,
  },
  model: {
    forms: ["model NAME : KIND { PARAMETER = VALUE [± TOLERANCE], … }"],
    says: "Parameters for parts of one kind. What is left out is dropped from the equations exactly.",
    rules: [
      "The kinds are `diode`, `npn`, `pnp` and `opamp`; their parameters stand under Models.",
      "Each part that follows a model draws its tolerances for itself, unless they track.",
      "The last parameter may be followed by a comma, and the list may run over several lines.",
    ],
    sample: `title "A model and what follows it"
model junction : diode { Is = 2 fA ± 5 %, n = 1.02, Rs = 0.4 Ω }
ground -- I1 : current 1 mA -- out -- D1 : junction -- ground
draws 50 seed 3
show out.v
read drop = highest(out.v)`,
  },
  block: {
    forms: ["block NAME(NET, …) {", "  STATEMENTS", "}"],
    says: "A reusable part. Its nets in brackets are joined to nets outside; all others are its own. It is used like a kind: `X : NAME { NET = net, KNOB = value }`.",
    rules: [
      "Inside stand `let`, `knob`, `model`, paths, parts and further blocks; what belongs to the file as a whole may not (FRM13).",
      `Blocks may hold instances of blocks, ${MOST_BLOCK_DEPTH} deep, and never of themselves (NAM12).`,
      "From outside, `X.R1.i` is a signal of an instance and `X.in.i` the current into one of its nets.",
    ],
    sample: `title "The same stage twice"
block divider(in, out) {
  knob R = 10 kΩ
  in -- R1 : resistor R -- out -- R2 : resistor R -- ground
}
ground -- V1 : voltage 8 V -- a
A : divider { in = a, out = b }
B : divider { in = b, out = c, R = 1 MΩ }
show c.v, A.R1.i
read level = highest(c.v)`,
  },
  use: {
    forms: ['use "NAME"', 'use "NAME" revision N'],
    says: "Brings in the models and blocks of a shelf. On the command line a shelf is the file NAME.swn beside this one.",
    rules: [
      "The values that its models and blocks need come along, unseen.",
      "A shelf that is not at hand is an error (NAM13), and so is a mistake inside it (NAM14).",
      "Nothing else is brought in: sweeps, readings and requirements of a shelf are its own.",
    ],
    sample: null,
  },
  sweep: {
    forms: [
      "sweep KNOB from A to B, N per decade",
      "sweep KNOB from A to B, N points",
      "sweep KNOB from A to B, step S",
      "sweep KNOB over A, B, C",
    ],
    says: "Turns a knob over a range. The first sweep is the horizontal axis; each further one repeats all before it for each of its values.",
    rules: [
      "Both ends belong to the sweep. `N per decade` counts from A; B is added where it does not fall on a step.",
      "Per decade both ends have one sign and neither is zero (PLN3).",
      "A step is a difference: of a temperature it is given in K, and it leads towards the end (PLN5).",
      `All sweeps together have ${count(MOST_POINTS)} points at most (CAP4).`,
    ],
    sample: `title "Two sweeps"
knob I_in = 1 µA
model junction : diode { Is = 1 fA, Eg = 1.12 V, x = 3 }
ground -- I1 : current I_in -- out -- D1 : junction -- ground
sweep I_in from 10 nA to 1 mA, 4 per decade
sweep temperature from 0 °C to 50 °C, step 25 K
show out.v
read slope = per_decade(out.v)`,
  },
  draws: {
    forms: ["draws N seed S"],
    says: "Beside the nominal design, N designs in which every tolerance is drawn. The same file gives the same draws on any machine and any number of workers.",
    rules: [
      "N and S are whole numbers. A draw is one design: its values are the same at every point of the sweeps.",
      "Draws multiply the points of the plan, which count against its limit (CAP4).",
    ],
    sample: `title "Fifty designs"
let R_a = 10 kΩ ± 1 %
let R_b = 10 kΩ ± 1 %
ground -- V1 : voltage 1 V -- in -- R1 : resistor R_a -- out -- R2 : resistor R_b -- ground
draws 50 seed 7
show out.v
require out.v within 0.5 V ± 1 % as "half"`,
  },
  seek: {
    forms: ["seek N"],
    says: "Looks for up to N operating points at each setting. Each is a branch with its own proof and its own stability.",
    rules: [
      `N goes up to ${MOST_BRANCHES}; \`seek 1\` says that one is enough.`,
      "A requirement must then hold at every stable operating point that was found, wherever the circuit may come to rest.",
      "That no further point is found is no proof that there is none; the page of the run says when one must be missing.",
    ],
    sample: `title "A flip-flop of two transistors"
knob V_s = 5 V
model small : npn { Is = 1 fA, beta_f = 100 }
ground -- VS : voltage V_s -- supply
supply -- RA : resistor 1 kΩ -- a
supply -- RB : resistor 1 kΩ -- b
a -- RC : resistor 47 kΩ -- x
b -- RD : resistor 47 kΩ -- y
QA : small { c = a, b = y, e = ground }
QB : small { c = b, b = x, e = ground }
sweep V_s from 3 V to 5 V, 3 points
seek 3
show a.v, b.v`,
  },
  show: {
    forms: ["show [NAME =] EXPRESSION, …"],
    says: "Traces to keep and to plot, one value a point. A trace without a name is called by its expression.",
    rules: [
      "A trace may use signals, knobs, values and other arithmetic; readings and reductions stand in `read` (CON10).",
      "A signal that a reading or requirement names is kept without being shown.",
      "A file with nothing to show is told so (PLN8), and still runs.",
    ],
    sample: `title "Three traces"
knob I_in = 1 µA
model junction : diode { Is = 1 fA }
ground -- I1 : current I_in -- out -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
show out.v, decades = out.v / (V_T * ln(10)), D1.p
read most = highest(D1.p)`,
  },
  read: {
    forms: ["read NAME = EXPRESSION [WINDOW …]"],
    says: "A number for each sweep of the first knob, each setting of the others and each draw; with `deviation` and `error_from` one a point.",
    rules: [
      "What goes along the sweep has to be reduced, or stays a trace and belongs in `show` (CON6).",
      "A reading may use those before it (CON12), and keeps to their windows.",
      "What is and is not known is said under Readings.",
    ],
    sample: `title "Two readings"
knob I_in = 1 µA
model junction : diode { Is = 1 fA, Rs = 1 Ω }
ground -- I1 : current I_in -- out -- D1 : junction -- ground
sweep I_in from 1 nA to 10 mA, 10 per decade
show out.v
read slope = per_decade(out.v)          for I_in in 1 nA .. 100 µA
read bend  = highest(abs(error_from(out.v, slope * log10(I_in / 1 fA))))`,
  },
  require: {
    forms: [
      'require EXPRESSION RELATION [WINDOW …] [in P % of draws] [as "TEXT"]',
      "RELATION:  <= B   >= B   < B   > B   within X ± Y   between A and B   rising   falling",
      "WINDOW:    for KNOB in LOW .. HIGH   at KNOB = VALUE",
    ],
    says: "What must hold, at every point of its windows and in every draw unless a share is given. Without data it does not hold.",
    rules: [
      "It must say something of the circuit: a trace, a signal or a reading (CON7).",
      "`± 1 %` is of the value named; `± 5 mV` has the unit of the value. A band of temperature is given in K (UNI6).",
      "`in P % of draws` needs `draws` (CON8).",
      "The label names it in lists and reports, and may be used once (CON14).",
    ],
    sample: `title "Three requirements"
knob I_in = 1 µA
model junction : diode { Is = 1 fA, Rs = 1 Ω }
ground -- I1 : current I_in -- out -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
show out.v
require out.v rising                                        as "rises"
require out.v between 0.3 V and 0.8 V                       as "stays in range"
require per_decade(out.v) within 59.16 mV ± 1 %             as "slope"`,
  },
};

/** What is wired has no word of its own: a path, and a part by its pins. */
export const WIRING: Readonly<Record<string, StatementText & { readonly title: string }>> = {
  path: {
    title: "A path",
    forms: ["NET -- NAME : KIND [VALUE [± TOLERANCE]] [{ PARAMETER = VALUE }] -- NET -- …"],
    says: "Elements with two ends in series, read from left to right like the drawing. A net stands between any two.",
    rules: [
      "Left to right is the meaning: a current flows so, a voltage rises so, a diode has its anode on the left.",
      "The net that voltages are counted from is `ground`. Nets are not declared; naming one makes it.",
      "A net with one connection, or with no way to ground, is an error before anything is solved (WIR1, WIR2).",
    ],
    sample: `title "A path"
ground -- V1 : voltage 5 V -- in
in -- R1 : resistor 10 kΩ { drift = 50 ppm/K } -- out -- R2 : resistor 10 kΩ -- ground
show out.v
read level = highest(out.v)`,
  },
  device: {
    title: "A part by its pins",
    forms: ["NAME : KIND { PIN = NET, …, PARAMETER = VALUE }"],
    says: "A part with any number of pins, or an instance of a block. Pins are named, never counted.",
    rules: [
      "Every pin is given, in any order (WIR5); the name of a pin stands apart from other names, so `out = out` is fine.",
      "Two-ended kinds take their value as `value = …` in this form.",
      "Parameters of a kind with a model are given in the model, not here (NAM6).",
    ],
    sample: `title "Parts by their pins"
model amp : opamp { gain = 1e6 }
V1 : voltage { left = ground, right = in, value = 100 mV }
A1 : amp { plus = in, minus = m, out = out }
R1 : resistor { left = ground, right = m, value = 1 kΩ }
R2 : resistor { left = m, right = out, value = 99 kΩ }
show out.v
read level = highest(out.v)`,
  },
};
