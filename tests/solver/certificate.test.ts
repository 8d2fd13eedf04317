import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile, type Job } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { System } from "@/lib/circuit/system";
import { Certificate } from "@/lib/solver/certificate";
import type { SparseShape } from "@/lib/solver/elimination";
import { Ladder } from "@/lib/solver/ladder";
import { LinearSolver } from "@/lib/solver/linear";

const EXAMPLES = [
  "diode-log-converter",
  "log-ratio-head",
  "one-quadrant-divider",
  "one-quadrant-multiplier",
  "square-root-extractor",
  "transistor-log-converter",
];

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}

const example = (name: string) => jobOf(readFileSync(`examples/${name}.swn`, "utf8"));

function median(values: Iterable<number>): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[sorted.length >> 1]!;
}

/** Solves the first point of a job, then gives what is needed to judge other states of it. */
function solved(job: Job) {
  const system = new System(job.design, job.circuit);
  const { kind } = new Ladder(system).solve(false);
  if (kind !== "converged") throw new Error(`The point is not solved: ${kind}.`);
  const { state, circuit } = system;
  const shape: SparseShape = { size: circuit.size, ...places(system) };
  const linear = new LinearSolver(shape, state.jacobian);
  const step = new Float64Array(circuit.size);
  /** Linearises at the present unknowns, as the solver does before it judges. */
  const judge = () => {
    system.settle();
    system.assemble();
    linear.solve(state.jacobian, state.residual, step);
    const certificate = new Certificate(system, linear);
    return certificate.prove();
  };
  return { system, judge };
}

function places({ pattern }: System) {
  return { rows: Int32Array.from(pattern.rows), columns: Int32Array.from(pattern.columns) };
}

