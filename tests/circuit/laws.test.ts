import { describe, expect, test } from "vitest";
import { thermalVoltage } from "@/lib/units/constants";
import { close, solved } from "./solved";

const V_T = thermalVoltage(298.15);

describe("a law", () => {
  test("of Shockley's expression is Shockley's diode, from reverse to where a naive step overflows", () => {
    const circuit = (device: string) => `knob V = 1 V
model plain : diode { Is = 1 fA }
ground -- V1 : voltage V -- a -- R1 : resistor 1 kΩ -- d
${device}
sweep V over -20 V, -1 V, 0 V, 0.3 V, 1 V, 30 V, 1 kV
show d.v, i = R1.i`;
    const law = solved(circuit("D1 : law { plus = d, minus = ground, amps = 1 fA * (exp(D1.v / V_T) - 1) }"));
    const diode = solved(circuit("D1 : plain { anode = d, cathode = ground }"));
    for (const [name, values] of Object.entries(diode))
      for (const [k, value] of values.entries()) close(law[name]![k]!, value);
  });

  test("of volts holds the voltage of plus above minus, and its current runs from plus to minus through it", () => {
    const {
      "a.v": a,
      "L1.v": v,
      "L1.i": i,
      "L1.p": p,
    } = solved(`ground -- V1 : voltage 3 V -- in -- R1 : resistor 1 kΩ -- a
L1 : law { plus = a, minus = ground, volts = 2 V }
show a.v, L1.v, L1.i, L1.p`);
    close(a![0]!, 2);
    close(v![0]!, 2);
    close(i![0]!, 1e-3);
    close(p![0]!, 2e-3);
  });

  test("stands on a path as any element, plus on the left", () => {
    const { "a.v": a, "L1.i": i } =
      solved(`ground -- L1 : law { amps = 1 mA } -- a -- R1 : resistor 1 kΩ -- ground
show a.v, L1.i`);
    close(a![0]!, 1);
    close(i![0]!, 1e-3);
  });

  test("with a logarithm starts where the logarithm has a value, though every net starts at 0 V", () => {
    const { "o.v": o, "in.v": x } = solved(`knob V = 1 V
ground -- V1 : voltage V -- in -- R1 : resistor 1 kΩ -- ground
o -- L1 : law { volts = 0.1 V * ln(in.v / 1 mV) + 1 V / sqrt(in.v / 1 V) } -- ground
o -- R2 : resistor 1 kΩ -- ground
sweep V from 1 µV to 100 V, 1 per decade
show in.v, o.v`);
    for (const [k, v] of x!.entries()) close(o![k]!, 0.1 * Math.log(v / 1e-3) + 1 / Math.sqrt(v));
  });

  test("may name its own voltage, as a divider in a loop does: the root of the mean square of a constant", () => {
    const { "o.v": o, "in.v": x } = solved(`knob V = 1 V
ground -- V1 : voltage V -- in -- R1 : resistor 1 kΩ -- ground
o -- L1 : law { volts = in.v * in.v / L1.v } -- ground
o -- R2 : resistor 1 kΩ -- ground
sweep V from 1 mV to 10 V, 2 per decade
show in.v, o.v`);
    for (const [k, v] of x!.entries()) close(Math.abs(o![k]!), v);
  });

  test("reads currents and powers that are no unknowns without a law", () => {
    const found = solved(`model q : npn { Is = 1 fA, beta_f = 100 }
ground -- V1 : voltage 5 V -- c
ground -- I1 : current 10 µA -- b
Q1 : q { c = c, b = b, e = e }
e -- R1 : resistor 100 Ω -- ground
L1 : law { plus = x, minus = ground, volts = 1 kΩ * Q1.c.i + 2 kΩ * Q1.b.i - 3 kΩ * Q1.e.i + 4 kΩ * R1.i + 5 kΩ * I1.i }
x -- R2 : resistor 1 kΩ -- ground
L2 : law { plus = y, minus = ground, volts = 1 V * (R1.p / 1 mW) + 2 V * (V1.p / 1 mW) }
y -- R3 : resistor 1 kΩ -- ground
show x.v, y.v, c = Q1.c.i`);
    // By hand: I_c = 1 mA, I_b = 10 µA, I_e = −1.01 mA; R1 carries 1.01 mA, V1 gives 5 mW.
    close(found.c![0]!, 1e-3);
    close(found["x.v"]![0]!, 1 + 0.02 + 3.03 + 4.04 + 0.05);
    close(found["y.v"]![0]!, 0.10201 * 1e-3 * 1e3 - 10);
  });

  test("follows V_T and its values as knobs turn", () => {
    const { "o.v": o } = solved(`knob I = 1 µA
let Io = 1 fA
ground -- I1 : current I -- a -- R1 : resistor 1 kΩ -- ground
o -- L1 : law { volts = V_T * ln(R1.i / Io) } -- ground
o -- R2 : resistor 1 kΩ -- ground
sweep I over 1 nA, 1 mA
sweep temperature over 25 °C, 90 °C
show o.v`);
    const wanted = [298.15, 363.15].flatMap((T) =>
      [1e-9, 1e-3].map((I) => thermalVoltage(T) * Math.log(I / 1e-15)),
    );
    for (const [k, value] of wanted.entries()) close(o![k]!, value);
  });

  test("limits as a chain of stages does, each tanh of the one before", () => {
    const { "a.v": a, "c.v": c } = solved(`knob V = 1 V
ground -- V1 : voltage V -- a -- R0 : resistor 1 kΩ -- ground
b -- L1 : law { volts = 1 V * tanh(8 * a.v / 1 V) } -- ground
c -- L2 : law { volts = 1 V * tanh(8 * b.v / 1 V) } -- ground
b -- R1 : resistor 1 kΩ -- ground
c -- R2 : resistor 1 kΩ -- ground
sweep V over -20 V, -0.1 V, 1 mV, 0.02 V, 3 V
show a.v, c.v`);
    for (const [k, v] of a!.entries()) close(c![k]!, Math.tanh(8 * Math.tanh(8 * v)));
  });
});

