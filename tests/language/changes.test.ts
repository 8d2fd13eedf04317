import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { asMessage, inWords } from "@/lib/language/changes/change";
import { changesOfTexts } from "@/lib/language/changes/of-texts";
import { format } from "@/lib/language/format";

/** Figures are written with narrow no-break spaces; the tests say them with plain ones. */
const plain = (text: string) => text.replaceAll("\u202f", " ").replaceAll("\u2212", "-");

const EXAMPLES = readdirSync("examples")
  .filter((name) => name.endsWith(".swn"))
  .map((name) => ({ name, text: readFileSync(`examples/${name}`, "utf8") }));

const HEAD = `title "Head"
knob I_in  = 1 µA in 1 nA .. 1 mA
let  R_out = 100 kΩ ± 0.1 %
let  V_max = 0.5 mV
model junction : diode { Is = 2 fA, n = 1.05 }
model amp : opamp { gain = 2e6, offset = 0 V ± 150 µV }
ground -- IS : current I_in -- s
s -- D1 : junction -- out
A1 : amp { plus = ground, minus = s, out = out }
out -- R1 : resistor R_out -- ground
sweep I_in from 1 nA to 1 mA, 10 per decade
sweep temperature over 10 °C, 25 °C
draws 40 seed 7
show v = out.v
read bend = deviation(v) for I_in in 10 nA .. 100 µA
require abs(bend) <= V_max as "conformance"
require v between -2 V and 0 V in 90 % of draws as "reach"
require abs(bend) < 5 mV
`;

/** What is said of HEAD with each [from, to] put in. */
function said(...edits: readonly (readonly [string, string])[]): string[] {
  const after = edits.reduce((text, [from, to]) => {
    expect(text).toContain(from);
    return text.replaceAll(from, to);
  }, HEAD);
  const { state, changes, errors } = changesOfTexts(HEAD, after);
  expect(errors).toEqual({ before: 0, after: 0 });
  expect(state).toBe(changes.length === 0 ? "same meaning" : "changed");
  return changes.map((change) => plain(inWords(change)));
}

