import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { lineEdits } from "@/app/_components/editor/line-edits";
import { format } from "@/lib/language/format";
import { applied } from "@/lib/language/symbols/rename";
import { EXAMPLES } from "../language/texts";

describe("edits by lines", () => {
  test("touch only lines that differ", () => {
    const before = "one\ntwo\nthree\nfour\n";
    const edits = lineEdits(before, "one\nTWO\nthree\nfour\n");
    expect(edits).toEqual([{ from: 4, to: 8, text: "TWO\n" }]);
  });

  test.each([
    ["", "a"],
    ["a", ""],
    ["a\nb", "a\nb\n"],
    ["a\nb\n", "a\nb"],
    ["a\n\n\nb", "a\n\nb"],
    ["b", "a\nb"],
    ["a\nb\nc", "c"],
  ])("make %j into %j", (before, after) => {
    expect(applied(before, lineEdits(before, after))).toBe(after);
  });

  test("make any text into any other, in order and without overlap", () => {
    const text = fc
      .array(fc.constantFrom("a", "b", "c", "", "dd"), { maxLength: 24 })
      .map((all) => all.join("\n"));
    fc.assert(
      fc.property(text, text, (before, after) => {
        const edits = lineEdits(before, after);
        expect(applied(before, edits)).toBe(after);
        edits.slice(1).forEach((edit, k) => {
          expect(edit.from).toBeGreaterThanOrEqual(edits[k]!.to);
        });
      }),
      { seed: 5, numRuns: 2000 },
    );
  });

  test("formatting what is formatted edits nothing", () => {
    for (const [, text] of EXAMPLES) {
      const formatted = format(text);
      expect(lineEdits(formatted, format(formatted))).toEqual([]);
    }
  });
});