describe("a gain", () => {
  test("drives its output to its ratio times the difference of its inputs, which take nothing", () => {
    const found = solved(`knob V = 1 V
ground -- V1 : voltage V -- a -- R1 : resistor 1 MΩ -- p
p -- R2 : resistor 1 MΩ -- ground
ground -- V2 : voltage 0.25 V -- m
G1 : gain { plus = p, minus = m, out = o, ratio = -4 }
o -- R3 : resistor 500 Ω -- ground
sweep V over -1 V, 0 V, 2 V
show o.v, G1.out.i, G1.plus.i`);
    for (const [k, V] of [-1, 0, 2].entries()) {
      close(found["o.v"]![k]!, -4 * (V / 2 - 0.25));
      close(found["G1.out.i"]![k]!, (4 * (V / 2 - 0.25)) / 500);
      expect(found["G1.plus.i"]![k]).toBe(0);
    }
  });

  test("takes its ratio from a knob", () => {
    const { "o.v": o } = solved(`knob k = 1
ground -- V1 : voltage 2 V -- a
G1 : gain { plus = a, minus = ground, out = o, ratio = k }
o -- R3 : resistor 500 Ω -- ground
a -- R4 : resistor 500 Ω -- ground
sweep k over -1, 0, 3
show o.v`);
    expect(o).toEqual([-2, 0, 6]);
  });
});

describe("signals inside blocks", () => {
  test("have the dotted names of the instance, in laws and in traces", () => {
    const found = solved(`block stage(in, out) {
  knob R = 1 kΩ
  in -- R1 : resistor R -- x
  x -- R2 : resistor R -- out
  Q : junction { c = x, b = x, e = out }
  model junction : npn { Is = 1e-30 A, beta_f = 100 }
}
ground -- V1 : voltage 2 V -- a
S : stage { in = a, out = ground, R = 2 kΩ }
L1 : law { plus = y, minus = ground, volts = S.x.v + 1 kΩ * S.Q.c.i + 1 kΩ * S.R1.i }
y -- R3 : resistor 1 kΩ -- ground
show S.x.v, S.R1.i, S.R1.v, S.R1.p, S.Q.c.i, y.v`);
    const one = (name: string) => found[name]![0]!;
    close(one("S.R1.v"), 2 - one("S.x.v"));
    close(one("S.R1.i"), one("S.R1.v") / 2e3);
    close(one("S.R1.p"), one("S.R1.v") * one("S.R1.i"));
    close(one("S.Q.c.i"), 1e-30 * Math.expm1(one("S.x.v") / V_T));
    close(one("y.v"), one("S.x.v") + 1e3 * one("S.Q.c.i") + 1e3 * one("S.R1.i"));
  });
});
