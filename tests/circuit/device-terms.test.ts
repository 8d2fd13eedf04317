import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { thermalVoltage } from "@/lib/units/constants";
import { close, solved } from "./solved";

const V_T = thermalVoltage(298.15);

describe("terms of the diode, by the law solved for its voltage", () => {
  test("a reverse current of I stands at V_b + n_b·V_T·ln(I/I_b)", () => {
    const { "k.v": volts } = solved(`knob I = 1 mA
model z : diode { Is = 1e-30 A, V_breakdown = 6.2 V, I_breakdown = 10 µA, n_breakdown = 3 }
ground -- I1 : current I -- k
D1 : z { anode = ground, cathode = k }
sweep I over 1 nA, 10 µA, 1 mA, 100 mA
show k.v`);
    for (const [k, I] of [1e-9, 1e-5, 1e-3, 0.1].entries())
      close(volts![k]!, 6.2 + 3 * V_T * Math.log(I / 1e-5));
  });

  test("a clipper of two breakdown diodes back to back is odd", () => {
    const { "o.v": volts } = solved(`knob V = 0 V
model z : diode { Is = 1 fA, V_breakdown = 5.1 V, I_breakdown = 1 mA, n_breakdown = 2, Rs = 3 Ω }
ground -- V1 : voltage V -- a -- R1 : resistor 1 kΩ -- o
o -- D1 : z -- m
D2 : z { anode = ground, cathode = m }
sweep V from -40 V to 40 V, 41 points
show o.v`);
    for (let k = 0; k < 20; k++) close(volts![k]!, -volts![40 - k]!);
    expect(volts![40]!).toBeGreaterThan(5.5);
    expect(volts![40]!).toBeLessThan(6.5);
  });

  test("light opens an idle junction to n·V_T·ln(1 + I_photo/Is), and all of it flows through a short", () => {
    const open = solved(`model lit : diode { Is = 2 pA, n = 1.3, photocurrent = 30 mA, Rs = 2 Ω }
a -- D1 : lit -- ground
a -- I1 : current 0 A -- ground
show a.v, D1.i, D1.p`);
    close(open["a.v"]![0]! / (1.3 * V_T * Math.log1p(0.03 / 2e-12)), 1);
    const short = solved(`model lit : diode { Is = 2 pA, n = 1.3, photocurrent = 30 mA }
a -- D1 : lit -- ground
a -- V1 : voltage 1 mV -- ground
show D1.i`);
    close(short["D1.i"]![0]!, 2e-12 * Math.expm1(-1e-3 / (1.3 * V_T)) - 0.03);
  });
});

describe("terms of the transistor", () => {
  test("terminal resistances add I_c·R_e + I_b·(R_b + R_e) to the base, and their nets are unknowns by name", () => {
    const text = `model q : npn { Is = 1 fA, beta_f = 50, R_base = 200 Ω, R_emitter = 3 Ω, R_collector = 20 Ω }
ground -- I1 : current 20 µA -- b
ground -- V1 : voltage 5 V -- c
Q1 : q { c = c, b = b, e = ground }
show b.v, Q1.c.i, Q1.b.i, Q1.e.i`;
    const { "b.v": base, "Q1.c.i": c, "Q1.e.i": e } = solved(text);
    // By hand: I_c = 50·20 µA with the junction v_bc far reversed, V_be = V_T·ln(1 + I_c/Is).
    close(c![0]!, 1e-3);
    close(e![0]!, -1.02e-3);
    close(base![0]!, V_T * Math.log(1 + 1e-3 / 1e-15) + 20e-6 * 200 + 1.02e-3 * 3);
    const names = compile(text).job!.plan.unknowns.map(({ name }) => name);
    expect(names).toEqual([
      ...["b.v", "c.v", "Q1.c_inner.v", "Q1.b_inner.v", "Q1.e_inner.v"],
      ...["V1.i", "Q1.c.i", "Q1.b.i", "Q1.e.i"],
    ]);
  });

  test("leakage rules the base current at low voltage by its own ideality, and beta_f at high", () => {
    const { ib, vbe } = solved(`knob V = 0.5 V
model q : npn { Is = 1 fA, beta_f = 100, I_leak_e = 10 pA, n_leak_e = 1.8 }
ground -- V1 : voltage V -- b
ground -- V2 : voltage 5 V -- c
Q1 : q { c = c, b = b, e = ground }
sweep V over 0.2 V, 0.4 V, 0.6 V, 0.8 V
show ib = Q1.b.i, vbe = b.v`) as { ib: number[]; vbe: number[] };
    for (const [k, v] of vbe.entries()) {
      close(ib[k]!, (1e-15 / 100) * Math.expm1(v / V_T) + 1e-11 * Math.expm1(v / (1.8 * V_T)));
    }
  });

  test("at its knee current a transistor's ideal current has fallen by (√5 − 1)/2", () => {
    // q_b² = q_b + q_2 with q_2 = 1 where the ideal current is the knee current: q_b = (1 + √5)/2.
    const { "Q1.c.i": ic } = solved(`model q : npn { Is = 1 fA, I_knee_f = 2 mA }
ground -- V1 : voltage V_T * ln(1 + 2 mA / 1 fA) -- b
ground -- V2 : voltage 5 V -- c
Q1 : q { c = c, b = b, e = ground }
show Q1.c.i`);
    close(ic![0]! / ((2e-3 * (Math.sqrt(5) - 1)) / 2), 1);
  });

  test("a pnp is the npn with every sign reversed", () => {
    const full =
      "Is = 1 fA, beta_f = 90, beta_r = 2, Va_f = 40 V, I_leak_e = 1 pA, I_leak_c = 2 pA, I_knee_f = 1 mA, R_base = 50 Ω, R_emitter = 1 Ω, R_collector = 9 Ω";
    const circuit = (kind: string, sign: string) => `knob I = 1 µA
model q : ${kind} { ${full} }
ground -- I1 : current ${sign}I -- b
ground -- V1 : voltage ${sign}3 V -- s -- R1 : resistor 1 kΩ -- c
Q1 : q { c = c, b = b, e = ground }
sweep I over 1 nA, 1 µA, 100 µA
show b.v, c.v, Q1.c.i`;
    const [npn, pnp] = [solved(circuit("npn", "")), solved(circuit("pnp", "-"))];
    for (const [name, values] of Object.entries(npn)) {
      expect(pnp[name]!.map((value) => -value)).toEqual(values);
    }
  });
});

