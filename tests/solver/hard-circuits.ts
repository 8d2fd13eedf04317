import { SEVERAL, textOf } from "../outside/several-solutions";
import { textOf as textOfRandom } from "../random/circuit";
import { fullCircuit } from "../random/full";

const of = (id: string) => textOf(SEVERAL.find((record) => record.id === id)!);

const FULL_NPN = `Is = 0.4 fA, beta_f = 240, beta_r = 2, Va_f = 80 V, Va_r = 12 V, I_leak_e = 10 fA, I_knee_f = 20 mA,
  R_base = 120 Ω, R_emitter = 0.6 Ω, R_collector = 15 Ω`;

/** Circuits that are hard from a cold start, each with what makes it so. */
export const HARD: Readonly<Record<string, string>> = {
  "latch of two transistors, three solutions": of("MS3"),
  "trigger between its thresholds, three solutions": of("MS4"),
  "latch of four layers that may stay off at 4 fA": of("MS5"),
  "negative resistance around an ideal amplifier": of("MS6"),
  "tunnel diode as a polynomial law": of("MS1"),
  "tunnel diode as an exponential law": of("MS2"),
  "currents of 1 fA and 1 mA in one loop": `model q : npn { Is = 1e-18 A }
model amp : opamp { gain = 1e6 }
ground -- I1 : current 1 mA -- s
ground -- I2 : current 1 fA -- r
Q1 : q { c = s, b = ground, e = o1 }
A1 : amp { plus = ground, minus = s, out = o1 }
Q2 : q { c = r, b = ground, e = o2 }
A2 : amp { plus = ground, minus = r, out = o2 }
o1 -- R1 : resistor 10 kΩ -- d -- R2 : resistor 10 kΩ -- o2
show d.v`,
  "mirror of 1e12 to one by a diode drop": `model q : npn { Is = 1 fA, beta_f = 200 }
ground -- V1 : voltage 5 V -- vcc -- I1 : current 1 mA -- b
Q1 : q { c = b, b = b, e = ground }
ground -- V2 : voltage 0.7099 V -- e
Q2 : q { c = vcc, b = b, e = e }
vcc -- R1 : resistor 1 TΩ -- e
show Q2.c.i`,
  "comparator with limits and positive feedback": `model amp : opamp { gain = 1e6, out_low = -12 V, out_high = 12 V, R_out = 50 Ω }
ground -- V1 : voltage 0.1 V -- in
A1 : amp { plus = p, minus = in, out = out }
out -- R1 : resistor 100 kΩ -- p -- R2 : resistor 10 kΩ -- ground
show out.v`,
  "amplifier far into its limit without feedback": `model amp : opamp { gain = 1e7, out_low = -12 V, out_high = 12 V }
ground -- V1 : voltage 3 V -- in
A1 : amp { plus = in, minus = ground, out = out }
out -- R1 : resistor 10 kΩ -- ground
in -- R2 : resistor 1 MΩ -- ground
show out.v`,
  "rectifier of two limited amplifiers": `model d : diode { Is = 10 fA, Rs = 5 Ω }
model amp : opamp { gain = 1e6, out_low = -13 V, out_high = 13 V, bias = 20 pA }
ground -- V1 : voltage -7 V -- in -- R1 : resistor 10 kΩ -- s
s -- R2 : resistor 10 kΩ -- h
h -- D1 : d -- o
o -- D2 : d -- s
A1 : amp { plus = ground, minus = s, out = o }
in -- R3 : resistor 10 kΩ -- t
h -- R4 : resistor 5 kΩ -- t
t -- R5 : resistor 10 kΩ -- out
A2 : amp { plus = ground, minus = t, out = out }
show out.v`,
  "current that feeds itself, started by a leak": `model qn : npn { Is = 1 fA, beta_f = 150, Va_f = 60 V }
model qn8 : npn { Is = 8 fA, beta_f = 150, Va_f = 60 V }
model qp : pnp { Is = 1 fA, beta_f = 60, Va_f = 40 V }
ground -- V1 : voltage 5 V -- vcc
Q1 : qn { c = a, b = a, e = ground }
Q2 : qn8 { c = b, b = a, e = e }
e -- R1 : resistor 1 kΩ -- ground
Q3 : qp { c = a, b = b, e = vcc }
Q4 : qp { c = b, b = b, e = vcc }
vcc -- R2 : resistor 100 MΩ -- a
show e.v`,
  "twenty diodes in series on 100 V": `model d : diode { Is = 1 pA, n = 1.8, Rs = 0.1 Ω }
ground -- V1 : voltage 100 V -- n0 -- R1 : resistor 1 kΩ -- n1
${Array.from({ length: 20 }, (_, k) => `n${k + 1} -- D${k + 1} : d -- ${k === 19 ? "ground" : `n${k + 2}`}`).join("\n")}
show n1.v`,
  "four transistors in a chain of gains, a million millionfold": `model q : npn { Is = 1 fA, beta_f = 1000, Va_f = 100 V }
ground -- V1 : voltage 30 V -- vcc
ground -- I1 : current 1 pA -- b1
Q1 : q { c = vcc, b = b1, e = b2 }
Q2 : q { c = vcc, b = b2, e = b3 }
Q3 : q { c = vcc, b = b3, e = b4 }
Q4 : q { c = vcc, b = b4, e = out }
out -- R1 : resistor 10 Ω -- ground
show out.v`,
  "stabiliser of a breakdown diode and a full transistor": `model z : diode { Is = 1 fA, V_breakdown = 5.6 V, I_breakdown = 5 mA }
model q : npn { ${FULL_NPN} }
ground -- V1 : voltage 12 V -- vcc -- R1 : resistor 1 kΩ -- b
ground -- D1 : z -- b
Q1 : q { c = vcc, b = b, e = out }
out -- R2 : resistor 100 Ω -- ground
show out.v`,
  "multiplier cell of full transistors, saturated": `model q : npn { ${FULL_NPN} }
ground -- V1 : voltage 5 V -- vcc
ground -- VX : voltage 2 V -- x
ground -- VY : voltage -1 V -- y
vcc -- RL1 : resistor 10 kΩ -- l1
vcc -- RL2 : resistor 10 kΩ -- l2
Q1 : q { c = l1, b = x, e = e1 }
Q2 : q { c = l2, b = ground, e = e1 }
Q3 : q { c = l2, b = x, e = e2 }
Q4 : q { c = l1, b = ground, e = e2 }
Q5 : q { c = e1, b = y, e = t1 }
Q6 : q { c = e2, b = m, e = t2 }
ground -- VM : voltage -1.1 V -- m
t1 -- R1 : resistor 100 Ω -- t
t2 -- R2 : resistor 100 Ω -- t
t -- IT : current 1 mA -- ground
t -- R3 : resistor 10 MΩ -- ground
show l1.v`,
  "law with an arc tangent, on which plain steps run away": `ground -- V1 : voltage 20 V -- in -- R1 : resistor 1 kΩ -- a
L1 : law { plus = a, minus = ground, amps = 100 mA * atan((L1.v - 5 V) / 1 mV) }
show a.v`,
  "breakdown diodes at 100 nA, far below where they are specified": `model z : diode { Is = 3 fA, Rs = 10 Ω, V_breakdown = 5.6 V, I_breakdown = 5 mA, n_breakdown = 3 }
ground -- V1 : voltage 20 V -- vcc -- R1 : resistor 100 MΩ -- a
b -- D1 : z -- a
ground -- D2 : z -- b
a -- R2 : resistor 100 MΩ -- ground
show a.v`,
  "bounded laws that send Newton's method to and fro": textOfRandom(fullCircuit(173)),
  "followers at their limits, with laws of powers and roots": textOfRandom(fullCircuit(208)),
  "limited amplifiers before which all but ramps fail": textOfRandom(fullCircuit(768)),
  "full transistors before limited amplifiers and bounded laws": textOfRandom(fullCircuit(464)),
  "what a ramp of shunts alone solves": textOfRandom(fullCircuit(598)),
  "what a path that turns back alone solves": textOfRandom(fullCircuit(4637)),
};
