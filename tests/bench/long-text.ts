/** 2,000 lines without an error: a ladder of resistors, whose first line changes with every key stroke. */
export function longText(turn = 0): string {
  const rungs = Array.from(
    { length: 995 },
    (_, k) => `n${k} -- R${k} : resistor 1 kΩ -- n${k + 1}\nn${k + 1} -- P${k} : resistor 10 kΩ -- ground`,
  );
  return `title "Bench, 2000 lines"
let R_gain = ${100 + turn} Ω
knob V_in = 1 V
ground -- V : voltage V_in -- n0

${rungs.join("\n")}

# the end
sweep V_in from 0 V to 1 V, 2 points
show n1.v
`;
}
