import { type Problem, within } from "./problems";

/** What other ways of writing netlists put for ours: the message says how it is spelled here. */
export const SPELLING_PROBLEMS: readonly Problem[] = [
  {
    code: "TXT4",
    text: within("ground -- R2 : resistor «4,7 kΩ» -- in"),
    mended: within("ground -- R2 : resistor 4.7 kΩ -- in"),
    says: "decimal point",
  },
  {
    code: "TXT4",
    text: within("knob k = 1 V\nsweep k over «4,7» V, 5 V"),
    mended: within("knob k = 1 V\nsweep k over 4.7 V, 5 V"),
  },
  { code: "TXT4", text: within("let a = 2 * «4,7»"), mended: within("let a = 2 * 4.7") },
  {
    code: "TXT4",
    text: within("model m : diode { Is = «1,5 fA», n = 2 }"),
    mended: within("model m : diode { Is = 1.5 fA, n = 2 }"),
  },
  {
    code: "UNI1",
    text: within("ground -- R2 : resistor «4k7» -- in"),
    mended: within("ground -- R2 : resistor 4.7 kΩ -- in"),
    says: "in the place of the decimal point",
  },
  {
    code: "UNI1",
    text: within("ground -- R2 : resistor «2R2» -- in"),
    mended: within("ground -- R2 : resistor 2.2 Ω -- in"),
  },
  {
    code: "UNI1",
    text: within("ground -- I2 : current «4u7» -- in"),
    mended: within("ground -- I2 : current 4.7 µA -- in"),
  },
  { code: "UNI1", text: within("let a = «3V3»"), mended: within("let a = 3.3 V") },
  { code: "UNI1", text: within("let a = «4k7»"), says: "as in `4.7 kΩ`" },
  {
    code: "UNI1",
    text: within("ground -- R2 : resistor 10 «R» -- in"),
    mended: within("ground -- R2 : resistor 10 Ω -- in"),
  },
  { code: "UNI1", text: within("let a = 10 «megohm»"), mended: within("let a = 10 MΩ") },
  {
    code: "UNI2",
    text: within("ground -- R2 : resistor «10meg» -- in"),
    mended: within("ground -- R2 : resistor 10 MΩ -- in"),
    says: "mega is `M`",
  },
  { code: "UNI2", text: within("let a = «10 Meg»"), mended: within("let a = 10 MΩ") },

  { code: "TXT1", text: within("let a = 1 V «//» note"), mended: within("let a = 1 V # note") },
  { code: "TXT1", text: within("«//» let a = 1 V"), mended: within("# let a = 1 V") },
  { code: "TXT1", text: within("let a = 1 V «;» note"), mended: within("let a = 1 V # note") },
  { code: "TXT1", text: within("let a = 1 V«;»"), mended: within("let a = 1 V") },

  {
    code: "FRM2",
    text: within("in -- R2 : resistor 1 kΩ -- «0»"),
    mended: within("in -- R2 : resistor 1 kΩ -- ground"),
    says: "`ground`",
  },
  {
    code: "FRM2",
    text: within("«0» -- R2 : resistor 1 kΩ -- in"),
    mended: within("ground -- R2 : resistor 1 kΩ -- in"),
  },
  {
    code: "FRM10",
    text: within("R2 : resistor { left = «0», right = in, value = 1 kΩ }"),
    mended: within("R2 : resistor { left = ground, right = in, value = 1 kΩ }"),
  },
  {
    code: "FRM7",
    text: within("in «-» R2 : resistor 1 kΩ -- ground"),
    mended: within("in -- R2 : resistor 1 kΩ -- ground"),
    says: "joined by `--`",
  },
  {
    code: "FRM7",
    text: within("in -- R2 : resistor 1 kΩ« - »ground"),
    mended: within("in -- R2 : resistor 1 kΩ -- ground"),
  },
  {
    code: "FRM7",
    text: within("in -- R2 : resistor 1 kΩ« - »m -- R3 : resistor 1 kΩ -- ground"),
    mended: within("in -- R2 : resistor 1 kΩ -- m -- R3 : resistor 1 kΩ -- ground"),
  },
  {
    code: "FRM7",
    text: within("in -- R2 : resistor 1 kΩ -- m «-» R3 : resistor 1 kΩ -- ground"),
    mended: within("in -- R2 : resistor 1 kΩ -- m -- R3 : resistor 1 kΩ -- ground"),
  },

  {
    code: "NAM6",
    text: within("model m : npn { Is = 1 fA }\nQ1 : m { c = in, b = in, e = ground, «drain» = in }"),
    says: "its pins are c, b, e",
  },
  {
    code: "NAM6",
    text: within("R2 : resistor { left = in, right = ground, value = 1 kΩ, «anode» = in }"),
    says: "its pins are left, right",
  },
  {
    code: "NAM6",
    text: within("model m : npn { Is = 1 fA, «Re» = 1 Ω }"),
    mended: within("model m : npn { Is = 1 fA, R_emitter = 1 Ω }"),
  },
  {
    code: "NAM6",
    text: within("model m : npn { Is = 1 fA, «Rb» = 1 Ω }"),
    mended: within("model m : npn { Is = 1 fA, R_base = 1 Ω }"),
  },
  {
    code: "NAM6",
    text: within("model m : npn { Is = 1 fA, «beta» = 100 }"),
    mended: within("model m : npn { Is = 1 fA, beta_f = 100 }"),
  },
  {
    code: "UNI1",
    text: within("model m : opamp { gain = «120 dB» }"),
    mended: within("model m : opamp { gain = 1000000 }"),
    says: "A ratio is given as a number",
  },
  {
    code: "UNI3",
    text: within("sweep temperature over «-20 C», 25 °C"),
    mended: within("sweep temperature over -20 °C, 25 °C"),
  },
  { code: "NAM10", text: within("read x = highest(«V»(in))"), mended: within("read x = highest(in.v)") },
  {
    code: "FRM12",
    text: within("read x = «max(in.v)»"),
    mended: within("read x = highest(in.v)"),
    says: "along the sweep",
  },
  {
    code: "NAM3",
    text: within("sweep «temp» from 0 °C to 50 °C, 3 points"),
    mended: within("sweep temperature from 0 °C to 50 °C, 3 points"),
  },
  {
    code: "FRM2",
    text: within(
      "knob k = 1 V\nsweep k from 1 V to 9 V, 5 points\nread x = highest(in.v) for k in 1 V« - »5 V",
    ),
    mended: within(
      "knob k = 1 V\nsweep k from 1 V to 9 V, 5 points\nread x = highest(in.v) for k in 1 V .. 5 V",
    ),
  },
  { code: "NAM10", text: within("let a = «log»(10)"), mended: within("let a = log10(10)"), says: "`ln`" },

  { code: "UNI3", text: within("ground -- R2 : resistor «1 V» -- in"), says: "give a value in Ω" },
  { code: "UNI3", text: within("model m : diode { Is = 1 fA, n = «1 V» }"), says: "leave its unit out" },
  { code: "UNI10", text: within("ground -- R2 : resistor 1 kΩ ± «5» -- in"), says: "write `5 Ω` or `5 %`" },
];
