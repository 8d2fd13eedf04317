import { describe, expect, test } from "vitest";
import { check } from "@/lib/language/checker";
import { completeAt } from "@/lib/language/symbols/completion";
import { hoverAt } from "@/lib/language/symbols/hover";
import { definitionAt, referencesAt } from "@/lib/language/symbols/navigate";
import { renameAt } from "@/lib/language/symbols/rename";
import { symbolsOf } from "@/lib/language/symbols/symbols";

const SHELF = `let R_in = 5 kΩ
model array : npn { Is = 0.4 fA }
block stage(in, out) {
  knob R = R_in ± 1 %
  in -- RS : resistor R -- out
}
`;
const library = (name: string) => (name === "parts" ? SHELF : null);
const TEXT = `use "parts" revision 3
knob V_in = 1 V
ground -- VS : voltage V_in -- a
S : stage { in = a, out = b, R = 2 kΩ }
b -- RL : resistor 1 kΩ ± 1 % track NET within 0.1 % -- ground
b -- RM : resistor 1 kΩ ± 1 % track NET within 0.1 % -- ground
Q : array { c = b, b = a, e = ground }
sweep V_in from 1 V to 2 V, 3 points
show b.v, S.RS.i
`;
const checked = check(TEXT, { library });
const symbols = symbolsOf(checked.netlist, TEXT, library);
const at = (part: string) => TEXT.indexOf(part);

describe("names that a shelf brings in", () => {
  test("the netlist of these tests is sound", () => {
    expect(checked.diagnostics).toEqual([]);
  });

  test("are found in the file, with the shelf's name as their definition", () => {
    expect(definitionAt(symbols, at("stage {"))).toEqual({ from: 4, to: 11 });
    expect(definitionAt(symbols, at("array {"))).toEqual({ from: 4, to: 11 });
    expect(referencesAt(symbols, at("RS.i")).map(({ from }) => from)).toEqual([at("RS.i")]);
    expect(referencesAt(symbols, at("R = 2")).map(({ from }) => from)).toEqual([at("R = 2")]);
  });

  test("are told of in the words of the shelf's own text", () => {
    const lines = (part: string) => hoverAt(TEXT, checked, at(part), symbols)?.lines;
    expect(lines("stage {")).toEqual(["block stage(in, out)", "knobs: R", 'from the shelf "parts"']);
    expect(lines("R = 2")![0]).toBe("knob R = R_in ± 1 %");
    expect(lines("array {")!.at(-1)).toBe('from the shelf "parts"');
  });

  test("are offered, with the nets and knobs of a block", () => {
    const offered = (line: string) => {
      const text = TEXT + line;
      return completeAt(text, check(text, { library }), text.length, library).map((one) => one.text);
    };
    expect(offered("X : ")).toEqual(expect.arrayContaining(["array", "stage"]));
    expect(offered("X : ")).not.toContain("R_in");
    expect(offered("X : stage { in = a, ")).toEqual(["out", "R"]);
    expect(offered("show S.")).toEqual(expect.arrayContaining(["in", "out", "R", "RS"]));
  });

  test("keep their names here", () => {
    const renaming = renameAt(TEXT, at("stage {"), "other", { library });
    expect(renaming).toEqual({ refusal: expect.stringContaining('comes from the shelf "parts"') });
  });

  test("are unknown, and nothing throws, where no library is at hand", () => {
    const alone = symbolsOf(checked.netlist, TEXT);
    expect(alone.at(at("stage {"))).toBeNull();
    expect(alone.at(at("S :"))?.symbol.meaning).toBe("element");
  });

  test("a shelf that uses itself is looked into no further", () => {
    const own = symbolsOf(check(TEXT).netlist, TEXT, () => `use "parts"\n${SHELF}`);
    expect(own.at(at("stage {"))?.symbol.meaning).toBe("block");
  });
});

describe("groups that tolerances track with", () => {
  test("have places, a meaning and a new name on demand", () => {
    expect(referencesAt(symbols, at("NET within"))).toHaveLength(2);
    expect(hoverAt(TEXT, checked, at("NET within"), symbols)?.lines).toEqual([
      "group NET: what tracks with it shares one draw; 2 values follow it",
    ]);
    const renaming = renameAt(TEXT, at("NET within"), "PAIR", { library });
    expect("edits" in renaming && renaming.edits.map(({ text }) => text)).toEqual(["PAIR", "PAIR"]);
  });

  test("are offered after the word that asks for one", () => {
    const text = `${TEXT}let z = 1 V ± 1 % track `;
    expect(completeAt(text, check(text), text.length).map((one) => one.text)).toEqual(["NET"]);
  });
});
