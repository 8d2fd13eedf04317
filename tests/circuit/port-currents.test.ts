import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";

const TEXT = `model q : npn { Is = 1 fA, beta_f = 100 }
model amp : opamp { bias = 10 nA }
block half(a, b) {
  a -- R : resistor 2 kΩ -- b
  a -- S : resistor 2 kΩ -- ground
}
block log_stage(in, out) {
  Q : q { c = in, b = ground, e = out }
  A : amp { plus = ground, minus = in, out = out }
  H : half { a = out, b = in }
}
block idle(x, y) {
  x -- R : resistor 1 kΩ -- ground
  y -- R2 : resistor 1 kΩ -- ground
}
ground -- I1 : current 1 mA -- s
S : log_stage { in = s, out = o }
o -- R1 : resistor 10 kΩ -- ground
L1 : law { plus = k, minus = ground, volts = S.in.i * 1 kΩ }
T : idle { x = k, y = k }
show S.in.i, S.out.i, S.H.a.i, S.H.b.i, T.x.i, R1.i, k.v, o.v
require S.in.i within 1 mA ± 0.01 % as "in"`;

describe("the current into a net of a block", () => {
  const { job, diagnostics } = compile(TEXT);
  const { traces } = solveRange(job!, 0, 1);
  const value = (name: string) => traces[job!.plan.traces.findIndex((trace) => trace.name === name)]![0]!;

  test("is understood without a problem", () => {
    expect(diagnostics).toEqual([]);
  });

  test("is what the outside brings, by Kirchhoff's current law", () => {
    expect(Math.abs(value("S.in.i") / 1e-3 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(value("S.out.i") / -value("R1.i") - 1)).toBeLessThan(1e-9);
  });

  test("is counted through blocks within blocks", () => {
    // By Ohm's law in H: 2 kΩ from a to b, 2 kΩ from a to ground; s is held at 0 V.
    const out = value("o.v");
    expect(Math.abs(value("S.H.a.i") / (out / 1e3) - 1)).toBeLessThan(1e-9);
    expect(Math.abs(value("S.H.b.i") / (-out / 2e3) - 1)).toBeLessThan(1e-9);
  });

  test("can be read in laws, and tells two nets of a block on one net from each other", () => {
    expect(Math.abs(value("k.v") - 1)).toBeLessThan(1e-12);
    expect(Math.abs(value("T.x.i") - 1e-3)).toBeLessThan(1e-15);
  });

  test("can be asked for in a requirement", () => {
    expect(job!.design.requirements.map(({ label }) => label)).toEqual(["in"]);
    expect(job!.plan.traces.map(({ name }) => name)).toContain("S.Q.c.i");
  });

  test("is known once the circuit is solved only, and a net of a block has a voltage and a current", () => {
    const messageOf = (line: string) => compile(`${TEXT}\n${line}`).diagnostics.map(({ message }) => message);
    expect(messageOf("knob x = S.in.i")).toHaveLength(1);
    expect(messageOf("show S.in.p")[0]).toContain("voltage only");
  });
});
