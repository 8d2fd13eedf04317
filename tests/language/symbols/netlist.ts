/** A netlist with a block, an instance of it and names that mean two things. */
export const TEXT = `title "Symbols"

knob I_in = 1 µA
let R_out = 10 kΩ ± 0.1 %
let twice = 2 * R_out

model array : npn { Is = 0.4 fA, beta_f = 240 }
model amp : opamp { }

block log_stage(in, out) {
  knob R = 1 kΩ
  Q : array { c = in, b = ground, e = x }
  x -- RE : resistor R -- out
  A : amp { plus = ground, minus = in, out = out }
}

ground -- IS : current I_in -- s
S : log_stage { in = s, out = ls, R = 2 Ω }
ls -- RL : resistor R_out -- ground
x -- R2 : resistor twice -- ls
x -- R3 : resistor R_out -- ground

sweep I_in from 1 nA to 1 mA, 20 per decade

show ls = ls.v, S.x.v, S.Q.c.i
read top = highest(ls) for I_in in 1 nA .. 1 µA
require abs(ls) <= 1 V at I_in = 1 µA as "small"
require top <= 1 V
`;

/** The offset of the nth place (from 0) at which `part` stands in TEXT, plus `more`. */
export function place(part: string, nth = 0, more = 0): number {
  let at = -1;
  for (let k = 0; k <= nth; k++) at = TEXT.indexOf(part, at + 1);
  if (at === -1) throw new Error(`${part} does not stand there ${nth + 1} times.`);
  return at + more;
}