describe("what changed is said in words", () => {
  const cases: [what: string, edits: [string, string][], words: string[]][] = [
    ["a value", [["100 kΩ ±", "47 kΩ ±"]], ["R_out: 100 kΩ ± 0.1 % became 47 kΩ ± 0.1 %"]],
    ["a tolerance", [["± 0.1 %", "± 1 %"]], ["R_out: 100 kΩ ± 0.1 % became 100 kΩ ± 1 %"]],
    [
      "a law of a tolerance",
      [["± 0.1 %", "± 0.1 % normal 3 sigma track pair within 0.01 %"]],
      ["R_out: 100 kΩ ± 0.1 % became 100 kΩ ± 0.1 % normal 3 sigma track pair within 0.01 %"],
    ],
    [
      "digits beyond six",
      [["100 kΩ ±", "100.000001 kΩ ±"]],
      ["R_out: 100 kΩ ± 0.1 % became 100.000 001 kΩ ± 0.1 %"],
    ],
    [
      "an expression",
      [["let  V_max = 0.5 mV", "let  V_max = 2 * (1 mV + R_out * 1 nA)"]],
      [
        "V_max: 500 µV became 2 * (1 mV + R_out * 1 nA)",
        "requirement “conformance”: <= V_max, by values it names, loosened",
      ],
    ],
    [
      "a knob's range",
      [["in 1 nA .. 1 mA", "in 100 pA .. 1 mA"]],
      ["I_in: its range 1 nA .. 1 mA became 100 pA .. 1 mA"],
    ],
    ["a knob made of a value", [["let  R_out", "knob R_out"]], ["R_out: is a knob now"]],
    ["a new value", [["let  V_max", "let  spare = 3 V\nlet  V_max"]], ["spare: added, a value of 3 V"]],
    ["a parameter", [["n = 1.05", "n = 1.1"]], ["junction: n 1.05 became 1.1"]],
    [
      "a change with temperature",
      [["resistor R_out --", "resistor R_out { drift = 3570 ppm/K } --"]],
      ["R1: drift was left out (0 ppm/K), is 3570 ppm/K now"],
    ],
    ["a parameter left out", [[", n = 1.05", ""]], ["junction: n was 1.05, is left out now (1)"]],
    [
      "a parameter given",
      [["gain = 2e6,", "gain = 2e6, bias = 20 pA,"]],
      ["amp: bias was left out (0 A), is 20 pA now"],
    ],
    ["an element's value", [["resistor R_out", "resistor 22 kΩ ± 1 %"]], ["R1: R_out became 22 kΩ ± 1 %"]],
    [
      "an element added",
      [["sweep I_in", "out -- R2 : resistor 1 kΩ -- ground\nsweep I_in"]],
      ["R2: added, resistor 1 kΩ from out to ground"],
    ],
    [
      "an element removed",
      [["out -- R1 : resistor R_out -- ground\n", ""]],
      ["R1: removed, it was resistor R_out from out to ground"],
    ],
    ["an element rewired", [["out -- R1", "s -- R1"]], ["R1: rewired, left was on out, is on s now"]],
    [
      "an element of another kind",
      [["R1 : resistor R_out", "R1 : junction"]],
      ["R1: resistor R_out became diode junction"],
    ],
    ["an element renamed", [["R1", "R_load"]], ["R1: is called R_load now"]],
    [
      "a net renamed",
      [
        ["-- s\n", "-- sum\n"],
        ["\ns --", "\nsum --"],
        ["minus = s", "minus = sum"],
      ],
      ["s: is called sum now"],
    ],
    [
      "a sweep",
      [["10 per decade", "20 per decade"]],
      ["sweep of I_in: from 1 nA to 1 mA, 10 per decade became from 1 nA to 1 mA, 20 per decade"],
    ],
    [
      "a list of temperatures",
      [["over 10 °C, 25 °C", "over 10 °C, 25 °C, 40 °C"]],
      ["sweep of temperature: over 10 °C, 25 °C became over 10 °C, 25 °C, 40 °C"],
    ],
    [
      "a sweep removed",
      [["sweep temperature over 10 °C, 25 °C\n", ""]],
      ["sweep of temperature: removed, it went over 10 °C, 25 °C"],
    ],
    ["draws", [["draws 40", "draws 400"]], ["40 draws with seed 7 became 400 draws with seed 7"]],
    ["the title", [['"Head"', '"Wide head"']], ["“Head” is called “Wide head” now"]],
    ["a trace", [["show v = out.v", "show v = out.v, s.v"]], ["trace s.v: added"]],
    [
      "a reading and what rests on its window",
      [["10 nA .. 100 µA", "1 nA .. 100 µA"]],
      [
        "reading bend: deviation(v) for I_in in 10 nA .. 100 µA became deviation(v) for I_in in 1 nA .. 100 µA",
        "requirement “conformance”: for I_in in 10 nA .. 100 µA became for I_in in 1 nA .. 100 µA, tightened",
        "requirement “abs(bend) < 5 mV”: for I_in in 10 nA .. 100 µA became for I_in in 1 nA .. 100 µA, tightened",
      ],
    ],
    [
      "a bound tightened",
      [["< 5 mV", "< 3 mV"]],
      ["requirement “abs(bend) < 3 mV”: < 5 mV became < 3 mV, tightened"],
    ],
    [
      "a bound by the value that it names",
      [["0.5 mV", "0.7 mV"]],
      ["V_max: 500 µV became 700 µV", "requirement “conformance”: <= V_max, by values it names, loosened"],
    ],
    [
      "a band that moved",
      [["between -2 V and 0 V", "between -1.5 V and 0.5 V"]],
      ["requirement “reach”: between -2 V and 0 V became between -1.5 V and 500 mV"],
    ],
    [
      "a share of the draws",
      [[" in 90 % of draws", ""]],
      ["requirement “reach”: in 90 % of draws became in every draw, tightened"],
    ],
    [
      "a strict relation",
      [["abs(bend) <= V_max", "abs(bend) < V_max"]],
      ["requirement “conformance”: <= V_max became < V_max, tightened"],
    ],
    [
      "a requirement removed",
      [["require abs(bend) < 5 mV\n", ""]],
      ["requirement “abs(bend) < 5 mV”: removed, it was abs(bend) < 5 mV for I_in in 10 nA .. 100 µA"],
    ],
    ["a requirement renamed", [['"reach"', '"range"']], ["requirement “reach”: is called “range” now"]],
  ];
  test.each(cases)("%s", (_, edits, words) => {
    expect(said(...edits)).toEqual(words);
  });

  test("one word for what a block made several times", () => {
    const block = (ohms: string) =>
      `block stage(in) {\n in -- R : resistor ${ohms} -- ground\n}\nground -- I1 : current 1 mA -- a\nground -- I2 : current 1 mA -- b\nA : stage { in = a }\nB : stage { in = b }\nshow a.v\n`;
    const { changes } = changesOfTexts(block("1 kΩ"), block("2 kΩ"));
    expect(changes.map((change) => plain(inWords(change)))).toEqual(["A.R, B.R: 1 kΩ became 2 kΩ"]);
  });
});

