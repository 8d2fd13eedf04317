import type { ElementKind } from "@/lib/language/ast";

/** A formula of a model and what is to be said of it. Words between backticks are names of the language. */
export interface Equation {
  readonly says: string;
  readonly formulas: readonly string[];
}

/** Where a formula comes from, as the file that computes it has it in its header. */
export interface Source {
  readonly cites: string;
  readonly file: string;
}

export interface ModelText {
  readonly equations: readonly Equation[];
  readonly sources: readonly Source[];
  /** What the model leaves out, or what is to be known in its use. */
  readonly remarks: readonly string[];
  /** A whole netlist that uses it. */
  readonly sample: string;
}

/** What all junctions share. */
export const TEMPERATURE = {
  thermalVoltage: "V_T = frac{k T}{q}",
  saturation:
    "I_s ( T ) = I_s big{frac{T}{T_0}}^{x/n} | exp big{frac{E_g}{n k/q} big{frac{1}{T_0} − frac{1}{T}}}",
} as const;

const TRANSISTOR: Omit<ModelText, "sample"> = {
  equations: [
    {
      says: "With $η = n V_T$, the current that both junctions transport from collector to emitter, and the collector current:",
      formulas: [
        'I_t = I_s ( e^{v_"be"/η} − e^{v_"bc"/η} ) a',
        'I_C = I_t − frac{I_s}{β_r} ( e^{v_"bc"/η} − 1 ) | − I_"Lc" ( e^{v_"bc"/(n_"Lc" V_T)} − 1 )',
      ],
    },
    {
      says: "The Early effect enters as a linear factor; without `Va_f` and `Va_r` it is 1:",
      formulas: ['a = 1 − frac{v_"bc"}{V_"Af"} − frac{v_"be"}{V_"Ar"}'],
    },
    {
      says: "The base current is that of the two gains, then a leakage of its own ideality in each junction:",
      formulas: [
        'I_B = frac{I_s}{β_f} ( e^{v_"be"/η} − 1 ) + frac{I_s}{β_r} ( e^{v_"bc"/η} − 1 ) | + I_"Le" ( e^{v_"be"/(n_"Le" V_T)} − 1 ) | + I_"Lc" ( e^{v_"bc"/(n_"Lc" V_T)} − 1 )',
      ],
    },
    {
      says: "High injection: where a knee current is given, $1/q$ takes the place of $a$. The base charge $q$ solves a quadratic:",
      formulas: [
        "q^2 = frac{q}{a} + q_2 , | q = frac{1 + sqrt{1 + 4 a^2 q_2}}{2 a}",
        'q_2 = frac{I_s}{I_"Kf"} ( e^{v_"be"/η} − 1 ) | + frac{I_s}{I_"Kr"} ( e^{v_"bc"/η} − 1 )',
      ],
    },
    {
      says: "Both gains follow a power of temperature; the saturation and leakage currents follow the law given under Temperature:",
      formulas: ["β ( T ) = β big{frac{T}{T_0}}^p"],
    },
    {
      says: "A terminal resistance puts a drop between its net and the junctions ($I_E$ leaves the emitter):",
      formulas: ['v_"be" = v_b − v_e − R_b I_B − R_e I_E', 'v_"bc" = v_b − v_c − R_b I_B + R_c I_C'],
    },
  ],
  sources: [
    { cites: "Ebers and Moll (Proc. IRE 42, 1954)", file: "lib/devices/bipolar.ts" },
    { cites: "Early, Proc. IRE 40, 1952", file: "lib/devices/bipolar.ts" },
    { cites: "Gummel and Poon (Bell Syst. Tech. J. 49, 1970)", file: "lib/devices/bipolar.ts" },
  ],
  remarks: [
    "Currents of pins count into the transistor, so `Q1.e.i` is negative in forward operation.",
    "Charge storage, self-heating, noise and breakdown of the junctions are left out.",
    "A term whose parameter is left out is dropped exactly; it is not replaced by a large or small number.",
  ],
};

