import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { completeAt } from "@/lib/language/symbols/completion";
import { EXAMPLES } from "../texts";
import { TEXT } from "./netlist";

/** What is offered where `|` stands in a line added to the netlist, or put in place of `old`. */
function offered(line: string, old?: string): string[] {
  const text = old === undefined ? `${TEXT}${line}\n` : TEXT.replace(old, line);
  const offset = text.indexOf("|");
  const clean = text.slice(0, offset) + text.slice(offset + 1);
  return completeAt(clean, check(clean), offset).map((one) => one.text);
}

describe("what can be written", () => {
  test.each([
    ["at the start of a line", "s|", ["sweep", "seek", "show", "s"]],
    ["as the kind of a model", "model m : |", ["diode", "npn", "pnp", "opamp"]],
    ["as the kind of an element", "Q9 : a|", ["array", "amp"]],
    ["as a unit", "let a = 3 k|", ["kV", "kA", "kΩ", "kW", "kK", "kS", "ks", "kHz", "kC", "kF", "kH", "kJ"]],
    [
      "as a unit right behind its number",
      "let a = 3m|",
      ["mV", "mA", "mΩ", "mW", "mK", "mS", "ms", "mHz", "mC", "mF", "mH", "mJ"],
    ],
    ["as a pin, those given left out", "Q9 : array { c = s, |", ["b", "e"]],
    ["as the net of a pin", "Q9 : array { c = |", ["ground", "s", "ls", "x"]],
    ["as a net or knob of a block", "T : log_stage { in = s, |", ["out", "R"]],
    ["as a parameter", "model m : diode { Is = 1 nA, n|", ["n", "n_breakdown"]],
    ["as a net on a path", "s -- |", ["ground", "s", "ls", "x"]],
    ["as the knob of a sweep", "sweep |", ["I_in", "temperature"]],
    ["after the knob of a sweep", "sweep I_in |", ["from", "over"]],
    ["after a dot behind a net", "show ls.|", ["v"]],
    ["after a dot behind a transistor in a block", "show S.Q.|", ["c", "b", "e"]],
    ["after a dot behind its pin", "show S.Q.c.|", ["i"]],
    ["after a dot behind a resistor", "show RL.|", ["v", "i", "p"]],
    ["after a dot behind an instance", "show S.|", ["in", "out", "R", "Q", "RE", "A", "x"]],
    ["after a dot behind a net of an instance", "show S.in.|", ["v", "i"]],
    ["after a dot behind a net inside a block", "show S.x.|", ["v"]],
    ["as the knob of a window", "read a = highest(ls) for |", ["I_in", "temperature"]],
    ["after a value of a requirement", "require top w|", ["within"]],
    ["in a comment", "# s|", []],
    ["in a text", 'title "s|', []],
  ])("%s", (_, line, texts) => {
    expect(offered(line).sort()).toEqual([...texts].sort());
  });

  test("names of traces, readings and reductions in a contract, not in a let", () => {
    expect(offered("require |")).toEqual(
      expect.arrayContaining(["ls", "top", "highest", "abs", "I_in", "RL"]),
    );
    const value = offered("let a = |");
    expect(value).toEqual(expect.arrayContaining(["R_out", "I_in", "exp", "pi"]));
    for (const wrong of ["top", "highest", "RL", "s"]) expect(value).not.toContain(wrong);
  });

  test("names of the block inside it, and no statement of the file", () => {
    const nets = offered("  x -- |", "  x -- RE : resistor R -- out");
    expect(nets.sort()).toEqual(["ground", "in", "out", "x"]);
    const first = offered("  |", "  x -- RE : resistor R -- out");
    expect(first).toEqual(expect.arrayContaining(["knob", "let", "model", "block"]));
    expect(first).not.toContain("sweep");
  });

  test("replaces what is begun and says a line about each", () => {
    const text = `${TEXT}sweep tem`;
    const [only, ...others] = completeAt(text, check(text), text.length);
    expect(others).toEqual([]);
    expect(only).toMatchObject({ text: "temperature", what: "knob", from: text.length - 3, to: text.length });
    expect(only!.about).not.toBe("");
  });

  test("is found at every offset of every example, without a throw", { timeout: 120_000 }, () => {
    for (const [, text] of EXAMPLES) {
      const checked = check(text);
      for (let offset = 0; offset <= text.length; offset += 61) {
        for (const one of completeAt(text, checked, offset)) expect(one.from).toBeLessThanOrEqual(offset);
      }
    }
  });
});
