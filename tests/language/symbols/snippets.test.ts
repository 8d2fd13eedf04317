import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { KINDS, MODEL_KINDS } from "@/lib/language/kinds";
import { completeAt } from "@/lib/language/symbols/completion";
import { TEXT } from "./netlist";

/** What the netlist is when the completion `wanted` at `|` is taken and its places keep their texts. */
function taken(line: string, wanted: string): string {
  const text = `${TEXT}${line}\n`;
  const offset = text.indexOf("|");
  const clean = text.slice(0, offset) + text.slice(offset + 1);
  const found = completeAt(clean, check(clean), offset).find((one) => one.text === wanted);
  if (found === undefined) throw new Error(`${wanted} is not offered.`);
  const put = (found.snippet ?? found.text).replace(/[‹›]/gu, "");
  return clean.slice(0, found.from) + put + clean.slice(found.to);
}

/** Mistakes of form, names and units; what is wired to what is for the writer to say. */
function mistakes(text: string): string[] {
  return check(text).diagnostics.map(({ code, message }) => `${code} ${message}`);
}

describe("what a completion puts in is right as it stands", () => {
  test.each(["let", "knob", "model", "block", "draws", "seek", "show", "read", "require"])("%s", (word) => {
    expect(mistakes(taken("|", word))).toEqual([]);
  });

  test("sweep", () => {
    expect(mistakes(taken("|", "sweep"))).toEqual([]);
    expect(taken("|", "sweep")).toContain("sweep temperature from 10 °C to 40 °C, 4 points");
  });

  test("title, in a file that has none", () => {
    expect(check('title "Name"\n').diagnostics.filter(({ code }) => code.startsWith("FRM"))).toEqual([]);
    expect(taken("|", "title")).toContain('title "Name"');
  });

  test.each(MODEL_KINDS)("a model of %s", (kind) => {
    expect(mistakes(taken("model m : |", kind))).toEqual([]);
  });

  test.each([
    ["array", "Q9 : array { c = c, b = b, e = e }"],
    ["amp", "Q9 : amp { plus = plus, minus = minus, out = out }"],
    ["log_stage", "Q9 : log_stage { in = in, out = out }"],
    ["gain", "Q9 : gain { plus = plus, minus = minus, out = out, ratio = 10 }"],
    ["law", "Q9 : law { plus = plus, minus = minus, volts = 1 V }"],
  ])("an element that follows %s", (of, written) => {
    expect(taken("Q9 : |", of)).toContain(written);
    expect(mistakes(taken("Q9 : |", of))).toEqual([]);
  });

  test.each(["resistor", "voltage", "current", "law"])("%s on a path", (kind) => {
    expect(mistakes(taken("s -- X9 : |", kind).replace(/\n$/, " -- ls\n"))).toEqual([]);
  });

  test.each(
    MODEL_KINDS.flatMap((kind) => Object.keys(KINDS[kind].parameters).map((name) => [kind, name] as const)),
  )("of %s the parameter %s", (kind, name) => {
    const { absent, needs } = KINDS[kind].parameters[name]!;
    const asked = Object.entries(KINDS[kind].parameters).filter(
      ([other, one]) => other !== name && (one.absent === null || other === needs),
    );
    const others = asked.map(([other, one]) => `${other} = ${one.unit === "1" ? "2" : `2 ${one.unit}`}, `);
    expect(absent === null || absent !== "").toBe(true);
    const text = taken(`model m : ${kind} { ${others.join("")}|`, name).replace(/\n$/, " }\n");
    expect(mistakes(text)).toEqual([]);
  });

  test("a knob of a block comes with the block's default", () => {
    expect(taken("T : log_stage { in = s, out = x, |", "R")).toContain("out = x, R = 1 kΩ");
  });

  test("a sweep spans decades in the unit of its knob", () => {
    expect(taken("sweep I_in |", "from")).toContain("from 1 µA to 100 µA, 10 per decade");
    expect(mistakes(taken("sweep temperature |", "from"))).toEqual([]);
    expect(mistakes(taken("sweep temperature |", "over"))).toEqual([]);
  });
});

describe("what can follow a value", () => {
  const offered = (line: string) => {
    const text = TEXT + line;
    return completeAt(text, check(text), text.length).map((one) => one.text);
  };
  test.each([
    ["let a = 1 V ", ["±"]],
    ["knob a = 1 V ", ["±", "in"]],
    ["let a = 1 V ± 1 % ", ["uniform", "normal", "track"]],
    ["let a = 1 V ± 1 % normal 3 sigma ", ["track"]],
    ["sweep I_in from 1 nA ", ["to"]],
    ["sweep I_in from 1 nA to 1 mA, 20 per de", []],
    ["require ls ", ["within", "between", "rising", "falling"]],
    ["require ls rising ", ["for", "at", "in", "as"]],
    ["read a = highest(ls) ", ["for", "at"]],
  ])("%s", (line, wanted) => {
    expect(offered(line)).toEqual(wanted);
  });

  test("the count of a sweep, beside the units", () => {
    expect(offered("sweep I_in from 1 nA to 1 mA, 20 ")).toEqual(
      expect.arrayContaining(["per decade", "points"]),
    );
  });

  test("a net that is only being written stays in the list, and says that it is new", () => {
    const text = `${TEXT}x -- R9 : resistor 1 Ω -- l`;
    const found = completeAt(text, check(text), text.length);
    expect(found.map((one) => [one.text, one.what])).toEqual([
      ["ls", "net"],
      ["l", "new net"],
    ]);
  });

  test("a unit is found by its spelling without Ω, µ and °", () => {
    expect(offered("let a = 3 kohm")).toEqual(["kΩ"]);
    expect(offered("let a = 3 uA")).toContain("µA");
    expect(offered("let a = 3 deg")).toContain("°C");
  });
});