describe("the certificate", () => {
  test.each(EXAMPLES)("proves every point of %s, to within 10 pV at the median", (name) => {
    const job = example(name);
    const { bound } = solveRange(job, 0, job.plan.points);
    expect([...bound].filter((radius) => !(radius > 0 && radius < 1e-9))).toEqual([]);
    expect(median(bound)).toBeLessThanOrEqual(10e-12);
  });

  test.each(EXAMPLES)("refuses an answer of %s that is planted 1 nV off, at every net", (name) => {
    const { system, judge } = solved(example(name));
    const { x } = system.state;
    expect(judge()).toBeLessThanOrEqual(1e-10);
    for (const [net, i] of system.circuit.nets) {
      if (net === "ground") continue;
      const right = x[i]!;
      x[i] = right + 1e-9;
      const bound = judge();
      x[i] = right;
      expect(bound, net).toBeNaN();
    }
  });

  test("holds the exact answer of a closed form", () => {
    // V = V_T·ln(1 + I/Is) at the exact SI constants (Shockley); I = 1 mA, Is = 1 fA, 25 °C, printed by mpmath at 50 digits.
    const exact = 0.7099121962174136;
    const { bound, unknowns } = solveRange(
      jobOf(`model d : diode { Is = 1 fA }
ground -- I1 : current 1 mA -- a -- D1 : d -- ground
show a.v`),
      0,
      1,
    );
    expect(bound[0]).toBeLessThanOrEqual(1e-14);
    expect(Math.abs(unknowns[0]![0]! - exact)).toBeLessThanOrEqual(bound[0]!);
  });

  test("is not much wider for a neighbour's weights and inverse, and never past 10 pV for them", () => {
    const job = example("square-root-extractor");
    const { bound } = solveRange(job, 0, job.plan.points);
    for (const point of [40, 90, 200]) {
      const system = new System(job.design, job.circuit);
      system.turn(job.plan.axes[0]!.knob, job.plan.axes[0]!.values[point]!);
      const alone = new Ladder(system).solve(false);
      if (alone.kind !== "converged") throw new Error("The point is not solved.");
      expect(bound[point]!).toBeLessThanOrEqual(Math.max(10e-12, 4 * alone.bound));
    }
  });

  test("costs no more than its entries for a thousand unknowns, and proves them", () => {
    const sections = Array.from(
      { length: 500 },
      (_, k) => `n${k} -- R${k} : resistor 10 Ω -- n${k + 1}\nn${k + 1} -- D${k} : d -- ground`,
    );
    const { bound } = solveRange(
      jobOf(`model d : diode { Is = 1 pA }
ground -- V1 : voltage 5 V -- n0
${sections.join("\n")}
show n500.v`),
      0,
      1,
    );
    expect(bound[0]).toBeLessThanOrEqual(10e-12);
  });

  test("is null where a part does not say how its slopes change", () => {
    const { system, judge } = solved(example("diode-log-converter"));
    expect(judge()).toBeGreaterThan(0);
    Object.defineProperty(system.parts[1], "proof", { value: undefined });
    expect(judge()).toBeNaN();
  });

  test("is null where solutions run together", () => {
    // An amplifier makes of R1 a negative resistance that cancels R2 and what two diodes take at rest: p = 0 becomes a triple root.
    const V_T = (1.380649e-23 * 298.15) / 1.602176634e-19;
    const textOf = (ohms: number) => `model d : diode { Is = 10 nA }
model amp : opamp { }
A1 : amp { plus = p, minus = n, out = out }
out -- RA : resistor 10 kΩ -- n -- RB : resistor 10 kΩ -- ground
out -- R1 : resistor 1 kΩ -- p -- R2 : resistor ${ohms} Ω -- ground
p -- D1 : d -- ground
ground -- D2 : d -- p
show p.v`;
    const boundOf = (ohms: number) => {
      const job = jobOf(textOf(ohms));
      const outcome = new Ladder(new System(job.design, job.circuit)).solve(false);
      return outcome.kind === "converged" ? outcome.bound : Number.NaN;
    };
    const conductance = 1e-3 - (2 * 10e-9) / V_T;
    expect(boundOf(1 / conductance)).toBeNaN();
    expect(boundOf(1.01 / conductance)).toBeLessThanOrEqual(1e-12);
    expect(boundOf(0.99 / conductance)).toBeLessThanOrEqual(1e-12);
  });

  test("proves a follower of a net that rounding leaves open by far more than its own knee is wide", () => {
    // 0.3 mA circulate in the lit diode, and what their rounding leaves meets 5 GΩ; times the gain it is volts.
    const { bound } = solveRange(
      jobOf(`model lit : diode { Is = 0.1 fA, n = 2, photocurrent = 0.3 mA, Rs = 100 Ω }
model amp : opamp { gain = 1e7, out_low = -5 V, out_high = 5 V }
ground -- R1 : resistor 5 GΩ -- x -- D1 : lit -- y -- R2 : resistor 30 GΩ -- ground
A1 : amp { plus = x, minus = f, out = f }
f -- R3 : resistor 10 kΩ -- ground
show f.v`),
      0,
      1,
    );
    expect(bound[0]).toBeGreaterThan(1e-9);
    expect(bound[0]).toBeLessThan(1e-6);
  });

  test.each([
    ["max(a.v / 1 V, 1.5 * a.v / 1 V)", "0 A", 0],
    ["abs(a.v / 1 V) + 3 * a.v / 1 V", "0 A", 0],
    ["tanh(a.v / 1 mV)", "2 mA", 1],
  ])(
    "proves a law at its kink, and where its slope is beyond the range of numbers: %s",
    (law, source, volts) => {
      const { bound, unknowns } = solveRange(
        jobOf(`ground -- I1 : current ${source} -- a -- R1 : resistor 1 kΩ -- ground
L1 : law { plus = a, minus = ground, amps = 1 mA * (${law}) }
show a.v`),
        0,
        1,
      );
      expect(bound[0]).toBeLessThanOrEqual(1e-12);
      expect(Math.abs(unknowns[0]![0]! - volts)).toBeLessThanOrEqual(bound[0]!);
    },
  );
});