describe("terms of the amplifier", () => {
  test("its output resistance and gain make a follower's resistance R_out/(1 + A)", () => {
    const { "o.v": volts } = solved(`knob I = 0 A
model amp : opamp { gain = 1000, R_out = 50 Ω }
ground -- V1 : voltage 1 V -- p
A1 : amp { plus = p, minus = o, out = o }
o -- I1 : current I -- ground
sweep I over 0 A, 10 mA
show o.v`);
    close(volts![0]!, 1000 / 1001);
    close((volts![0]! - volts![1]!) / 0.01, 50 / 1001);
  });

  test("bias and its difference flow into the inputs, half of the difference each, and the offset drifts from 25 °C", () => {
    const { plus, minus, out } = solved(`knob T = 25 °C
model amp : opamp { gain = 1e9, offset = 1 mV, offset_drift = 2 µV/K, bias = 10 nA, bias_offset = 4 nA }
A1 : amp { plus = p, minus = o, out = o }
p -- R1 : resistor 1 MΩ -- ground
sweep temperature over 25 °C, 75 °C
show plus = A1.plus.i, minus = A1.minus.i, out = o.v`) as { plus: number[]; minus: number[]; out: number[] };
    close(plus[0]!, 12e-9);
    close(minus[0]!, 8e-9);
    // −12 nA · 1 MΩ + 1 mV, then 100 µV more over 50 K; the gain leaves 1e-9 of it.
    expect(out[0]!).toBeCloseTo(-0.012 + 1e-3, 10);
    expect(out[1]! - out[0]!).toBeCloseTo(1e-4, 12);
  });

  test("the offset holds at the T0 of its model, and drifts from there", () => {
    const { out } = solved(`model amp : opamp { gain = 1e9, offset = 1 mV, offset_drift = 2 µV/K, T0 = 45 °C }
A1 : amp { plus = p, minus = o, out = o }
p -- R1 : resistor 1 MΩ -- ground
sweep temperature over 45 °C, 25 °C
show out = o.v`) as { out: number[] };
    // 1 mV at 45 °C, 2 µV/K · 20 K less at 25 °C, by hand; the gain leaves 1e-9 of it.
    expect(out[0]!).toBeCloseTo(1e-3, 10);
    expect(out[1]! - out[0]!).toBeCloseTo(-4e-5, 12);
  });

  test("an output never passes its limits, and reaches them from either side", () => {
    const { "o.v": volts } = solved(`knob V = 0 V
model amp : opamp { gain = 1e6, out_low = -3 V, out_high = 8 V }
ground -- V1 : voltage V -- p
A1 : amp { plus = p, minus = m, out = o }
o -- R1 : resistor 9 kΩ -- m -- R2 : resistor 1 kΩ -- ground
sweep V from -2 V to 2 V, 81 points
show o.v`);
    for (const [k, volt] of volts!.entries()) {
      const asked = 10 * (-2 + k / 20);
      expect(volt).toBeGreaterThanOrEqual(-3);
      expect(volt).toBeLessThanOrEqual(8);
      if (asked > -2.4 && asked < 7.4) expect(Math.abs(volt - asked)).toBeLessThan(1e-4);
      if (asked < -3.5) expect(volt).toBe(-3);
      if (asked > 8.5) expect(volt).toBe(8);
    }
  });

  test("a comparator with positive feedback rests at its limits and turns at the voltages that its divider sets", () => {
    const circuit = (sweep: string) => `knob V = 0 V
model amp : opamp { gain = 1e5, out_low = -10 V, out_high = 10 V }
ground -- V1 : voltage V -- x
A1 : amp { plus = p, minus = x, out = o }
o -- R1 : resistor 30 kΩ -- p -- R2 : resistor 10 kΩ -- ground
${sweep}
show x.v, o.v`;
    const up = solved(circuit("sweep V from -5 V to 5 V, 101 points"));
    const down = solved(circuit("sweep V from 5 V to -5 V, 101 points"));
    // The divider gives a quarter of ±10 V.
    const turning = ({ "x.v": x, "o.v": o }: Record<string, number[]>) =>
      x![o!.findIndex((volt) => Math.sign(volt) !== Math.sign(o![0]!))]!;
    expect(turning(up)).toBeCloseTo(2.5, 0);
    expect(turning(down)).toBeCloseTo(-2.5, 0);
    expect(up["o.v"]!.every((volt) => Math.abs(Math.abs(volt) - 10) < 0.5)).toBe(true);
  });
});
