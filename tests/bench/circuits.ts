import { compile, type Job } from "@/lib/analyses/compile";
import { planOf } from "@/lib/analyses/plan";
import { numberUnknowns } from "@/lib/circuit/circuit";
import type { Design, Element } from "@/lib/language/ast";

/** Log, sum, antilog of two inputs and a reference: 22 unknowns, four transistors, five amplifiers. The same figures stand in its C file. */
const MULTIPLIER = `title "Multiplier"
knob V_x = 1 V
let R_in = 100 kΩ
let R_sum = 20 kΩ
model array : npn   { Is = 0.4 fA, beta_f = 240, beta_r = 4, Va_f = 80 V }
model amp   : opamp { gain = 2e6, offset = 20 µV, bias = 20 pA }
ground -- VX : voltage V_x -- x -- RX : resistor R_in -- sx
QX : array { c = sx, b = ground, e = lx }
AX : amp   { plus = ground, minus = sx, out = lx }
ground -- VY : voltage 1 V -- y -- RY : resistor R_in -- sy
QY : array { c = sy, b = ground, e = ly }
AY : amp   { plus = ground, minus = sy, out = ly }
ground -- VR : voltage 1 V -- r -- RR : resistor R_in -- sr
QR : array { c = sr, b = ground, e = lr }
AR : amp   { plus = ground, minus = sr, out = lr }
lx -- R1 : resistor R_sum -- p
ly -- R2 : resistor R_sum -- p
lr -- R3 : resistor R_sum -- m -- R4 : resistor R_sum -- e
AE : amp { plus = p, minus = m, out = e }
QO : array { c = so, b = ground, e = e }
so -- RO : resistor R_in -- out
AO : amp { plus = ground, minus = so, out = out }
sweep V_x from 1 mV to 10 V, 75 per decade
show out.v`;

/** Cells of the array: three unknowns each. */
export const CELLS = 16;

/** A row of transistors with resistors at every pin, on one supply and one base line: 51 unknowns. */
function arrayText(): string {
  const cells = Array.from(
    { length: CELLS },
    (_, k) => `vcc -- RC${k} : resistor 1 kΩ -- c${k}
line -- RB${k} : resistor 100 Ω -- b${k}
e${k} -- RE${k} : resistor 330 Ω -- ground
Q${k} : q { c = c${k}, b = b${k}, e = e${k} }`,
  );
  return `title "Array"
knob V_base = 1.5 V
model q : npn { Is = 2 fA, beta_f = 150, beta_r = 3, Va_f = 60 V }
ground -- VCC : voltage 5 V -- vcc
ground -- I1 : current V_base / 100 Ω -- line
line -- RL : resistor 100 Ω -- ground
${cells.join("\n")}
sweep V_base from 0.1 V to 2 V, 301 points
show Q0.c.i`;
}

/** A ladder of resistors between nets, with a diode to ground at each: `sections` + 2 unknowns. */
function ladderText(sections: number): string {
  const rungs = Array.from(
    { length: sections },
    (_, k) => `n${k} -- R${k + 1} : resistor 100 Ω -- n${k + 1} -- D${k + 1} : d -- ground`,
  );
  return `title "Ladder"
knob V_in = 5 V
model d : diode { Is = 1 pA }
ground -- V1 : voltage V_in -- n0
${rungs.join("\n")}
sweep V_in from 1 V to 10 V, 91 points
show n1.v`;
}

export function multiplier(): Job {
  return jobOf(MULTIPLIER);
}

export function array(): Job {
  return jobOf(arrayText());
}

/** Made from parts and not from text, since a text has at most 2,000 elements. */
export function ladder(sections: number): Job {
  const { design } = jobOf(ladderText(2));
  const [source, resistor, diode] = design.elements as [Element, Element, Element];
  const elements = [source];
  for (let k = 1; k <= sections; k++) {
    elements.push({ ...resistor, name: `R${k}`, pins: { left: `n${k - 1}`, right: `n${k}` } });
    elements.push({ ...diode, name: `D${k}`, pins: { anode: `n${k}`, cathode: "ground" } });
  }
  const nets = Array.from({ length: sections + 1 }, (_, k) => `n${k}`);
  const whole: Design = { ...design, elements, nets };
  const circuit = numberUnknowns(whole);
  return { design: whole, circuit, plan: planOf(whole, circuit) };
}

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}
