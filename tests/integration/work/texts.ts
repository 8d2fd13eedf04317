/**
 * A transistor log converter (invented), swept over six decades of current and ten temperatures: 60 points for each of
 * `decadePoints`, and 10 more.
 */
export function longText(decadePoints: number): string {
  return `title "Log converter"
knob I_in = 1 µA
model pair : npn   { Is = 0.4 fA, beta_f = 240, Va_f = 80 V }
model amp  : opamp { gain = 2e6, offset = 50 µV, bias = 20 pA }
ground -- I1 : current I_in -- s
Q1 : pair { c = s, b = ground, e = out }
A1 : amp { plus = ground, minus = s, out = out }
out -- R1 : resistor 10 kΩ -- ground
sweep I_in from 1 nA to 1 mA, ${decadePoints} per decade
sweep temperature over -20 °C, -10 °C, 0 °C, 10 °C, 20 °C, 25 °C, 30 °C, 40 °C, 50 °C, 60 °C
show v = out.v
`;
}

/** 60 010 points in 16 shards: long enough to be disturbed in the middle. */
export const LONG_TEXT = longText(1_000);

/** A ladder of so many resistors and diodes (invented), 4001 points in two shards. Its second shard takes seconds. */
export function ladderText(sections: number): string {
  const rungs = Array.from(
    { length: sections },
    (_, i) => `n${i} -- R${i} : resistor 1 kΩ -- n${i + 1}\nn${i + 1} -- D${i} : d -- ground`,
  );
  return `title "Ladder"
knob V_in = 1 V
model d : diode { Is = 1 nA, n = 1.8 }
ground -- V0 : voltage V_in -- n0
${rungs.join("\n")}
sweep V_in from 1 mV to 10 V, 1000 per decade
show v = n${sections}.v
`;
}

/** The longest second shard that a netlist of a permitted size gives. */
export const SLOW_TEXT = ladderText(990);

/** A text within all limits whose sums of a quarter of a million characters want more than 40 MiB to be read. */
export function largeText(): string {
  const sums: string[] = [];
  for (let i = 0, length = 0; length < 240_000; i++) {
    sums.push(`let a${i} = ${i === 0 ? "1" : `a${i - 1}`}${"+1".repeat(250)}`);
    length += sums[i]!.length;
  }
  return `${ladderText(2)}${sums.join("\n")}\n`;
}

/** A trigger of two transistors (invented) with three operating points between its thresholds, at so many temperatures. */
export function sought(temperatures: number, points = 41): string {
  const outer = Array.from({ length: temperatures }, (_, k) => `${290 + 10 * k} K`).join(", ");
  return `title "Trigger"
knob V_in = 2 V
model small : npn { Is = 1 fA, beta_f = 100, beta_r = 1 }
ground -- VS : voltage 5 V -- supply
ground -- VI : voltage V_in -- in
supply -- RC1 : resistor 4.7 kΩ -- c1
supply -- RC2 : resistor 1 kΩ -- c2
c1 -- R1 : resistor 10 kΩ -- b2 -- R2 : resistor 20 kΩ -- ground
e -- RE : resistor 1 kΩ -- ground
Q1 : small { c = c1, b = in, e = e }
Q2 : small { c = c2, b = b2, e = e }
sweep V_in from 0 V to 4 V, ${points} points
sweep temperature over ${outer}
seek 5
show out = c2.v, e.v
require out <= 5.1 V as "below the supply"
`;
}

/** A follower whose inputs are exchanged (invented): every point is solved, and the circuit would leave it. 901 points in several strands. */
export const EXCHANGED = `title "Exchanged"
knob V_in = 1 V
model amp : opamp { gain = 1e5 }
ground -- VS : voltage V_in -- in
A1 : amp { plus = out, minus = in, out = out }
out -- RL : resistor 1 kΩ -- ground
sweep V_in from 0.1 V to 1 V, 901 points
show out = out.v
require out <= 2 V
`;
