import { MOST_BLOCK_DEPTH } from "@/lib/language/limits";
import { type Problem, within } from "./problems";

const stage = "block stage(in, out) {\n  knob R = 1 kΩ in 1 Ω .. 1 MΩ\n  in -- R1 : resistor R -- out\n}";

/** A block with this body, and an instance of it. */
function inBlock(body: string): string {
  return within(`block part(a) {\n  ${body}\n  a -- R9 : resistor 1 kΩ -- ground\n}\nX : part { a = in }`);
}

/** Problems of blocks, instances and draws. */
export const BLOCK_PROBLEMS: readonly Problem[] = [
  { code: "FRM2", text: within("block «1»(in) {\n}") },
  { code: "FRM2", text: within("block stage «{»\n  in -- R2 : resistor 1 kΩ -- ground\n}"), says: "`(`" },
  { code: "FRM2", text: within("block stage(in «{»\n  in -- R2 : resistor 1 kΩ -- ground\n}"), says: "`)`" },
  { code: "FRM2", text: within("use «shelf»") },
  { code: "FRM2", text: within('use "shelf" «3»'), says: "`revision`" },
  { code: "FRM2", text: within("draws 400 «7»"), says: "`seed`" },
  { code: "FRM4", text: within(`${stage} «x»`) },
  {
    code: "FRM5",
    text: "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground\n«block b(x) {»\n  x -- R2 : resistor 1 kΩ -- ground\nshow in.v\n",
    mended:
      "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground\nblock b(x) {\n  x -- R2 : resistor 1 kΩ -- ground\n}\nshow in.v\n",
  },
  { code: "FRM9", text: within("draws 10 seed 1\n«draws 20 seed 1»") },
  { code: "FRM9", text: within("seek 2\n«seek 3»"), mended: within("seek 2\n") },
  { code: "FRM10", text: within(`${stage}\nX : stage { in = «1 V», out = ground }`) },
  { code: "FRM11", text: within(`${stage}\nin -- X : «stage» -- ground`), says: "a block" },
  { code: "FRM13", text: inBlock("«show a.v»"), says: "move it out" },
  { code: "FRM13", text: inBlock("«draws 10 seed 1»") },

  { code: "NAM1", text: within(`${stage}\nlet «stage» = 1 V`), says: "a block" },
  { code: "NAM1", text: within(`${stage}\nX : stage { in = in, out = ground }\nlet «X» = 1 V`) },
  { code: "NAM1", text: within("block b(«a», a) {\n}".replace("«a», a", "a, «a»")) },
  { code: "NAM1", text: inBlock("let «a» = 1 V"), says: "in a block" },
  { code: "NAM1", text: inBlock("let k = 1 V\n  let «k» = 1 V") },
  { code: "NAM2", text: within("block «gain»(a) {\n}") },
  { code: "NAM2", text: within("block b(«ground») {\n}") },
  { code: "NAM2", text: inBlock("let «min» = 1 V") },
  { code: "NAM2", text: inBlock("knob «temperature» = 20 °C") },
  { code: "NAM3", text: inBlock("let k = 1 V\n  let l = «kk»"), mended: inBlock("let k = 1 V\n  let l = k") },
  { code: "NAM3", text: inBlock("a -- R8 : resistor 1 kΩ * «R9x» -- ground") },
  { code: "NAM3", text: inBlock("a -- R8 : resistor «in» -- ground"), says: "Nothing" },
  { code: "NAM4", text: within(`${stage}\nlet a = «stage»`), says: "a block" },
  {
    code: "NAM4",
    text: within(`${stage}\nX : stage { in = in, out = ground }\nshow «X»`),
    says: "an instance",
  },
  { code: "NAM5", text: inBlock("Q : «rezistor» { left = a, right = ground }") },
  { code: "NAM6", text: within(`${stage}\nX : stage { in = in, out = ground, «RR» = 1 kΩ }`), says: "knob" },
  { code: "NAM7", text: within(`${stage}\nX : stage { in = in, out = ground }\nshow X.«y».v`), says: "`y`" },
  { code: "NAM7", text: within(`${stage}\nX : stage { in = in, out = ground }\nshow «X.in.p»`) },
  { code: "NAM8", text: within(`${stage}\nX : stage { in = in, out = ground, «out» = in }`) },
  { code: "NAM9", text: inBlock("let «k» = k + 1 V") },
  {
    code: "NAM12",
    text: within("block loop(a) {\n  a -- R2 : resistor 1 kΩ -- ground\n  X : «loop» { a = a }\n}"),
    says: "contains itself",
  },
  {
    code: "NAM12",
    text: within(
      "block one(a) {\n  X : two { a = a }\n}\nblock two(a) {\n  a -- R2 : resistor 1 kΩ -- ground\n  X : «one» { a = a }\n}",
    ),
  },
  {
    code: "UNI3",
    text: within(`${stage}\nX : stage { in = in, out = ground, R = «2 V» }`),
    says: "The knob `R`",
  },
  {
    code: "UNI3",
    text: within(`${stage}\nX : stage { in = in, out = ground, R = «2» }`),
    mended: within(`${stage}\nX : stage { in = in, out = ground, R = 2 Ω }`),
  },
  {
    code: "UNI8",
    text: within(
      "block stage(in) {\n  knob R = 1 kΩ\n  in -- R1 : resistor «R» -- ground\n}\nX : stage { in = in, R = 0 Ω }",
    ),
    says: "`X.R1` must be above 0",
  },
  {
    code: "UNI10",
    text: within(`${stage}\nX : stage { in = in «± 1 %», out = ground }`),
    mended: within(`${stage}\nX : stage { in = in , out = ground }`),
  },
  { code: "WIR5", text: within(`${stage}\n«X» : stage { in = in }`), says: "`out`" },
  { code: "PLN4", text: within("draws «2.5» seed 1") },
  { code: "PLN4", text: within("draws 10 seed «-1»") },
  { code: "PLN4", text: within("seek «0»") },
  { code: "PLN6", text: within(`${stage}\nX : stage { in = in, out = ground, R = «2 MΩ» }`) },
  {
    code: "PLN9",
    text: within(
      `${stage}\nknob r = 1 kΩ\nX : stage { in = in, out = ground, R = 2 * r }\n«sweep r from 1 kΩ to 1 MΩ, 3 points»`,
    ),
    says: "but must be at most 1.000",
  },
  { code: "CAP2", text: within(nested(MOST_BLOCK_DEPTH)) },
  {
    code: "CAP3",
    text: within(
      `${stage}\n${tenfold("a", "stage")}${tenfold("b", "a")}${tenfold("c", "b")}${tenfold("d", "c")}${tenfold("e", "d")}«X : e { in = in, out = ground }»`,
    ),
  },
];

function nested(depth: number): string {
  const open = (level: number): string => `block b${level}(a) {`;
  const inner = `«${open(depth)}»\n${"}\n".repeat(depth + 1)}`;
  return Array.from({ length: depth }, (_, level) => `${open(level)}\n`).join("") + inner;
}

/** A block of ten instances of another. */
function tenfold(name: string, of: string): string {
  const lines = Array.from({ length: 10 }, (_, i) => `  X${i} : ${of} { in = in, out = out }\n`);
  return `block ${name}(in, out) {\n${lines.join("")}}\n`;
}