/** The equations of every kind of part, in the words of the textbooks. */
export const MODELS: Readonly<Record<ElementKind, ModelText>> = {
  resistor: {
    equations: [
      {
        says: "Ohm's law; the value holds at 25 °C and changes in proportion to the temperature from there:",
        formulas: ['v = R ( T ) i , | R ( T ) = R ( 1 + α ( T − 298.15 "K" ) )'],
      },
    ],
    sources: [{ cites: "Ohm's law", file: "lib/devices/resistor.ts" }],
    remarks: [
      "The drift is linear in temperature. A resistance that comes to 0 Ω or below is an error of the plan.",
    ],
    sample: `title "A resistor that drifts"
ground -- V1 : voltage 1 V -- in -- R1 : resistor 10 kΩ { drift = 100 ppm/K } -- ground
sweep temperature from 0 °C to 50 °C, 11 points
show R1.i
read change = span(R1.i)`,
  },
  voltage: {
    equations: [
      {
        says: "The potential rises from left to right by the value, whatever the current:",
        formulas: ['v_"right" − v_"left" = V'],
      },
    ],
    sources: [],
    remarks: ["`V1.v` is the left net less the right one, so it is minus the value."],
    sample: `title "A voltage"
ground -- V1 : voltage 5 V -- supply -- R1 : resistor 1 kΩ -- ground
show supply.v, V1.p
read taken_up = highest(V1.p)`,
  },
  current: {
    equations: [
      {
        says: "The value flows from left to right through the element, whatever the voltage:",
        formulas: ["i = I"],
      },
    ],
    sources: [],
    remarks: [
      "A net whose only ways out are current elements has no definite voltage; the checker names the cut (WIR4).",
    ],
    sample: `title "A current"
ground -- I1 : current 1 mA -- out -- R1 : resistor 1 kΩ -- ground
show out.v
read level = highest(out.v)`,
  },
  diode: {
    equations: [
      {
        says: "The exponential law of the junction, with $η = n V_T$ and $u$ its voltage behind the series resistance:",
        formulas: ['I = I_s ( e^{u/η} − 1 ) − I_"photo" , | u = V − R_s I'],
      },
      {
        says: "The series resistance is not an inner net: $u$ is eliminated by the Wright omega function, for which $w + ln w = z$ with $w = ω ( z )$. With $a = I_s R_s / η$:",
        formulas: [
          'w = ω big{frac{V + R_s I_"photo"}{η} + a + ln a} , | I = frac{η w}{R_s} − I_s − I_"photo"',
        ],
      },
      {
        says: "With `V_breakdown`, a second exponential carries the reverse current, with $η_b = n_b V_T$; its last term lets no current flow at 0 V:",
        formulas: ["I = I_s ( e^{u/η} − 1 ) | − I_b ( e^{−(u + V_b)/η_b} − e^{−V_b/η_b} )"],
      },
    ],
    sources: [
      { cites: "Shockley, Bell Syst. Tech. J. 28, 1949", file: "lib/devices/diode.ts" },
      { cites: "Corless et al., Adv. Comput. Math. 5, 1996", file: "lib/devices/diode.ts" },
      { cites: "Banwell and Jayakumar, Electron. Lett. 36, 2000", file: "lib/devices/diode.ts" },
      {
        cites: "the usual description of a sharp breakdown (common practice)",
        file: "lib/devices/breakdown.ts",
      },
    ],
    remarks: [
      "Saturation and temperature as given under Temperature; $R_s$, $V_b$ and the photocurrent do not change with temperature.",
      "Charge storage, recombination of its own ideality and shunt conductance are left out; add a second diode or a resistor for them.",
    ],
    sample: `title "The slope of a junction"
knob I_in = 1 µA
model junction : diode { Is = 1 fA }
ground -- I1 : current I_in -- out -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
show out.v
read slope = per_decade(out.v)
require slope within 59.16 mV ± 0.01 % as "59.16 mV a decade at 25 °C"`,
  },
  npn: {
    ...TRANSISTOR,
    sample: `title "A transistor as a logarithm"
knob I_in = 1 µA
model array : npn { Is = 0.4 fA, beta_f = 240, Va_f = 80 V, R_emitter = 0.6 Ω }
model amp : opamp { }
ground -- I1 : current I_in -- in
Q1 : array { c = in, b = ground, e = out }
A1 : amp { plus = ground, minus = in, out = out }
sweep I_in from 1 nA to 1 mA, 5 per decade
show out.v
read bend = span(deviation(out.v))`,
  },
  pnp: {
    ...TRANSISTOR,
    equations: [
      {
        says: "The equations of the NPN transistor with the sign of every voltage and every current reversed; the parameters stay positive.",
        formulas: [],
      },
    ],
    remarks: [],
    sample: `title "A mirror of PNP transistors"
knob I_in = 10 µA
model up : pnp { Is = 1 fA, beta_f = 100 }
ground -- VS : voltage 5 V -- supply
Q1 : up { c = in, b = in, e = supply }
Q2 : up { c = out, b = in, e = supply }
in -- I1 : current I_in -- ground
out -- R1 : resistor 10 kΩ -- ground
sweep I_in from 1 µA to 100 µA, 5 per decade
show copy = R1.i / I_in
read error = highest(copy) - 1`,
  },
  opamp: {
    equations: [
      {
        says: "Without `gain` it is ideal, a nullor: the inputs take only the bias currents, and the output does what makes their difference vanish:",
        formulas: ['v_"plus" − v_"minus" + V_"os" = 0'],
      },
      {
        says: "With `gain`, $L ( s )$ stands behind the output resistance, and $i$ is the current that leaves the output:",
        formulas: ['s = A ( v_"plus" − v_"minus" + V_"os" )', 'v_"out" = L ( s ) − R_"out" i'],
      },
      {
        says: "$L$ limits smoothly, with $κ$ = 50 mV; without limits $L ( s ) = s$. At 10 κ inside a limit it is 2 µV off:",
        formulas: ['L ( s ) = s − κ ln ( 1 + e^{(s − V_"high")/κ} ) | + κ ln ( 1 + e^{(V_"low" − s)/κ} )'],
      },
      {
        says: "The offset drifts with temperature, and the bias currents flow into the inputs:",
        formulas: [
          'V_"os" ( T ) = V_"os" + d ( T − T_0 )',
          'I_"plus" = I_B + frac{1}{2} I_"os" , | I_"minus" = I_B − frac{1}{2} I_"os"',
        ],
      },
    ],
    sources: [
      { cites: "Carlin, Proc. IEEE 52, 1964, from memory", file: "lib/devices/opamp.ts" },
      { cites: "behavioural (our own choice)", file: "lib/devices/limits.ts" },
    ],
    remarks: [
      "Behavioural: bandwidth, slew rate, common mode, supply current and noise are left out.",
      "An ideal amplifier is the same law without its last term, not one with a gain of 1e9.",
    ],
    sample: `title "Offset through a gain of ten"
knob V_in = 10 mV
model amp : opamp { gain = 2e5, offset = 150 µV, out_low = -12 V, out_high = 12 V }
ground -- V1 : voltage V_in -- in
A1 : amp { plus = in, minus = m, out = out }
ground -- R1 : resistor 1 kΩ -- m -- R2 : resistor 9 kΩ -- out
sweep V_in from 0 V to 1 V, 11 points
show out.v
read zero = intercept(out.v)
read gain_is = per_unit(out.v)`,
  },
  gain: {
    equations: [
      {
        says: "A linear block that takes no current at its inputs:",
        formulas: ['v_"out" = k ( v_"plus" − v_"minus" )'],
      },
    ],
    sources: [],
    remarks: ["Its parameters stand in the braces of the element; it takes no model."],
    sample: `title "A linear block"
ground -- V1 : voltage 10 mV -- in -- R0 : resistor 1 kΩ -- ground
G1 : gain { plus = in, minus = ground, out = out, ratio = 20 }
out -- R1 : resistor 1 kΩ -- ground
show out.v
read level = highest(out.v)`,
  },
  law: {
    equations: [
      {
        says: "The voltage over the element, or the current through it from plus to minus, is an expression $f$ of signals, knobs and values:",
        formulas: [
          'v_"plus" − v_"minus" = f ( … ) | "with" | "volts" = f',
          'i = f ( … ) | "with" | "amps" = f',
        ],
      },
    ],
    sources: [],
    remarks: [
      "The expression is differentiated symbolically once; nothing is differenced numerically.",
      "It may name its own voltage or current, as in `amps = 1 mA * tanh(L1.v / 1 V)`.",
      "A law takes no tolerance; give it to a value that the law uses.",
    ],
    sample: `title "A square root by a law"
knob V_in = 1 V
ground -- V1 : voltage V_in -- in -- R0 : resistor 1 MΩ -- ground
L1 : law { plus = out, minus = ground, volts = sqrt(in.v * 1 V) }
out -- R1 : resistor 10 kΩ -- ground
sweep V_in from 10 mV to 1 V, 5 per decade
show out.v
read worst = highest(abs(error_from(out.v, sqrt(in.v * 1 V))))`,
  },
};
