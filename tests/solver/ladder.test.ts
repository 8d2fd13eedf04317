import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Ladder } from "@/lib/solver/ladder";

function systemOf(text: string): System {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return new System(job.design, job.circuit);
}

/** Every aid is off: the sources act whole and every junction is linearised where it is. */
function expectNoAid({ state, junctions }: System): void {
  expect(state.share).toBe(1);
  for (const junction of junctions) expect(junction.apart(state)).toBe(0);
}

const LOG_CONVERTER = `knob I_in = 1 mA
model d : diode { Is = 2 fA, Rs = 2 Ω }
model amp : opamp { gain = 1e6, bias = 20 pA }
ground -- IS : current I_in -- sum -- D1 : d -- out
A1 : amp { plus = ground, minus = sum, out = out }
show out.v`;

/** Three transistors that hold each other barely open: from a cold start Newton's method goes round in circles. */
const TANGLE = `model qp : pnp { Is = 2 fA, beta_f = 50, beta_r = 1, Va_f = 40 V }
ground -- V1 : voltage 10 V -- vcc
Q0 : qp { c = n1, b = b0, e = e0 }
b0 -- RB0 : resistor 50 kΩ -- ground
e0 -- RE0 : resistor 3.3 kΩ -- n2
Q1 : qp { c = n1, b = b1, e = e1 }
b1 -- RB1 : resistor 340 Ω -- n0
e1 -- RE1 : resistor 9.6 kΩ -- n1
Q4 : qp { c = n2, b = b4, e = e4 }
b4 -- RB4 : resistor 930 Ω -- vcc
e4 -- RE4 : resistor 73 Ω -- n0
show n1.v`;

/** A log converter whose input current runs the wrong way: no operating point exists. */
const REVERSED = `model q : npn { Is = 0.4 fA }
model amp : opamp { }
ground -- I1 : current -10 µA -- sum
sum -- R1 : resistor 1 MΩ -- ground
Q1 : q { c = sum, b = ground, e = out }
A1 : amp { plus = ground, minus = sum, out = out }
show out.v`;

describe("the ladder", () => {
  test("solves a first point by Newton's method from a cold start, and its neighbour from there", () => {
    const system = systemOf(LOG_CONVERTER);
    const ladder = new Ladder(system);
    const cold = ladder.solve(false);
    expect(cold).toMatchObject({ kind: "converged", rung: "newton" });
    expectNoAid(system);
    system.turn("I_in", 1.001e-3);
    const warm = ladder.solve(true);
    expect(warm).toMatchObject({ kind: "converged", rung: "warm start" });
    expect(warm.iterations).toBeLessThanOrEqual(cold.iterations);
    expectNoAid(system);
  });

  test("starts cold where the neighbour leads nowhere", () => {
    const system = systemOf(LOG_CONVERTER);
    const ladder = new Ladder(system);
    ladder.solve(false);
    const solved = system.state.x.slice();
    system.state.x.fill(1e4);
    const outcome = ladder.solve(true);
    expect(outcome).toMatchObject({ kind: "converged" });
    solved.forEach((value, j) => {
      expect(Math.abs(system.state.x[j]! - value)).toBeLessThanOrEqual(1e-14 * Math.abs(value));
    });
  });

  test("shortens the steps where Newton's method from a cold start does not settle", () => {
    const system = systemOf(TANGLE);
    const outcome = new Ladder(system).solve(false);
    expect(outcome).toMatchObject({ kind: "converged", rung: "line search" });
    expectNoAid(system);
    // A cold start was spent before, and not much on it.
    expect(outcome.iterations).toBeGreaterThan(10);
    expect(outcome.iterations).toBeLessThan(250);
  });

  test("knows a net at 10 V well enough for a picoampere through an ohm", () => {
    // One number knows 10 V to 1.8e-15 V, which through 1 Ω is a thousandth of the current.
    const system = systemOf(`model d : diode { Is = 1 pA }
ground -- V1 : voltage 10 V -- a -- R1 : resistor 1 Ω -- b
ground -- D1 : d -- b
show R1.i`);
    expect(new Ladder(system).solve(false).kind).toBe("converged");
    const current = system.signal({ of: "element", element: "R1", quantity: "i" });
    expect(Math.abs(current / 1e-12 - 1)).toBeLessThanOrEqual(1e-12);
  });

  test("leaves no more current over at any net than a ten-billionth of what flows there", () => {
    for (const text of [LOG_CONVERTER, TANGLE]) {
      const system = systemOf(text);
      new Ladder(system).solve(false);
      system.settle();
      system.assemble();
      const { residual, scale } = system.state;
      for (let i = 0; i < system.circuit.size; i++) {
        expect(Math.abs(residual[i]!)).toBeLessThanOrEqual(1e-10 * scale[i]! + 1e-18);
      }
    }
  });
});

