import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { hoverAt } from "@/lib/language/symbols/hover";
import { place, TEXT } from "./netlist";

const checked = check(TEXT);
const linesAt = (offset: number) =>
  hoverAt(TEXT, checked, offset)?.lines.map((line) => line.replace(/\u202f/gu, " "));

describe("the text under the pointer", () => {
  test.each([
    ["a knob", place("I_in"), ["knob I_in = 1 µA", "1.000 µA at the defaults", "swept over 121 values"]],
    ["a let with a tolerance", place("R_out"), ["let R_out = 10 kΩ ± 0.1 %", "10.00 kΩ at the defaults"]],
    ["a let of a let", place("twice", 1), ["let twice = 2 * R_out", "20.00 kΩ at the defaults"]],
    ["a knob of a block", place("R = 1 kΩ"), ["knob R = 1 kΩ", "S.R = 2.000 Ω"]],
    ["a model", place("array"), ["model array: npn, NPN transistor (Ebers–Moll, Gummel–Poon)"]],
    [
      "an element that follows one",
      place("Q :"),
      ["element Q: array, npn, NPN transistor (Ebers–Moll, Gummel–Poon)"],
    ],
    ["a block", place("log_stage"), ["block log_stage(in, out)", "knobs: R"]],
    ["an instance", place("\nS :", 0, 1), ["S: an instance of log_stage(in, out)"]],
    ["a net", place("ls -- RL"), ["net ls, wired to S.out, RL, R2"]],
    ["a net of a head", place("in, out"), ["net in of the block, joined to a net outside"]],
    ["a trace", place("show ls", 0, 5), ["trace ls = ls.v"]],
    ["a reading", place("top"), ["reading top = highest(ls)"]],
    ["a pin", place("c = in"), ["pin c of array"]],
    ["a parameter", place("Is = "), ["Is: saturation current Is at T0; in A; must be given"]],
    [
      "a parameter that may be left out",
      place("beta_f"),
      ["beta_f: forward current gain; a pure number; left out: no base current of the forward junction"],
    ],
    ["a prefixed unit", place("kΩ"), ["10^3 Ω"]],
    ["a unit", place("1 V", 0, 2), ["the coherent unit V"]],
    ["a statement", place("sweep"), ["turns a knob over a range; the first sweep is the horizontal axis"]],
    ["a reduction", place("highest"), ["the highest value of a trace"]],
    ["a function", place("abs"), ["the size without its sign"]],
    ["a kind", place("npn"), ["npn: NPN transistor (Ebers–Moll, Gummel–Poon)"]],
    ["a kind on a path", place("current"), ["current: drives its value from left to right"]],
    [
      "a signal",
      place("ls.v", 0, 3),
      [
        "voltage: of a net to ground, of an element the left net less the right one, so that of a `voltage` element is minus its value",
      ],
    ],
  ])("tells of %s", (_, offset, lines) => {
    expect(linesAt(offset)).toEqual(lines);
  });

  test("covers the word, and there is none over a blank or a number", () => {
    expect(hoverAt(TEXT, checked, place("twice", 0, 2))).toMatchObject({
      from: place("twice"),
      to: place("twice", 0, 5),
    });
    expect(hoverAt(TEXT, checked, place("\n\n", 0, 1))).toBeNull();
    expect(hoverAt(TEXT, checked, place("240"))).toBeNull();
  });

  test("tells of a name in a text with errors, without a value", () => {
    const broken = TEXT.replace("resistor twice", "resistor thrice");
    const hover = hoverAt(broken, check(broken), broken.indexOf("R_out"));
    expect(hover?.lines).toEqual(["let R_out = 10 kΩ ± 0.1 %"]);
  });
});
