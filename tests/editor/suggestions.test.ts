import { describe, expect, test } from "vitest";
import { blankAsks, editorSnippet, suggestionsOf } from "@/app/_components/editor/suggestions";
import { check } from "@/lib/language/checker";
import { completeAt } from "@/lib/language/symbols/completion";

describe("completions as the editor takes them", () => {
  const text = "model q : npn { Is = 1 fA }\nQ : q { c = a,  }\nlet a1 = 3 ko";
  const at = (offset: number) => suggestionsOf(text, completeAt(text, check(text), offset));

  test("stand at the cursor, in the order of the language, with a word on what they are", () => {
    const found = at(text.indexOf(",  }") + 2);
    expect(found.map(({ label, detail, sortText }) => [label, detail, sortText])).toEqual([
      ["b", "pin", "0000"],
      ["e", "pin", "0001"],
    ]);
    expect(found[0]!.range).toEqual({
      startLineNumber: 2,
      startColumn: 16,
      endLineNumber: 2,
      endColumn: 16,
    });
    expect(found[0]).toMatchObject({ insertText: "b = ", goesOn: true, about: "pin b of q" });
  });

  test("replace what is begun, and are found by their other spelling", () => {
    const [unit] = at(text.length);
    expect(unit).toMatchObject({ label: "kΩ", filterText: "kΩ kohm", goesOn: false });
    expect(unit!.range).toMatchObject({ startLineNumber: 3, startColumn: 12, endColumn: 14 });
  });
});

describe("places to fill", () => {
  test.each([
    ["let ‹name› = ‹1 kΩ›", "let $" + "{1:name} = $" + "{2:1 kΩ}"],
    ["block ‹b›(‹in›) {\n  ‹›\n}", "block $" + "{1:b}($" + "{2:in}) {\n  $0\n\\}"],
    ["min(‹›, ‹›)", "min($1, $0)"],
    ["a $ } \\", "a \\$ \\} \\\\"],
    ["‹a}b›", "$" + "{1:a\\}b}"],
  ])("%s", (ours, theirs) => {
    expect(editorSnippet(ours)).toBe(theirs);
  });
});

test("a blank asks for a list where something must follow, and never where a line may end", () => {
  for (const line of [
    "Q1 : ",
    "Q1 : array { ",
    "{ c = s, ",
    "{ c = ",
    "a -- ",
    "sweep ",
    "x for ",
    "± 1 % track ",
  ]) {
    expect([line, blankAsks(line)]).toEqual([line, true]);
  }
  for (const line of ["let R ", "let R = 1 kΩ ", "# a : ", "", "  ", "Q1 :", "rising "]) {
    expect([line, blankAsks(line)]).toEqual([line, false]);
  }
});
