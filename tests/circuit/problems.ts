import type { Problem } from "@/tests/language/problems";

const source = "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground";
const ideal = "model amp : opamp { }";
const finite = "model real : opamp { gain = 1e6 }";
const npn = "model array : npn { Is = 1 fA, beta_f = 100 }";
const bare = "model bare : npn { Is = 1 fA }";

function lines(...more: string[]): string {
  return `${[source, ideal, finite, npn, bare, ...more].join("\n")}\n`;
}

/** A circuit whose drivers count from ground while nothing is wired to it. */
function groundless(first: string, net: string): string {
  return `${[
    "model real : opamp { gain = 1e6 }",
    `${first} -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- m -- R2 : resistor 1 kΩ -- out`,
    `A1 : real { plus = ${net}, minus = m, out = out }`,
    `out -- R3 : resistor 1 kΩ -- ${net}`,
  ].join("\n")}\n`;
}

/** Wiring problems: the text has nothing else to complain about. */
export const WIRING_PROBLEMS: readonly Problem[] = [
  { code: "WIR1", text: lines("in -- R2 : resistor 1 kΩ -- «out»"), says: "`R2.right`" },
  { code: "WIR1", text: lines("in -- R2 : resistor 1 kΩ -- «out»", "show out.v"), severity: "warning" },
  {
    code: "WIR1",
    text: lines(
      "in -- R2 : resistor 1 kΩ -- output",
      "output -- R3 : resistor 1 kΩ -- ground",
      "in -- R4 : resistor 1 kΩ -- «outptu»",
    ),
    mended: lines(
      "in -- R2 : resistor 1 kΩ -- output",
      "output -- R3 : resistor 1 kΩ -- ground",
      "in -- R4 : resistor 1 kΩ -- output",
    ),
  },
  {
    code: "WIR1",
    text: lines(
      "block b(p) {\n  p -- R2 : resistor 1 kΩ -- middle -- R3 : resistor 1 kΩ -- ground\n  p -- R4 : resistor 1 kΩ -- «midlde»\n}",
      "X : b { p = in }",
    ),
    mended: lines(
      "block b(p) {\n  p -- R2 : resistor 1 kΩ -- middle -- R3 : resistor 1 kΩ -- ground\n  p -- R4 : resistor 1 kΩ -- middle\n}",
      "X : b { p = in }",
    ),
    says: "`X.midlde`",
  },
  { code: "WIR1", text: lines("in -- I1 : current 1 µA -- «x»", "show x.v") },
  { code: "WIR1", text: lines("A1 : amp { plus = «x», minus = o, out = o }", "show x.v") },
  {
    code: "WIR2",
    text: lines("«a» -- R2 : resistor 1 kΩ -- b -- V2 : voltage 1 V -- a"),
    says: "`a` and `b`",
  },
  { code: "WIR2", text: lines("«a» -- I1 : current 1 µA -- b -- R2 : resistor 1 kΩ -- a") },
  {
    code: "WIR2",
    text: lines(
      "A1 : amp { plus = «p», minus = o1, out = o1 }",
      "A2 : amp { plus = p, minus = o2, out = o2 }",
    ),
  },
  {
    code: "WIR2",
    text: lines("Q1 : bare { c = in, b = «base», e = ground }", "Q2 : bare { c = in, b = base, e = ground }"),
  },
  { code: "WIR3", text: lines("ground -- «V2 : voltage 2 V» -- in"), says: "`V1` and `V2`" },
  {
    code: "WIR3",
    text: lines("in -- V2 : voltage 2 V -- a -- V3 : voltage 1 V -- b -- «V4 : voltage 1 V» -- ground"),
    says: "`V1`, `V2`, `V3` and `V4`",
  },
  {
    code: "WIR3",
    text: lines(
      "A1 : amp { plus = in, minus = p, out = p }",
      "«A2 : amp { plus = in, minus = p, out = q }»",
      "q -- R2 : resistor 1 kΩ -- p",
    ),
  },
  {
    code: "WIR4",
    text: lines("ground -- «I1 : current 1 µA» -- x -- I2 : current 1 µA -- ground"),
    says: "`I1` and `I2`",
  },
  {
    code: "WIR4",
    text: lines("ground -- «I1 : current 1 µA» -- x -- R2 : resistor 1 kΩ -- y -- R3 : resistor 1 kΩ -- x"),
    says: "`x` and `y`",
  },
  {
    code: "WIR4",
    text: lines("in -- «I1 : current 1 µA» -- m", "A1 : amp { plus = m, minus = o, out = o }"),
  },
  {
    code: "WIR6",
    text: lines(
      "in -- R2 : resistor 1 kΩ -- m -- R3 : resistor 1 kΩ -- ground",
      "«A1 : amp { plus = m, minus = ground, out = o }»",
      "o -- R4 : resistor 1 kΩ -- ground",
    ),
  },
  {
    code: "WIR6",
    severity: "warning",
    text: lines("«A1 : real { plus = in, minus = ground, out = o }»", "o -- R2 : resistor 1 kΩ -- ground"),
  },
  {
    code: "WIR6",
    severity: "warning",
    text: lines(
      "in -- R2 : resistor 1 kΩ -- m",
      "«A1 : real { plus = in, minus = m, out = o }»",
      "o -- R3 : resistor 1 kΩ -- in",
    ),
  },
  { code: "WIR7", text: lines("in -- «R2 : resistor 1 kΩ» -- in"), says: "`R2`" },
  { code: "WIR7", text: lines("in -- «V2 : voltage 1 V» -- in") },
  { code: "WIR7", text: lines("«Q1 : array { c = in, b = in, e = in }»") },
  {
    code: "WIR7",
    text: lines("«A1 : amp { plus = o, minus = o, out = o }»", "o -- R2 : resistor 1 kΩ -- ground"),
  },
  {
    code: "WIR7",
    severity: "warning",
    text: lines("«A1 : real { plus = o, minus = o, out = o }»", "o -- R2 : resistor 1 kΩ -- ground"),
  },
  { code: "WIR8", text: lines("«A1 : real { plus = ground, minus = in, out = in }»"), says: "`V1` and `A1`" },
  {
    code: "WIR8",
    text: lines(
      "A1 : amp { plus = in, minus = o, out = o }",
      "«A2 : real { plus = in, minus = o, out = o }»",
    ),
  },
  {
    code: "WIR8",
    text: lines("in -- R2 : resistor 1 kΩ -- m", "«A1 : amp { plus = in, minus = m, out = ground }»"),
  },
  {
    code: "WIR1",
    text: lines("in -- R2 : resistor 1 kΩ -- «GND»"),
    mended: lines("in -- R2 : resistor 1 kΩ -- ground"),
    says: "did you mean `ground`?",
  },
  { code: "WIR9", text: "«»" },
  {
    code: "WIR10",
    text: groundless("«gnd»", "gnd"),
    mended: groundless("ground", "ground"),
    says: "did you mean `ground` for `gnd`?",
  },
  { code: "WIR10", text: groundless("«Ground»", "Ground"), mended: groundless("ground", "ground") },
  { code: "WIR10", text: groundless("«vss»", "vss"), mended: groundless("ground", "ground") },
  { code: "WIR10", text: groundless("«common»", "common"), says: "give the common net the name `ground`" },
  {
    code: "WIR10",
    text: "block b(p, gnd) {\n  p -- R1 : resistor 1 kΩ -- gnd\n}\n«gnd» -- V1 : voltage 1 V -- in\nX : b { p = in, gnd = gnd }\n",
    mended:
      "block b(p, gnd) {\n  p -- R1 : resistor 1 kΩ -- gnd\n}\nground -- V1 : voltage 1 V -- in\nX : b { p = in, gnd = ground }\n",
  },
];
