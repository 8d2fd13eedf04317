import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { format } from "@/lib/language/format";
import { highlight } from "@/lib/language/highlight";
import { MOST_TEXT } from "@/lib/language/limits";
import { EXAMPLES } from "./texts";

const divider =
  "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- out -- R2 : resistor 1 kΩ -- ground";

/** Input that must cost nothing, with the one code that answers it and what its sentence names. */
const BAD: readonly (readonly [what: string, text: string, code: string, says: string])[] = [
  ["a text beyond the limit", "x".repeat(MOST_TEXT + 1), "CAP1", "split it"],
  [
    "a sweep of 1e9 points",
    `${divider}\nknob k = 1 V\nsweep k from 0 V to 1 V, 1000000000 points\nshow out.v`,
    "CAP4",
    "space them wider",
  ],
  [
    "10,000 nested brackets",
    `${divider}\nlet a = ${"(".repeat(10_000)}1${")".repeat(10_000)}\nshow out.v`,
    "CAP2",
    "name parts of it",
  ],
  ["10,000 calls inside each other", `${divider}\nlet a = ${"exp(".repeat(10_000)}`, "CAP2", "`let`"],
  ["10,000 minus signs", `${divider}\nlet a = ${"- ".repeat(10_000)}1\nshow out.v`, "CAP2", "`let`"],
  [
    "a long name before the thousand names of a block",
    `${divider}\nblock b(a) {\n${Array.from({ length: 900 }, (_, i) => `  a -- R${i} : resistor 1 kΩ -- ground\n`).join("")}}\n${"x".repeat(200_000)} : b { a = in }\nshow out.v`,
    "CAP9",
    "shorten it",
  ],
  [
    "a loop of voltage elements",
    `${divider}\nin -- V2 : voltage 1 V -- top -- V3 : voltage 1 V -- ground\nshow out.v`,
    "WIR3",
    "`V1`, `V2` and `V3`",
  ],
  [
    "a floating net",
    `${divider}\na -- R3 : resistor 1 kΩ -- b -- R4 : resistor 1 kΩ -- a\nshow out.v`,
    "WIR2",
    "`a` and `b`",
  ],
];

describe("bad input is one plain diagnostic and no job", () => {
  test.each(BAD)("%s", (_, text, code, says) => {
    const { diagnostics, job } = compile(text);
    expect(job).toBeNull();
    expect(diagnostics.map((one) => one.code)).toEqual([code]);
    expect(diagnostics[0]!.message).toContain(says);
  });

  test.each(BAD)("%s is formatted and coloured all the same", (_, text) => {
    expect(format(format(text))).toBe(format(text));
    expect(highlight(text).every(({ from, to }) => from < to && to <= text.length)).toBe(true);
  });
});

/** Texts as long as is allowed that once were, or could be, slow to answer: each is read in about its length. */
const LONG: readonly (readonly [what: string, line: (i: number) => string])[] = [
  [
    "unknown kinds beside thousands of models",
    (i) => `model mo${i} : npn { Is = 1 fA }\na -- X${i} : zz -- b\n`,
  ],
  ["near names", (i) => `let abcdefghijabcdefghij${i} = abcdefghijabcdefghijx${i}\n`],
  [
    "sweeps that leave the ranges of their knobs",
    (i) => `knob k${i} = 1 V in 0 V .. 2 V\nsweep k${i} from 1 V to 3 V, 999999 points\n`,
  ],
  [
    "windows beside a point of long sweeps",
    (i) =>
      i === 0
        ? "knob k = 1 V\nsweep k from 0 V to 1 V, 999999 points\na -- R1 : resistor k / 1 mA -- ground\n"
        : `read r${i} = highest(a.v) for k in 1.${i} V .. 2 V ${i > 990 ? "for k in 0 V .. 1 V ".repeat(300) : ""}\n`,
  ],
  [
    "readings that each use all before",
    (i) => `read r${i} = highest(a${i}.v) + r${i - 1} + r${i >> 1} at temperature = ${i} K\n`,
  ],
  ["values that each use the one after", (i) => `let a${i} = a${i + 1} + 1\n`],
  [
    "blocks with an instance each and a mistake each",
    (i) =>
      `block b${i}(a) {\n  a -- R1 : resistor ${i} V -- x\n  let k = kk\n}\nX${i} : b${i} { a = n, q = 1 }\n`,
  ],
  ["blocks that are never closed", (i) => `block b${i}(a) {\n  a -- R1 : resistor 1 kΩ -- x\n`],
  [
    "names inside instances that are not there",
    (i) => `block b${i}(a) {\n}\nX${i} : b${i} { a = n }\nlet y${i} = X${i}.zz\n`,
  ],
  [
    "laws of unknown nets",
    (i) => `L${i} : law { plus = a${i}, minus = ground, amps = 1 mA * tanh(nn${i}.v / 1 V) }\n`,
  ],
  [
    "loops of voltage elements",
    (i) => `n${i} -- V${i} : voltage 1 V -- n${i + 1}\nground -- W${i} : voltage 1 V -- n${i}\n`,
  ],
];

describe("a long text with mistakes all over is answered", { timeout: 60_000 }, () => {
  test.each(LONG)("%s", (_, line) => {
    let text = "";
    for (let i = 0; text.length + line(i).length <= MOST_TEXT; i++) text += line(i);
    const { diagnostics, job } = compile(text);
    expect(job).toBeNull();
    expect(diagnostics.length).toBeGreaterThan(0);
    expect(diagnostics.length).toBeLessThanOrEqual(201);
  });
});

describe("the examples", () => {
  test.each(EXAMPLES)("%s has nothing to complain about and is in canonical form", (_, text) => {
    const { diagnostics, job } = compile(text);
    expect(diagnostics).toEqual([]);
    expect(job).not.toBeNull();
    expect(format(text)).toBe(text);
  });
});
