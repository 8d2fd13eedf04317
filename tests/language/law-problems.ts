import { type Problem, within } from "./problems";

const open = "L1 : law { plus = in, minus = ground, ";

/** Problems of laws, gains and parameters that belong together. */
export const LAW_PROBLEMS: readonly Problem[] = [
  { code: "FRM3", text: within("«L1» : law { plus = in, minus = ground }"), says: "`volts = …`" },
  { code: "FRM3", text: within("in -- «L1» : law -- ground") },
  { code: "FRM11", text: within("in -- L1 : law «3 V» { amps = 1 mA } -- ground"), says: "in braces" },
  { code: "FRM11", text: within("in -- «G1 : gain { ratio = 2 }» -- ground"), says: "3 pins" },
  {
    code: "FRM14",
    text: within("model d : diode { Is = 1 fA, «I_breakdown» = 1 mA }"),
    says: "`V_breakdown`",
  },
  { code: "FRM14", text: within("model d : diode { Is = 1 fA, «n_breakdown» = 2 }") },
  { code: "FRM14", text: within("model q : npn { Is = 1 fA, «n_leak_e» = 2 }"), says: "`I_leak_e`" },
  { code: "FRM14", text: within("model a : opamp { «out_low» = -12 V }"), says: "`gain`" },
  {
    code: "NAM3",
    text: within(`${open}amps = 1 mS * «inn».v }`),
    mended: within(`${open}amps = 1 mS * in.v }`),
  },
  { code: "NAM6", text: within("«G1» : gain { plus = in, minus = ground, out = in }"), says: "`ratio`" },
  { code: "NAM6", text: within(`${open}«amp» = 1 mA, amps = 1 mA }`) },
  { code: "NAM8", text: within(`${open}amps = 1 mA, «volts» = 1 V }`), says: "not both" },
  { code: "NAM8", text: within(`in -- L1 : law { amps = 1 mA, «amps» = 1 V } -- ground`), says: "it once" },
  { code: "UNI3", text: within(`${open}volts = «3 A» }`) },
  { code: "UNI3", text: within(`${open}amps = «in.v» }`), says: "in A" },
  { code: "UNI3", text: within(`${open}amps = «3» }`), mended: within(`${open}amps = 3 A }`) },
  { code: "UNI4", text: within(`${open}amps = 1 mA * («in.v + R1.i») / 1 V }`) },
  {
    code: "UNI5",
    text: within(`${open}amps = 1 mA * exp(«in.v») }`),
    mended: within(`${open}amps = 1 mA * exp(in.v / 1 V) }`),
  },
  {
    code: "UNI8",
    text: within("model a : opamp { gain = 1e6, out_low = 2 V, «out_high = 1 V» }"),
    says: "above",
  },
  { code: "UNI8", text: within("model d : diode { Is = 1 fA, photocurrent = «-1 A» }") },
  { code: "UNI9", text: within(`${open}volts = «1 V / 0» }`) },
  {
    code: "UNI10",
    text: within(`${open}amps = 1 mA «± 1 %» }`),
    mended: within(`${open}amps = 1 mA  }`),
  },
  { code: "WIR5", text: within("«G1» : gain { plus = in, minus = ground, ratio = 2 }"), says: "`out`" },
];
