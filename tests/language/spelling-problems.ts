import { type Problem, within } from "./problems";

/** What other ways of writing netlists put for ours: the message says how it is spelled here. */
export const SPELLING_PROBLEMS: readonly Problem[] = [
  {
    code: "TXT4",
    text: within("ground -- R2 : resistor «4,7 kΩ» -- in"),
    mended: within("ground -- R2 : resistor 4.7 kΩ -- in"),
    says: "decimal point",
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
];
