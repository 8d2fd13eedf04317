import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { GeneratedStep } from "@/lib/solver/kernel/generated";
import { LinearSolver } from "@/lib/solver/linear";
import { TriangularBounds } from "@/lib/solver/triangular";

/** A system that has just begun. */
function systemOf(text: string): System {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return new System(job.design, job.circuit);
}

/** The same with generated code, and the linear solver that has it. */
function generatedOf(
  text: string,
  isStraight: boolean,
): { system: System; generated: GeneratedStep; linear: LinearSolver } {
  const system = systemOf(text);
  system.startCold();
  system.assemble();
  const { pattern, state } = system;
  const shape = { size: pattern.size, rows: pattern.rows, columns: pattern.columns, units: pattern.units };
  const linear = new LinearSolver(shape, state.jacobian);
  const generated = GeneratedStep.of(system, shape, linear.samplePlan!, isStraight);
  if (generated === null) throw new Error("No code was generated.");
  linear.adopt(generated);
  return { system, generated, linear };
}

/** What an assembly leaves behind, to the bit. */
function left({ state, circuit: { size } }: System): string {
  const arrays = [
    state.residual.subarray(0, size),
    state.scale.subarray(0, size),
    state.jacobian.subarray(1),
  ];
  return arrays.map((array) => new BigUint64Array(array.slice().buffer).join()).join("|");
}

/** Unknowns from −0.9 to 0.9, different for each `turn`, with low parts. */
function move({ state }: System, turn: number): void {
  for (let j = 0; j < state.x.length - 1; j++) {
    state.x[j] = 0.9 * Math.sin(1 + 3 * j + turn);
    state.low[j] = 1e-17 * Math.cos(j + turn);
  }
}

/** Compares generated code, loops that know that they are at rest, and loops that do not, then the steps. */
function expectSameBytes(text: string, prepare: (system: System) => void = () => undefined): void {
  for (const isStraight of [true, false]) compare(text, isStraight, prepare);
}

function compare(text: string, isStraight: boolean, prepare: (system: System) => void): void {
  const { system, generated, linear } = generatedOf(text, isStraight);
  const listed = systemOf(text);
  const plain = systemOf(text);
  listed.startCold();
  listed.assemble();
  const apart = new LinearSolver(listed.pattern, listed.state.jacobian);
  const step = new Float64Array(listed.circuit.size);
  for (const one of [system, listed, plain]) prepare(one);
  for (let turn = 0; turn < 6; turn++) {
    for (const one of [system, listed, plain]) {
      move(one, turn);
      one.state.share = turn === 4 ? 0.3 : 1;
      one.settle();
    }
    system.assembleAtRest();
    listed.assembleAtRest();
    plain.assemble();
    expect(left(listed)).toBe(left(plain));
    expect(left(system)).toBe(left(plain));
    const { jacobian, residual } = listed.state;
    const isSolved = apart.solve(jacobian, residual, step);
    expect(linear.take(generated)).toBe(isSolved);
    expect(left(system)).toBe(left(plain));
    if (isSolved) expect(bits(generated.step)).toBe(bits(step));
    if (isSolved) expectSameBounds(linear, system);
    apart.solveAgain(residual, step);
    linear.solveAgain(system.state.residual, generated.step);
    if (isSolved) expect(bits(generated.step)).toBe(bits(step));
    apart.reset();
    linear.reset();
  }
}

/** Compares the bounds by generated code with those without. */
function expectSameBounds(linear: LinearSolver, { pattern, state }: System): void {
  const factors = linear.atHand!;
  const wave = (by: number) =>
    Float64Array.from({ length: pattern.size + 1 }, (_, i) => Math.exp(Math.sin(by * i + by) - 20));
  const [left, right] = [factors, { ...factors, generated: null }].map((each) => {
    const bounds = new TriangularBounds(pattern);
    bounds.use(each);
    bounds.bound(state.jacobian, wave(1), wave(2), wave(3), wave(4));
    return bits(bounds.error) + bits(bounds.change);
  });
  expect(left).toBe(right);
}

function bits(array: Float64Array): string {
  return new BigUint64Array(array.slice().buffer).join();
}

describe("an assembly that has become code", () => {
  const examples = readdirSync("examples").filter((name) => name.endsWith(".swn"));
  const solvable = examples
    .map((name) => ({ name, text: readFileSync(`examples/${name}`, "utf8") }))
    .filter(({ text }) => compile(text).job !== null);

  test.each(solvable)("leaves the same bytes: $name", ({ text }) => {
    expectSameBytes(text);
  });

  test("leaves the same bytes with every kind of part, simple and not", () => {
    expectSameBytes(`model d : diode { Is = 2 fA }
model lossy : diode { Is = 1 pA, Rs = 10 Ω, n = 1.5 }
model q : npn { Is = 1 fA, beta_f = 100, beta_r = 2, Va_f = 50 V, Va_r = 20 V }
model p : pnp { Is = 3 fA, beta_f = 60 }
model knee : npn { Is = 1 fA, beta_f = 80, I_knee_f = 1 mA }
model amp : opamp { gain = 1e5, offset = 1 mV, bias = 2 nA, R_out = 50 Ω }
model nullor : opamp { }
ground -- V1 : voltage 2 V -- a -- R1 : resistor 1 kΩ -- b -- D1 : d -- ground
b -- D2 : lossy -- c -- R2 : resistor 2 kΩ -- ground
ground -- I1 : current 10 µA -- c
Q1 : q { c = a, b = b, e = e1 }
e1 -- R3 : resistor 500 Ω -- ground
Q2 : p { c = c, b = b, e = a }
Q3 : knee { c = a, b = b, e = c }
A1 : amp { plus = b, minus = f, out = f }
A2 : nullor { plus = ground, minus = g, out = h }
f -- R4 : resistor 1 kΩ -- g -- R5 : resistor 3 kΩ -- h
show c.v`);
  });

  test("leaves the same bytes with terminals, gains, laws, limits and transistors deep in saturation", () => {
    expectSameBytes(`model q : npn { Is = 1 fA, beta_f = 100, R_collector = 20 Ω, R_base = 0.1 kΩ }
model s : npn { Is = 1 fA, beta_f = 100, Va_f = 40 V }
model amp : opamp { gain = 1e5, out_low = -10 V, out_high = 12 V }
ground -- V1 : voltage 2 V -- a -- R1 : resistor 1 kΩ -- b
Q1 : q { c = a, b = b, e = e1 }
e1 -- R3 : resistor 500 Ω -- ground
Q2 : s { c = b, b = a, e = ground }
Q3 : s { c = b, b = a, e = b }
G1 : gain { plus = b, minus = e1, out = g, ratio = 10 }
g -- R4 : resistor 1 kΩ -- h -- R5 : resistor 1 kΩ -- ground
A1 : amp { plus = h, minus = f, out = f }
f -- L1 : law { amps = 1 mA * tanh(f.v / 1 V) } -- ground
show b.v`);
  });

  test("follows a knob", () => {
    const text = `knob R = 1 kΩ
model q : npn { Is = 1 fA, beta_f = 100 }
ground -- V1 : voltage 5 V -- a -- R1 : resistor R -- c
Q1 : q { c = c, b = c, e = ground }
show c.v`;
    expectSameBytes(text, (system) => {
      system.turn("R", 3300);
      system.turn("temperature", 320);
    });
  });
});
