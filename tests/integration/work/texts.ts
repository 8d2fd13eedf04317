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

/** Some hundred thousand points in more than twenty shards: long enough to be disturbed in the middle. */
export const LONG_TEXT = longText(2_000);
