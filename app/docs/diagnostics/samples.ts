import type { Code } from "@/lib/language/catalogue";
import { MOST_POINTS, MOST_TEXT, MOST_WORD, SHARED } from "@/lib/language/limits";

const CIRCUIT = "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground";
const AMPLIFIER = "model amp : opamp { }";
const JUNCTION = "model junction : diode { Is = 1 fA }";

/** Lines in a netlist that has nothing else to complain about. */
function within(...lines: readonly string[]): string {
  return [CIRCUIT, ...lines, "show in.v", ""].join("\n");
}

/** As `within`, with two sweeps and a trace `out`. */
function contract(...lines: readonly string[]): string {
  return [
    "ground -- V1 : voltage V_in -- in -- R1 : resistor 1 kΩ -- ground",
    "knob V_in = 1 V",
    "sweep V_in from 1 mV to 1 V, 1 per decade",
    "sweep temperature over 0 °C, 25 °C",
    "show out = in.v",
    ...lines,
    "",
  ].join("\n");
}

/** So many elements, each on a net of its own. */
function resistors(count: number): string[] {
  return Array.from({ length: count }, (_, i) => `ground -- S${i} : resistor 1 kΩ -- n${i}`);
}

/** For every code a netlist that is answered with it. The page shows the line that is at fault. */
export const SAMPLES: Readonly<Record<Code, string>> = {
  TXT1: within("let a = 2 V – 1 V"),
  TXT2: within('title "Log converter'),
  TXT3: within("let a = 1e999 V"),
  TXT4: within("let a = 2 * 4,7"),

  FRM1: within("a = 1 V"),
  FRM2: within("title Log converter"),
  FRM3: within("ground -- R2 : resistor -- in"),
  FRM4: within("let a = 1 V 2 V"),
  FRM5: within("let a = (1 V + 2 V"),
  FRM7: within("ground -- R2 : resistor 1 kΩ -- R3 : resistor 1 kΩ -- in"),
  FRM8: within("let a = 1 V < 2 V"),
  FRM9: within('title "One"', 'title "Two"'),
  FRM10: within("R2 : resistor { left = 1 V, right = in, value = 1 kΩ }"),
  FRM11: within("ground -- D1 : diode -- in"),
  FRM12: within("let a = exp(1, 2)"),
  FRM13: within(
    "block part(a) {",
    "  a -- R9 : resistor 1 kΩ -- ground",
    "  show a.v",
    "}",
    "X : part { a = in }",
  ),
  FRM14: within("model clamp : diode { Is = 1 fA, I_breakdown = 1 mA }", "ground -- D1 : clamp -- in"),

  NAM1: within("let a = 1 V", "let a = 2 V"),
  NAM2: within("let exp = 1 V"),
  NAM3: within("let R_out = 1 kΩ", "ground -- R2 : resistor R_ot -- in"),
  NAM4: within("show x = in"),
  NAM5: within("ground -- R2 : resistr 1 kΩ -- in"),
  NAM6: within("model array : npn { Is = 1 fA, beta_g = 100 }"),
  NAM7: within("show x = in.i"),
  NAM8: within("model junction : diode { Is = 1 fA, Is = 2 fA }"),
  NAM9: within("let a = a + 1 V"),
  NAM10: within("let a = sqr(2)"),
  NAM11: within("knob k = 1 V", "knob l = k * 2"),
  NAM12: within("block loop(a) {", "  a -- R2 : resistor 1 kΩ -- ground", "  X : loop { a = a }", "}"),
  NAM13: within('use "matched-arrays" revision 3'),
  NAM14: within('use "with a mistake"'),

  UNI1: within("let a = 10 kohms"),
  UNI2: within("ground -- R2 : resistor 10k -- in"),
  UNI3: within("ground -- R2 : resistor 10 -- in"),
  UNI4: within("let a = 1 V + 2"),
  UNI5: within("show decades = log10(in.v)"),
  UNI6: within("let warm = 25 °C ± 5 °C"),
  UNI7: within("let a = 2 V^2"),
  UNI8: within("ground -- R2 : resistor 0 Ω -- in"),
  UNI9: within("let a = 1 / 0"),
  UNI10: within("let a = 1 V ± 1"),

  WIR1: within("in -- R2 : resistor 1 kΩ -- out"),
  WIR2: within("a -- R2 : resistor 1 kΩ -- b -- V2 : voltage 1 V -- a"),
  WIR3: within("ground -- V2 : voltage 2 V -- in"),
  WIR4: within("ground -- I1 : current 1 µA -- x -- I2 : current 1 µA -- ground"),
  WIR5: within(AMPLIFIER, "A1 : amp { plus = ground, minus = in }"),
  WIR6: within(
    AMPLIFIER,
    "in -- R2 : resistor 1 kΩ -- m -- R3 : resistor 1 kΩ -- ground",
    "A1 : amp { plus = m, minus = ground, out = o }",
    "o -- R4 : resistor 1 kΩ -- ground",
  ),
  WIR7: within("in -- R2 : resistor 1 kΩ -- in"),
  WIR8: within("model real : opamp { gain = 1e6 }", "A1 : real { plus = ground, minus = in, out = in }"),
  WIR9: "",
  WIR10: [
    "model real : opamp { gain = 1e6 }",
    "gnd -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- m -- R2 : resistor 1 kΩ -- out",
    "A1 : real { plus = gnd, minus = m, out = out }",
    "out -- R3 : resistor 1 kΩ -- gnd",
    "show out.v",
    "",
  ].join("\n"),

  PLN1: within("let a = 1 V", "sweep a over 1 V, 2 V"),
  PLN2: within("knob k = 1 V", "sweep k over 1 V, 2 V", "sweep k over 3 V, 4 V"),
  PLN3: within("knob k = 1 V", "sweep k from 0 V to 1 V, 20 per decade"),
  PLN4: within("knob k = 1 V", "sweep k from 1 V to 2 V, 2.5 per decade"),
  PLN5: within("knob k = 1 V", "sweep k from 1 V to 2 V, step -1 V"),
  PLN6: within("knob k = 1 V in 0 V .. 2 V", "sweep k from 1 V to 3 V, 5 points"),
  PLN7: within("knob k = 1 V in 2 V .. 0 V"),
  PLN8: `${CIRCUIT}\n`,
  PLN9: within("knob R = 1 kΩ", "ground -- R2 : resistor R -- in", "sweep R from 0 Ω to 2 kΩ, 3 points"),

  CON1: contract("require out <= 1 V at V_in = 20 mV"),
  CON2: contract("require out <= 1 V for V_in in 1 V .. 1 mV"),
  CON3: contract("require mean(2 V) <= 1 V"),
  CON4: contract("require decades_where(out) >= 1"),
  CON5: contract("read slope = per_decade(out) at V_in = 1 V"),
  CON6: contract("read a = out - 1 V"),
  CON7: contract("require V_in <= 1 V"),
  CON8: contract("require out <= 1 V in 95 % of draws"),
  CON9: contract("require out within 1 V ± -1 %"),
  CON10: contract("show a = highest(out)"),
  CON11: contract("require highest(out) rising"),
  CON12: contract("read a = highest(out) + b", "read b = lowest(out)"),
  CON13: contract("read a = highest(out)", "require a <= 1 V at V_in = 1 V"),
  CON14: contract('require out <= 1 V as "limit"', 'require out >= 0 V as "limit"'),

  CAP1: "#".repeat(MOST_TEXT + 1),
  CAP2: within(`let a = ${"(".repeat(257)}1${")".repeat(257)}`),
  CAP3: within(...resistors(SHARED.elements)),
  CAP4: within("knob k = 1 V", `sweep k from 1 V to 2 V, ${MOST_POINTS + 1} points`),
  CAP5: within(...resistors(300), "knob k = 1 V", "sweep k from 1 V to 2 V, 200000 points"),
  CAP6: "let = 1\n".repeat(300),
  CAP7: contract(
    ...Array.from({ length: 1000 }, (_, i) => `require out <= ${i + 1} V`),
    "read a = highest(out)",
  ),
  CAP8: within(
    "knob k = 1 V",
    "sweep k from 0 V to 1 V, 100000 points",
    "show out = in.v",
    ...Array.from({ length: 20 }, (_, i) => `require ${"out + ".repeat(15)}out <= ${i + 1} V`),
  ),
  CAP9: within(`let ${"x".repeat(MOST_WORD + 1)} = 1 V`),
  CAP10: [
    JUNCTION,
    "knob I_in = 1 µA",
    "ground -- I1 : current I_in -- out -- D1 : junction -- ground",
    "sweep I_in from 1 µA to 2 µA, 100001 points",
    "seek 3",
    "show out.v",
    "",
  ].join("\n"),
};
