import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { tolerancePlace } from "@/lib/analyses/tolerance-place";
import { lineStarts, placeOf } from "@/lib/language/span";

const TEXT = `title "Places (invented)"
knob I_in = 1 µA
let R_sum = 10 kΩ ± 1 %
model amp : opamp { gain = 1e6, offset = 0 V ± 150 µV }

block stage(in, out) {
  let R_own = 1 kΩ ± 2 %
  in -- RB : resistor R_own -- out
}

ground -- IS : current I_in -- sum
A1 : amp { plus = ground, minus = sum, out = out }
A2 : amp { plus = out, minus = last, out = last }
last -- R5 : resistor 1 kΩ { drift = 50 ppm/K ± 20 ppm/K } -- ground
sum -- R1 : resistor R_sum -- out
out -- R2 : resistor 1 kΩ ± 5 % -- ground
last -- R3 : resistor 1 kΩ ± 5 % track pair within 0.1 % -- ground
last -- R4 : resistor 1 kΩ ± 5 % track pair within 0.1 % -- ground
S : stage { in = last, out = ground }
show y = out.v
read top = highest(y)
`;

test.each([
  ["R1", "R_sum", 3],
  ["A1", "offset", 4],
  ["R5", "drift", 14],
  ["R2", "value", 16],
  ["track pair", "", 17],
  ["R4", "value", 18],
  ["R1", "nothing of that name", 15],
  ["S.RB", "S.R_own", 7],
  ["nobody", "value", null],
  ["track nobody", "", null],
])("%s %s stands in line %s", (part, parameter, line) => {
  const { job, diagnostics } = compile(TEXT);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  const place = tolerancePlace(job.design, { part, parameter });
  expect(place && placeOf(lineStarts(TEXT), place.from).line).toBe(line);
});