describe("what is no change", () => {
  test.each(EXAMPLES)("$name in canonical form, or without its comments", ({ text }) => {
    expect(changesOfTexts(text, text).state).toBe("same text");
    const spelled = text.replaceAll("kΩ", "kohm").replaceAll("µ", "u").replaceAll("±", "+-");
    for (const other of [`${format(text)}# the end\n`, spelled.replace(/^#.*$/gmu, "# another")]) {
      expect(changesOfTexts(text, other)).toMatchObject({ state: "same meaning", changes: [] });
    }
  });

  test("another spelling of the same values", () => {
    expect(said(["100 kΩ", "0.1 MΩ"], ["1 mA,", "1000 µA,"], ["25 °C", "298.15 K"])).toEqual([]);
  });

  test("a text with errors is not read, and says how many each has", () => {
    expect(changesOfTexts(HEAD, HEAD.replace("kΩ", "kX"))).toEqual({
      state: "not read",
      changes: [],
      errors: { before: 0, after: 1 },
    });
  });
});

test("between any two examples, what is added one way is removed the other way", () => {
  for (const { text: a } of EXAMPLES.slice(0, 8)) {
    for (const { text: b } of EXAMPLES.slice(0, 8)) {
      const there = changesOfTexts(a, b).changes;
      const back = changesOfTexts(b, a).changes;
      const names = (changes: typeof there, deed: string) =>
        changes
          .filter((one) => one.deed === deed)
          .flatMap(({ sort, subjects }) => subjects.map((one) => `${sort} ${one}`))
          .sort();
      expect(names(there, "added")).toEqual(names(back, "removed"));
      expect(names(there, "tightened").length).toBe(names(back, "loosened").length);
    }
  }
});

describe("a message for a revision", () => {
  const message = (...edits: [string, string][]) => {
    const after = edits.reduce((text, [from, to]) => text.replaceAll(from, to), HEAD);
    return plain(asMessage(changesOfTexts(HEAD, after).changes, 60));
  };

  test("says the new value and the old one", () => {
    expect(message(["100 kΩ", "47 kΩ"])).toBe("R_out 47 kΩ instead of 100 kΩ");
    expect(message(["± 0.1 %", "± 1 %"])).toBe("R_out ± 1 % instead of ± 0.1 %");
  });

  test("ends with how many more there are", () => {
    expect(message(["100 kΩ", "47 kΩ"], ["n = 1.05", "n = 1.1"], ["draws 40", "draws 4"])).toBe(
      "R_out 47 kΩ instead of 100 kΩ; junction n 1.1 instead of 1.05; 1 more change",
    );
    expect(message()).toBe("");
  });
});

test("of nearly two thousand parts that became one none was renamed, and rivals are told at once", () => {
  const parts = Array.from({ length: 1_900 }, (_, k) => `s -- R${k} : resistor 1 kΩ -- ground`);
  const text = (lines: string) => `ground -- IS : current 1 mA -- s\n${lines}\nshow v = s.v\n`;
  const { changes } = changesOfTexts(text(parts.join("\n")), text("s -- R_all : resistor 1 kΩ -- ground"));
  const found = changes.flatMap(({ deed, subjects }) => subjects.map((one) => `${deed} ${one}`));
  expect(found).toEqual(["added R_all", ...parts.map((_, k) => `removed R${k}`)]);
});
