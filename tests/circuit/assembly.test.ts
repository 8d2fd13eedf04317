import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";

/** Assemblies after which code has taken over. */
const MANY = 2100;

function systemOf(text: string): System {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return new System(job.design, job.circuit);
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

/** Compares a system whose assembly has become code with one that has just begun, over several unknowns and linearisations. */
function expectSameBytes(text: string): void {
  const long = systemOf(text);
  for (let k = 0; k < MANY; k++) long.assemble();
  for (let turn = 0; turn < 6; turn++) {
    const fresh = systemOf(text);
    for (const system of [long, fresh]) {
      system.startCold();
      move(system, turn);
      if (turn % 2 === 1) system.settle();
      system.state.share = turn === 4 ? 0.3 : 1;
      system.assemble();
    }
    expect(left(long)).toBe(left(fresh));
    for (const system of [long, fresh]) {
      move(system, turn + 0.1);
      system.follow();
      system.assemble();
    }
    expect(left(long)).toBe(left(fresh));
  }
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

  test("follows a knob", () => {
    const text = `knob R = 1 kΩ
model q : npn { Is = 1 fA, beta_f = 100 }
ground -- V1 : voltage 5 V -- a -- R1 : resistor R -- c
Q1 : q { c = c, b = c, e = ground }
show c.v`;
    const long = systemOf(text);
    for (let k = 0; k < MANY; k++) long.assemble();
    const fresh = systemOf(text);
    for (const system of [long, fresh]) {
      system.turn("R", 3300);
      system.turn("temperature", 320);
      system.startCold();
      system.assemble();
    }
    expect(left(long)).toBe(left(fresh));
  });
});
