import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Choice, conflictsIn, mergedText, mergeTexts } from "@/app/_components/diff/merge";

const BASE = 'title "x"\nlet a = 1 V\nlet b = 2 V\nlet c = 3 V\nlet d = 4 V\nshow a\n';
const NOTHING = new Map<number, Choice>();

describe("what only one changed is taken", () => {
  test("mine in one place, theirs in another", () => {
    const mine = BASE.replace("1 V", "10 V");
    const theirs = BASE.replace("4 V", "40 V");
    const parts = mergeTexts(mine, BASE, theirs);
    expect(conflictsIn(parts)).toEqual([]);
    expect(mergedText(parts, NOTHING)).toBe(BASE.replace("1 V", "10 V").replace("4 V", "40 V"));
  });

  test("the same change of both is taken once", () => {
    const both = BASE.replace("1 V", "10 V");
    expect(mergedText(mergeTexts(both, BASE, both), NOTHING)).toBe(both);
  });
});

describe("what both changed is for the reader to choose", () => {
  const parts = mergeTexts(BASE.replace("2 V", "20 V"), BASE, BASE.replace("2 V", "200 V"));

  test("each place with what it was and what each made of it, and the line it stands at", () => {
    expect(conflictsIn(parts)).toEqual([
      { kind: "conflict", mine: ["let b = 20 V"], base: ["let b = 2 V"], theirs: ["let b = 200 V"], line: 3 },
    ]);
    expect(mergedText(parts, NOTHING)).toBeNull();
  });

  test.each([
    [{ take: "mine" }, "let b = 20 V\n"],
    [{ take: "theirs" }, "let b = 200 V\n"],
    [{ take: "mine first" }, "let b = 20 V\nlet b = 200 V\n"],
    [{ take: "theirs first" }, "let b = 200 V\nlet b = 20 V\n"],
    [{ take: "edit", text: "let b = 21 V\n# by hand" }, "let b = 21 V\n# by hand\n"],
    [{ take: "edit", text: "" }, ""],
  ] as const)("%o", (choice, lines) => {
    expect(mergedText(parts, new Map([[0, choice]]))).toBe(BASE.replace("let b = 2 V\n", lines));
  });
});

test("texts of a quarter of a million lines are merged without aligning every line with every other", () => {
  const base = "\n".repeat(250_000);
  const theirs = `${"\n".repeat(125_000)}let b = 2 V\n${"\n".repeat(125_000)}`;
  expect(mergedText(mergeTexts(`${base}let a = 1 V\n`, base, base), NOTHING)).toBe(`${base}let a = 1 V\n`);
  const parts = mergeTexts(`let a = 1 V\n${base}`, base, theirs);
  expect(conflictsIn(parts).length).toBe(1);
  expect(mergedText(parts, new Map([[0, { take: "theirs" }]]))).toBe(theirs);
});

const TEXT = fc
  .array(fc.constantFrom("a", "b", "c", "d", "e"), { maxLength: 12 })
  .map((lines) => (lines.length === 0 ? "" : `${lines.join("\n")}\n`));

test("taking one side everywhere loses no line of that side; a text that nobody else changed stays", () => {
  fc.assert(
    fc.property(TEXT, TEXT, TEXT, (mine, base, theirs) => {
      expect(mergedText(mergeTexts(mine, base, base), NOTHING)).toBe(mine);
      expect(mergedText(mergeTexts(base, base, theirs), NOTHING)).toBe(theirs);
      const parts = mergeTexts(mine, base, theirs);
      const take = (choice: Choice) =>
        mergedText(parts, new Map(conflictsIn(parts).map((_, k) => [k, choice])))!.split("\n");
      // Every line that mine added to the base is in the merge where mine is taken.
      const count = (lines: readonly string[], word: string) => lines.filter((line) => line === word).length;
      const merged = take({ take: "mine first" });
      for (const { mine: a, theirs: b } of conflictsIn(parts))
        for (const line of [...a, ...b]) expect(count(merged, line)).toBeGreaterThan(0);
    }),
    { numRuns: 300 },
  );
});
