import { describe, expect, test } from "vitest";
import { compile, type Job } from "@/lib/analyses/compile";
import { across, advance, newState } from "@/lib/circuit/state";
import { System } from "@/lib/circuit/system";

/** One element of every kind, invented. */
const EVERY_KIND = `knob V = 3 V
knob I = 2 µA
let R = 10 kΩ * (V / 3 V)
model d : diode { Is = 1 fA, n = 1.2, Rs = 5 Ω, Eg = 1.11 V, x = 3 }
model qn : npn { Is = 2 fA, beta_f = 100, beta_r = 2, Va_f = 50 V, Va_r = 9 V, beta_power = 1.5 }
model qp : pnp { Is = 1 fA, beta_f = 60, Va_f = 30 V }
model amp : opamp { gain = 1e5, offset = 1 mV, bias = 10 nA }
model ideal : opamp { }
model lit : diode { Is = 1 nA, n = 1.5, Rs = 3 Ω, V_breakdown = 0.2 V, I_breakdown = 1 µA, n_breakdown = 4, photocurrent = 1 µA }
model full : npn {
  Is = 2 fA, beta_f = 100, beta_r = 2, Va_f = 50 V, I_leak_e = 1 pA, I_leak_c = 2 pA, n_leak_c = 1.5,
  I_knee_f = 10 nA, I_knee_r = 1 nA, R_base = 120 Ω, R_emitter = R / 1e4, R_collector = 0 Ω
}
model swing : opamp { gain = 3, offset = 1 mV, offset_drift = 2 µV/K, bias = 10 nA, bias_offset = 1 nA, R_out = 50 Ω, out_low = 0.1 V, out_high = 0.3 V }
ground -- V1 : voltage V -- a -- R1 : resistor R { drift = 100 ppm/K } -- b
b -- D1 : d -- c
ground -- I1 : current I -- c
Q1 : qn { c = a, b = c, e = f }
Q2 : qp { c = ground, b = f, e = b }
f -- R2 : resistor 1 kΩ -- ground
A1 : amp { plus = c, minus = g, out = g }
A2 : ideal { plus = g, minus = h, out = h }
h -- R3 : resistor 2 kΩ -- ground
b -- D2 : lit -- h
Q3 : full { c = a, b = c, e = k }
A3 : swing { plus = k, minus = c, out = m }
G1 : gain { plus = a, minus = k, out = n, ratio = -2 }
m -- L1 : law { amps = 1 mA * tanh(L1.v / 1 V) + 0.1 * Q2.e.i + R2.p / 1 V } -- n
L2 : law { plus = k, minus = h, volts = sqrt(1 V * a.v) + L2.i * 1 kΩ + Q3.b.i * R }
show R1.i`;

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}

function systemOf(text: string): System {
  const { design, circuit } = jobOf(text);
  return new System(design, circuit);
}

/** Some voltages at which no exponential rules the others. */
function disturb({ state, circuit }: System): void {
  for (let j = 0; j < circuit.size; j++) state.x[j] = 0.3 + 0.17 * Math.sin(7 * j + 1);
}

function residualAt(system: System): Float64Array {
  system.settle();
  system.assemble();
  return system.state.residual.slice();
}

describe("the unknowns", () => {
  test("are every net but ground, then every branch current, by the names of the language", () => {
    const { circuit } = jobOf(EVERY_KIND);
    expect(circuit.unknowns.map(({ name, unit }) => `${name} ${unit}`)).toEqual([
      ...["a.v V", "b.v V", "c.v V", "f.v V", "g.v V", "h.v V", "k.v V", "m.v V", "n.v V"],
      // A resistance of plain 0 Ω has no net of its own, nor has the current of a law that is an unknown already.
      ...["Q2.e_inner.v V", "R2.left_inner.v V", "Q3.b_inner.v V", "Q3.e_inner.v V"],
      ...["V1.i A", "A1.out.i A", "A2.out.i A", "A3.out.i A", "G1.out.i A", "L2.i A"],
      ...["Q2.e.i A", "R2.i A", "Q3.b.i A", "Q3.e.i A"],
    ]);
    expect(circuit.nets.get("ground")).toBe(circuit.size);
  });
});

