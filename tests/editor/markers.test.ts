import { expect, test } from "vitest";
import { examine } from "@/app/_components/editor/examine";
import { markersOf, mend, rangeOf, spellCode } from "@/app/_components/editor/markers";
import { messagePieces } from "@/app/_components/editor/message-text";
import { hexOf } from "@/app/_components/editor/monaco-theme";

test("a span of UTF-16 offsets stands at lines and columns from 1", () => {
  const text = "let Ω = 1 V\nlet b = 2 V";
  expect(rangeOf(text, { from: 16, to: 17 })).toEqual({
    startLineNumber: 2,
    startColumn: 5,
    endLineNumber: 2,
    endColumn: 6,
  });
});

test("a place beyond the text, as of a text that was longer, stands at its end", () => {
  expect(rangeOf("ab", { from: 7, to: 9 })).toMatchObject({
    startLineNumber: 1,
    startColumn: 3,
    endColumn: 3,
  });
});

test("an empty span is marked at the character before it, so that there is something to see", () => {
  const none = { severity: "error", code: "FRM1", message: "Something is missing." } as const;
  const [atEnd] = markersOf("let a =", [{ ...none, from: 7, to: 7 }]);
  expect(atEnd).toMatchObject({ startColumn: 7, endColumn: 8, code: "FRM 1", severity: 8 });
  const [atLineStart] = markersOf("a\nb", [{ ...none, from: 2, to: 2 }]);
  expect(atLineStart).toMatchObject({ startLineNumber: 2, startColumn: 1, endColumn: 2 });
});

test("the fix of a problem, put in, leaves a text without it", () => {
  const text =
    'title "T"\nlet R = 10k\nground -- V1 : voltage 1 V -- a -- R1 : resistor R -- ground\nshow a.v\n';
  const problem = examine(text).diagnostics.find(({ fix }) => fix !== undefined)!;
  expect(spellCode(problem.code)).toBe("UNI 2");
  const mended = mend(text, problem.fix!);
  expect(mended).toContain("10 kΩ");
  expect(examine(mended).diagnostics).toEqual([]);
});

test("what a sentence quotes is set apart; a lone back quote is a character", () => {
  const cut = (message: string) =>
    messagePieces(message).map(({ quoted, text }) => (quoted ? `[${text}]` : text));
  expect(cut("Write `10 kΩ`, not `10k`.")).toEqual(["Write ", "[10 kΩ]", ", not ", "[10k]", "."]);
  expect(cut("A lone ` stays.").join("")).toBe("A lone ` stays.");
  expect(cut("")).toEqual([]);
});

test("a computed colour as the editor wants it", () => {
  expect(hexOf("rgb(251, 250, 6)")).toBe("#fbfa06");
  expect(hexOf("rgba(0, 10, 255, 0.5)")).toBe("#000aff");
});
