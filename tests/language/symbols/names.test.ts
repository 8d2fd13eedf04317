import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { lineStarts, placeOf } from "@/lib/language/span";
import { completeAt } from "@/lib/language/symbols/completion";
import { hoverAt } from "@/lib/language/symbols/hover";
import { definitionAt, referencesAt } from "@/lib/language/symbols/navigate";
import { outlineOf } from "@/lib/language/symbols/outline";
import { applied, renameAt } from "@/lib/language/symbols/rename";
import { symbolsOf } from "@/lib/language/symbols/symbols";
import { anyText, EXAMPLES } from "../texts";
import { place, TEXT } from "./netlist";

const checked = check(TEXT);
const symbols = symbolsOf(checked.netlist, TEXT);
const starts = lineStarts(TEXT);
const at = (span: { from: number } | null) => {
  if (span === null) return null;
  const { line, column } = placeOf(starts, span.from);
  return `${line}:${column}`;
};
const referencesOf = (offset: number) => referencesAt(symbols, offset).map(at);

test("the netlist of these tests is sound", () => {
  expect(checked.diagnostics).toEqual([]);
});

describe("definition and references", () => {
  test.each([
    ["a knob, from a sweep", place("I_in from"), "3:6", ["3:6", "17:24", "23:7", "26:28", "27:27"]],
    ["a let, from another let", place("R_out", 1), "4:5", ["4:5", "5:17", "19:21", "21:20"]],
    ["a net, first named in a setting", place("ls.v"), "18:31", ["18:31", "19:1", "20:29", "25:11"]],
    ["a trace of the same name, from a contract", place("abs(ls)", 0, 4), "25:6", ["25:6", "26:20", "27:13"]],
    ["a reading", place("top <="), "26:6", ["26:6", "28:9"]],
    ["a block, from its instance", place("log_stage", 1), "10:7", ["10:7", "18:5"]],
    ["an instance, from a signal", place("S.x.v"), "18:1", ["18:1", "25:17", "25:24"]],
    ["a net inside, from a signal outside", place("S.x.v", 0, 2), "12:39", ["12:39", "13:3", "25:19"]],
    ["the net outside of the same name", place("x -- R2"), "20:1", ["20:1", "21:1"]],
    ["a net of the head, from its instance", place("in = s"), "10:17", ["10:17", "12:19", "14:36", "18:17"]],
    ["a knob of the block, from its instance", place("R = 2 Ω"), "11:8", ["11:8", "13:22", "18:35"]],
    ["a model, from inside the block", place("array {"), "7:7", ["7:7", "12:7"]],
  ])("of %s", (_, offset, definition, references) => {
    expect(at(definitionAt(symbols, offset))).toBe(definition);
    expect(referencesOf(offset)).toEqual(references);
  });

  test("ground has places but no definition; a keyword, a number, a pin and a blank have neither", () => {
    expect(definitionAt(symbols, place("ground"))).toBeNull();
    expect(referencesOf(place("ground"))).toHaveLength(5);
    for (const offset of [place("sweep"), place("20 per", 0, 1), place("c = in"), place("\n\n", 0, 1)]) {
      expect(definitionAt(symbols, offset)).toBeNull();
      expect(referencesOf(offset)).toEqual([]);
    }
  });

  test("a name is found from just behind its last letter", () => {
    expect(at(definitionAt(symbols, place("I_in from", 0, 4)))).toBe("3:6");
  });

  test("names of a text that cannot be read whole are found where they can", () => {
    const broken = TEXT.replace("let twice = 2 * R_out", "let twice = 2 * (R_out");
    const { netlist } = check(broken);
    const found = symbolsOf(netlist, broken).at(broken.indexOf("R_out --"));
    expect(found?.symbol.places.length).toBeGreaterThanOrEqual(3);
  });
});

describe("renaming", () => {
  const renamed = (offset: number, name: string) => {
    const renaming = renameAt(TEXT, offset, name);
    return "edits" in renaming ? applied(TEXT, renaming.edits) : renaming.refusal;
  };

  test("changes every place of the name and no other", () => {
    const text = renamed(place("x -- RE"), "core");
    expect(text).toContain("e = core }\n  core -- RE");
    expect(text).toContain("S.core.v");
    expect(text).toContain("\nx -- R2");
    expect(check(text).diagnostics).toEqual([]);
  });

  test("keeps a net and a trace of one name apart", () => {
    expect(renamed(place("ls.v"), "log")).toContain("show ls = log.v");
    expect(renamed(place("show ls", 0, 5), "level")).toContain("show level = ls.v");
  });

  test.each([
    ["I_in", "2x", "made of letters"],
    ["I_in", "a b", "made of letters"],
    ["I_in", "I_in", "its name already"],
    ["I_in", "sweep", "word of the language"],
    ["I_in", "exp", "word of the language"],
    ["I_in", "R_out", "is taken"],
    ["R_out", "RE", "is taken"],
    ["ground", "earth", "belongs to the language"],
    [" = ", "other", "no name here"],
  ])("of %s to %s is refused", (part, name, reason) => {
    expect(renamed(place(part, 0, part === " = " ? 2 : 0), name)).toContain(reason);
  });
});

test("the outline has what a netlist declares and asks for, in its order", () => {
  const lines = outlineOf(checked.netlist, TEXT).map(({ name, what }) => `${what} ${name}`);
  expect(lines).toEqual([
    ...["knob I_in", "let R_out", "let twice", "model array", "model amp", "block log_stage", "element IS"],
    ...["element S", "element RL", "element R2", "element R3", "sweep I_in", "trace ls", "trace S.x.v"],
    ...["trace S.Q.c.i", "reading top", "requirement small", "requirement top"],
  ]);
  const block = outlineOf(checked.netlist, TEXT).find(({ what }) => what === "block");
  expect(block!.inside.map(({ name }) => name)).toEqual(["R", "Q", "RE", "A"]);
});

describe("in every example", () => {
  test.each(EXAMPLES)(
    "%s: a place holds the name that it is said to, and each name is renamed soundly",
    (_, text) => {
      const netlist = check(text).netlist;
      const found = symbolsOf(netlist, text);
      expect(found.occurrences.length).toBeGreaterThan(10);
      for (const { symbol, from, to } of found.occurrences) expect(text.slice(from, to)).toBe(symbol.name);
      const some = [...found.file.names.values()]
        .filter(({ definition }) => definition !== null)
        .slice(0, 12);
      for (const { name, definition } of some) {
        if (name === "temperature") continue;
        const renaming = renameAt(text, definition!.from, `${name}_renamed`);
        expect(renaming).toHaveProperty("edits");
      }
    },
  );
});

test("no text makes any of it throw, and a place always holds its name", { timeout: 120_000 }, () => {
  fc.assert(
    fc.property(anyText, fc.nat(), (text, chance) => {
      const any = check(text);
      const offset = chance % (text.length + 1);
      for (const { symbol, from, to } of symbolsOf(any.netlist, text).occurrences) {
        expect(text.slice(from, to)).toBe(symbol.name);
      }
      hoverAt(text, any, offset);
      completeAt(text, any, offset);
      outlineOf(any.netlist, text);
      const renaming = renameAt(text, offset, "renamed");
      if ("edits" in renaming) applied(text, renaming.edits);
    }),
    { seed: 11, numRuns: 400 },
  );
});
