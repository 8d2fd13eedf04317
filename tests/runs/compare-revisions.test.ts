import { describe, expect, test } from "vitest";
import { readPair } from "@/app/(work)/[workspace]/netlists/[id]/compare/[pair]/compare-shapes";
import {
  turnsInWords,
  verdictChanges,
} from "@/app/(work)/[workspace]/netlists/[id]/compare/[pair]/verdict-changes";
import type { RequirementDocument, Verdict } from "@/lib/analyses/result";

const required = (label: string, verdict: Verdict) =>
  ({ label, verdict, margin: null, unit: "V", worst: null }) as unknown as RequirementDocument;

describe("verdicts of two runs", () => {
  const rows = verdictChanges(
    [required("a", "holds"), required("b", "broken"), required("c", "holds"), required("old", "holds")],
    [required("c", "holds"), required("b", "no data"), required("a", "broken"), required("new", "holds")],
  );

  test("what turned for the worse comes first, what is as before last", () => {
    expect(rows.map(({ label, turn }) => [label, turn])).toEqual([
      ["a", "worse"],
      ["old", "gone"],
      ["new", "new"],
      ["b", "better"],
      ["c", "same"],
    ]);
    expect(turnsInWords(rows)).toBe(
      "1 turned for the worse, 1 turned for the better, 1 new, 1 gone; 1 as before.",
    );
    expect(turnsInWords(rows.slice(4))).toBe("Every verdict is as before.");
  });

  test("two of one label are paired once each", () => {
    const twice = verdictChanges(
      [required("x", "holds"), required("x", "holds")],
      [required("x", "broken"), required("x", "holds"), required("x", "holds")],
    );
    expect(twice.map(({ turn }) => turn)).toEqual(["worse", "new", "same"]);
  });
});

test.each([
  ["3..5", [3, 5]],
  ["12..1", [12, 1]],
  ["3..draft", [3, "draft"]],
  ["3%2E%2e5", [3, 5]],
  ["%E0%A4%A", null],
  ["draft..3", null],
  ["3..drafts", null],
  ["3..", null],
  ["0..2", null],
  ["3...5", null],
  ["3..5x", null],
  ["3-5", null],
])("the pair %s", (text, pair) => {
  expect(readPair(text)).toEqual(pair);
});