describe("the modified nodal system", () => {
  test("lets no current appear or vanish: the currents leaving all nets and ground add up to nothing", () => {
    const system = systemOf(EVERY_KIND);
    disturb(system);
    const residual = residualAt(system);
    const { unknowns, size } = system.circuit;
    const nets = [...unknowns.keys()].filter((i) => unknowns[i]!.unit === "V").concat(size);
    const sum = nets.reduce((total, i) => total + residual[i]!, 0);
    const most = Math.max(...nets.map((i) => system.state.scale[i]!));
    expect(Math.abs(sum)).toBeLessThanOrEqual(1e-15 * most * nets.length);
  });

  test("has the slopes of its own residual, by differences", () => {
    const system = systemOf(EVERY_KIND);
    const { state, circuit, pattern } = system;
    disturb(system);
    residualAt(system);
    const slopes = state.jacobian.slice();
    const dense = Array.from({ length: circuit.size }, () => new Float64Array(circuit.size));
    slopes.forEach((value, k) => {
      if (k > 0) dense[pattern.rows[k]!]![pattern.columns[k]!] = value;
    });
    const h = 1e-6;
    for (let j = 0; j < circuit.size; j++) {
      const at = state.x[j]!;
      state.x[j] = at + h;
      const above = residualAt(system);
      state.x[j] = at - h;
      const below = residualAt(system);
      state.x[j] = at;
      for (let i = 0; i < circuit.size; i++) {
        const difference = (above[i]! - below[i]!) / (2 * h);
        const slope = dense[i]![j]!;
        // Central differences are off by h²/6 of the third derivative, (1/V_T)² of the slope, and by rounding over h.
        expect(Math.abs(difference - slope), `row ${i}, column ${j}`).toBeLessThanOrEqual(
          1e-8 * Math.abs(slope) + (1e-14 * (state.scale[i]! + 1e-6)) / h,
        );
      }
    }
  });

  test("is the same after a knob has been turned away and back, and follows it through a let", () => {
    const system = systemOf(EVERY_KIND);
    disturb(system);
    const before = residualAt(system);
    system.turn("V", 6);
    system.turn("temperature", 320);
    const turned = residualAt(system);
    expect([...turned]).not.toEqual([...before]);
    const fresh = systemOf(
      EVERY_KIND.replace("knob V = 3 V", "knob V = 6 V\nknob temperature = 320 K").replace(
        "knob I",
        "knob I",
      ),
    );
    disturb(fresh);
    expect([...residualAt(fresh)]).toEqual([...turned]);
    system.turn("V", 3);
    system.turn("temperature", 298.15);
    expect([...residualAt(system)]).toEqual([...before]);
  });

  test("lets values follow the temperature through V_T, through a let too", () => {
    const system = systemOf(`knob k = 2
let twice = k * V_T
ground -- V1 : voltage twice -- a -- R1 : resistor 1 kΩ -- ground
ground -- V2 : voltage V_T -- b -- R2 : resistor 1 kΩ -- ground
show a.v, b.v`);
    const [one, two] = ["V1", "V2"].map((name) => system.circuit.branches.get(name)!) as [number, number];
    // With every unknown at 0 the mismatch of a voltage element is −V; V_T = kT/q by the exact SI values.
    const perKelvin = 1.380649e-23 / 1.602176634e-19;
    for (const kelvin of [298.15, 350, 77]) {
      system.turn("temperature", kelvin);
      const residual = residualAt(system);
      expect(residual[one]).toBeCloseTo(-2 * perKelvin * kelvin, 16);
      expect(residual[two]).toBeCloseTo(-perKelvin * kelvin, 16);
    }
  });

  test("measures currents into pins, so that those of a part add up to nothing", () => {
    const system = systemOf(EVERY_KIND);
    disturb(system);
    const pin = (element: string, name: string) => system.signal({ of: "pin", element, pin: name });
    for (const element of ["Q1", "Q2"]) {
      const [c, b, e] = ["c", "b", "e"].map((name) => pin(element, name)) as [number, number, number];
      expect(Math.abs(c + b + e)).toBeLessThanOrEqual(1e-15 * Math.abs(e));
      expect(c).not.toBe(0);
    }
    for (const [element, from, to] of [
      ["R1", "left", "right"],
      ["V1", "left", "right"],
      ["I1", "left", "right"],
      ["D1", "anode", "cathode"],
    ] as const) {
      expect(pin(element, from)).toBe(-pin(element, to));
      expect(system.signal({ of: "element", element, quantity: "i" })).toBe(pin(element, from));
    }
    expect(pin("A1", "plus")).toBe(1e-8);
    expect(pin("A1", "out")).toBe(system.state.x[system.circuit.branches.get("A1")!]);
  });

  test("measures an element's voltage from left to right, and the power that it takes up", () => {
    const system = systemOf("ground -- V1 : voltage 2 V -- a -- R1 : resistor 4 Ω -- ground");
    const [a, i] = [system.circuit.nets.get("a")!, system.circuit.branches.get("V1")!];
    system.state.x[a] = 2;
    system.state.x[i] = 0.5;
    const read = (element: string) =>
      (["v", "i", "p"] as const).map((quantity) => system.signal({ of: "element", element, quantity }));
    expect(read("R1")).toEqual([2, 0.5, 1]);
    // The source gives 1 W, so it takes up −1 W.
    expect(read("V1")).toEqual([-2, 0.5, -1]);
  });
});

describe("the unknowns as sums of two numbers", () => {
  test("keep what one number would lose", () => {
    const state = newState(2, 1);
    advance(state, Float64Array.of(10, 10));
    advance(state, Float64Array.of(3e-22, 1e-22));
    expect(state.x[0]).toBe(10);
    expect(across(state, 0, 1)).toBeCloseTo(2e-22, 36);
  });

  test("stay apart from ground, which is 0", () => {
    const state = newState(1, 1);
    advance(state, Float64Array.of(0.1));
    advance(state, Float64Array.of(0.2));
    // 0.1 + 0.2 rounds up by 2.8e-17 (binary64, exact in 60 bits), which the sum keeps.
    expect([state.x[0], state.low[0], state.x[1]]).toEqual([0.30000000000000004, -2.7755575615628914e-17, 0]);
  });
});
