import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { KINDS, MODEL_KINDS } from "@/lib/language/kinds";

/** Currents over six decades, so that no term hides behind another (invented). */
const SWEEP = "sweep I_in from 1 nA to 1 mA, 2 per decade\nsweep temperature over 25 °C, 60 °C\n";

const diode = (more: string) => `knob I_in = 1 µA
model d : diode { Is = 2 fA, n = 1.1${more} }
ground -- I1 : current I_in -- a -- R1 : resistor 1 MΩ -- ground
D1 : d { anode = a, cathode = ground }
D2 : d { anode = ground, cathode = a }
${SWEEP}show a.v, D1.i, D2.i`;

const transistor = (more: string) => `knob I_in = 1 µA
model q : npn { Is = 2 fA, beta_f = 80, beta_r = 2${more} }
ground -- I1 : current I_in -- a -- R1 : resistor 100 kΩ -- b
ground -- V1 : voltage 3 V -- c
Q1 : q { c = c, b = b, e = e }
e -- R2 : resistor 1 kΩ -- ground
${SWEEP}show e.v, Q1.c.i, Q1.b.i`;

const amplifier = (more: string) => `knob I_in = 1 µA
model amp : opamp { gain = 1e5, offset = 30 µV, bias = 1 pA${more} }
ground -- I1 : current I_in -- s -- R1 : resistor 10 kΩ -- o
A1 : amp { plus = ground, minus = s, out = o }
o -- R2 : resistor 1 kΩ -- ground
${SWEEP}show s.v, o.v, A1.out.i`;

const resistor = (more: string) => `knob I_in = 1 µA
ground -- I1 : current I_in -- a -- R1 : resistor 7 kΩ${more} -- ground
${SWEEP}show a.v`;

const zener = (more: string) => diode(`, V_breakdown = 0.3 V, I_breakdown = 1 µA${more}`);
const leaky = (more: string) => transistor(`, I_leak_e = 1 pA, I_leak_c = 1 pA${more}`);
const drifting = (more: string) => amplifier(`, offset_drift = 2 µV/K${more}`);

function bytesOf(text: string): Uint8Array[] {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const { traces, failures } = solveRange(job, 0, job.plan.points);
  expect(failures).toEqual([]);
  return traces.map(({ buffer }) => new Uint8Array(buffer));
}

/** Values of every parameter that may be left out at which its term counts. */
const TELLING: readonly (readonly [circuit: (more: string) => string, given: string])[] = [
  [diode, "Rs = 100 Ω"],
  [diode, "photocurrent = 1 nA"],
  [diode, "Eg = 1.12 V"],
  [diode, "x = 3"],
  [diode, "Eg = 1.12 V, T0 = 35 °C"],
  [zener, "n_breakdown = 2"],
  [diode, "V_breakdown = 0.5 V"],
  [transistor, "R_base = 1 kΩ"],
  [transistor, "R_emitter = 10 Ω"],
  [transistor, "R_collector = 10 Ω"],
  [transistor, "I_knee_f = 1 mA"],
  [transistor, "I_leak_e = 1 pA"],
  [transistor, "I_knee_r = 1 nA"],
  [transistor, "Va_f = 50 V"],
  [transistor, "Va_r = 20 V"],
  [transistor, "I_leak_c = 1 pA"],
  [transistor, "beta_power = 1.5"],
  [transistor, "Eg = 1.12 V"],
  [transistor, "x = 3"],
  [transistor, "n = 1.01"],
  [transistor, "beta_power = 1.5, T0 = 35 °C"],
  [leaky, "n_leak_e = 1.9"],
  [leaky, "n_leak_c = 1.9"],
  [amplifier, "offset_drift = 1 µV/K"],
  [drifting, "T0 = 35 °C"],
  [amplifier, "out_low = -1 mV"],
  [amplifier, "bias_offset = 1 pA"],
  [amplifier, "R_out = 100 Ω"],
  [amplifier, "out_high = -1 mV"],
];

describe("a term at its neutral limit is, byte for byte, the term left out", () => {
  test.each([
    [diode, "Rs = 0 Ω"],
    [diode, "photocurrent = 0 A"],
    [diode, "Eg = 0 V"],
    [diode, "x = 0"],
    [diode, "T0 = 25 °C"],
    [zener, "n_breakdown = 1"],
    [diode, "V_breakdown = 1e6 V, I_breakdown = 1 mA"],
    [transistor, "R_base = 0 Ω, R_emitter = 0 Ω, R_collector = 0 Ω"],
    [transistor, "I_knee_f = 1e300 A, I_knee_r = 1e300 A"],
    [transistor, "Va_f = 1e300 V, Va_r = 1e300 V"],
    [transistor, "I_leak_e = 1e-200 A, I_leak_c = 1e-200 A"],
    [transistor, "beta_power = 0"],
    [transistor, "Eg = 0 V, x = 0"],
    [transistor, "T0 = 25 °C, n = 1"],
    [leaky, "n_leak_e = 2, n_leak_c = 2"],
    [amplifier, "offset_drift = 0 V/K"],
    [drifting, "T0 = 25 °C"],
    [amplifier, "bias_offset = 0 A"],
    [amplifier, "R_out = 0 Ω"],
    [
      (more: string) => resistor(more.replace(", ", " { ").concat(more === "" ? "" : " }")),
      "drift = 0 ppm/K",
    ],
  ])("%#: $1", (text, neutral) => {
    expect(bytesOf(text(`, ${neutral}`))).toEqual(bytesOf(text("")));
  });

  test.each(TELLING)("and is not where it counts, %#: $1", (text, given) => {
    expect(bytesOf(text(`, ${given}`))).not.toEqual(bytesOf(text("")));
  });

  test("and every parameter of a model that may be left out is among them", () => {
    const tried = new Set(
      TELLING.flatMap(([, given]) => [...given.matchAll(/(\w+) =/g)].map(([, name]) => name)),
    );
    // What belongs to another term is given with it in the circuits above.
    const within = ["beta_f", "beta_r", "I_breakdown", "gain", "offset", "bias"];
    const optional = MODEL_KINDS.flatMap((kind) =>
      Object.entries(KINDS[kind].parameters).flatMap(([name, { absent }]) => (absent === null ? [] : [name])),
    );
    expect(optional.filter((name) => !tried.has(name) && !within.includes(name))).toEqual([]);
  });

  test("a terminal resistance that a knob leads to 0 Ω and through it is solved there too", () => {
    const text = transistor(", R_base = R, R_emitter = R / 10").replace(
      "sweep I_in",
      "knob R = 1 Ω\nsweep R over 0 Ω, 1 mΩ, 1 Ω\nsweep I_in",
    );
    const { job } = compile(text);
    const { traces, failures } = solveRange(job!, 0, job!.plan.points);
    expect(failures).toEqual([]);
    const plain = compile(transistor("")).job!;
    const wired = solveRange(plain, 0, plain.plan.points).traces;
    for (const [i, trace] of wired.entries()) {
      for (const [k, value] of trace.entries()) {
        expect(Math.abs(traces[i]![3 * k]! / value - 1)).toBeLessThan(1e-12);
      }
    }
  });
});
