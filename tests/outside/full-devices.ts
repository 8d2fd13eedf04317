import { lines, listed } from "./case";

const NPN =
  "model q : npn { Is = 3e-16 A, beta_f = 180, beta_r = 3, Va_f = 70 V, Va_r = 15 V, beta_power = 1.3, I_leak_e = 4e-14 A, n_leak_e = 1.9, I_leak_c = 2e-13 A, n_leak_c = 1.6, I_knee_f = 5 mA, I_knee_r = 0.2 mA, R_base = 180 Ω, R_emitter = 0.7 Ω, R_collector = 12 Ω, Eg = 1.16 V, x = 3.1 }";
const AMP =
  "model amp : opamp { gain = 4e5, offset = 0.3 mV, offset_drift = 2 µV/K, bias = 2 nA, bias_offset = 0.5 nA, R_out = 75 Ω, out_low = -9.5 V, out_high = 11 V }";

/** What is swept in a circuit of full-devices.py, its unit, and the circuit as a netlist. */
const CIRCUITS: Readonly<Record<string, { readonly unit: string; readonly text: readonly string[] }>> = {
  regulator: {
    unit: "V",
    text: [
      "model zener : diode { Is = 2 fA, n = 1.1, Rs = 4 Ω, V_breakdown = 5.6 V, I_breakdown = 1 mA, n_breakdown = 2.5, Eg = 1.12 V, x = 3 }",
      "ground -- V1 : voltage at_x -- in -- R1 : resistor 470 Ω -- k -- R2 : resistor 2 kΩ -- ground",
      "ground -- D1 : zener -- k",
    ],
  },
  stage: {
    unit: "A",
    text: [
      NPN,
      "ground -- I1 : current at_x -- b",
      "ground -- V1 : voltage 10 V -- vcc -- R1 : resistor 1 kΩ -- c",
      "Q1 : q { c = c, b = b, e = ground }",
    ],
  },
  converter: {
    unit: "A",
    text: [
      NPN,
      AMP,
      "ground -- I1 : current at_x -- s",
      "Q1 : q { c = s, b = ground, e = o }",
      "A1 : amp { plus = ground, minus = s, out = o }",
      "o -- R1 : resistor 5 kΩ -- ground",
    ],
  },
  light: {
    unit: "A",
    text: [
      AMP,
      "model lit : diode { Is = 5 pA, n = 1.4, Rs = 20 Ω, V_breakdown = 40 V, I_breakdown = 1 µA, n_breakdown = 6, photocurrent = at_x, Eg = 1.12 V, x = 3 }",
      "ground -- V1 : voltage -5 V -- n -- D1 : lit -- s -- R1 : resistor 100 kΩ -- o",
      "A1 : amp { plus = ground, minus = s, out = o }",
    ],
  },
  loop: {
    unit: "V",
    text: [
      "ground -- V1 : voltage at_x -- in",
      "G1 : gain { plus = y, minus = ground, out = half, ratio = 0.5 }",
      "sum -- L1 : law { volts = in.v + half.v } -- ground",
      "sum -- R1 : resistor 1 kΩ -- a",
      "a -- L2 : law { amps = 2 mA * tanh(L2.v / 0.3 V) + 0.1 mA * (L2.v / 1 V)^3 } -- ground",
      "y -- L3 : law { volts = a.v * exp(-(a.v / 1 V)^2) } -- ground",
    ],
  },
};

export interface Row {
  readonly circuit: string;
  readonly T: number;
  readonly at: number;
  readonly values: Readonly<Record<string, string | undefined>>;
}

/** The netlist of one circuit, swept over the values and temperatures of its rows. */
export function fullDevices(circuit: string, rows: readonly Row[]): string {
  const { unit, text } = CIRCUITS[circuit]!;
  const all = (of: (row: Row) => number) => [...new Set(rows.map(of))].map(String);
  const nets = Object.keys(rows[0]!.values);
  return lines(
    `title "All terms: ${circuit}"`,
    `knob at_x = ${rows[0]!.at} ${unit}`,
    ...text,
    `sweep at_x over ${listed(
      all(({ at }) => at),
      unit,
    )}`,
    `sweep temperature over ${listed(
      all(({ T }) => T),
      "K",
    )}`,
    `show ${nets.map((net) => `${net}.v`).join(", ")}`,
  );
}