describe("a point that cannot be solved", () => {
  test("ends, and names the net and the element that would not settle", () => {
    const outcome = new Ladder(systemOf(REVERSED)).solve(false);
    expect(outcome).toMatchObject({ kind: "came to a stand", rung: "source ramp" });
    if (outcome.kind === "converged") return;
    expect(outcome.unsettled[0]).toBe("out");
    expect(outcome.unsettled).toContain("Q1");
    expect(outcome.unsettled.length).toBeLessThanOrEqual(5);
    expect(outcome.iterations).toBeLessThan(2500);
  });

  test("does not spoil the next one", () => {
    const system = systemOf(
      REVERSED.replace("current -10 µA", "current I").replace("model q", "knob I = 1 µA\nmodel q"),
    );
    const ladder = new Ladder(system);
    ladder.solve(false);
    const alone = system.state.x.slice();
    system.turn("I", -1e-6);
    expect(ladder.solve(true).kind).not.toBe("converged");
    system.turn("I", 1e-6);
    expect(ladder.solve(false).kind).toBe("converged");
    expect([...system.state.x]).toEqual([...alone]);
  });

  test("is not finite where a figure is not", () => {
    const system = systemOf(`knob V = 1 V
ground -- V1 : voltage V -- a -- R1 : resistor 1 kΩ * (V / 1 V) -- b -- R2 : resistor 1 kΩ -- ground
show b.v`);
    const ladder = new Ladder(system);
    expect(ladder.solve(false).kind).toBe("converged");
    system.turn("V", 0);
    const outcome = ladder.solve(true);
    expect(outcome.kind).toBe("out of bounds");
    if (outcome.kind !== "converged") expect(outcome.unsettled).toContain("a");
  });

  test("fails where a knob leads a parameter out of its bounds", () => {
    const system = systemOf(`knob n = 1
model d : diode { Is = 1 fA, n = n }
ground -- V1 : voltage 1 V -- a -- R1 : resistor 1 kΩ -- b -- D1 : d -- ground
show b.v`);
    const ladder = new Ladder(system);
    expect(ladder.solve(false).kind).toBe("converged");
    system.turn("n", -1);
    const outcome = ladder.solve(false);
    expect(outcome.kind).toBe("out of bounds");
    if (outcome.kind !== "converged") expect(outcome.unsettled).toContain("D1");
  });

  test("is singular where two conductances cancel, and names the net that floats", () => {
    const system = systemOf(`knob k = 1
ground -- V1 : voltage 1 V -- a -- R1 : resistor 1 kΩ -- b -- R2 : resistor 2 kΩ -- ground
b -- R3 : resistor 1 MΩ -- c -- R4 : resistor 1 MΩ * k -- b
show c.v`);
    const ladder = new Ladder(system);
    expect(ladder.solve(false).kind).toBe("converged");
    system.turn("k", -1);
    const outcome = ladder.solve(true);
    expect(outcome.kind).toBe("undetermined");
    if (outcome.kind !== "converged") expect(outcome.unsettled.slice(0, 1)).toEqual(["c"]);
  });
});
