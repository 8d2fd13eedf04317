import { describe, expect, test } from "vitest";
import { curveSet } from "@/app/_components/curves/curve-set";
import { bothCurves, onlyIn } from "@/app/(work)/[workspace]/netlists/[id]/compare/[pair]/both-curves";
import { readPair } from "@/app/(work)/[workspace]/netlists/[id]/compare/[pair]/compare-shapes";
import {
  turnsInWords,
  verdictChanges,
} from "@/app/(work)/[workspace]/netlists/[id]/compare/[pair]/verdict-changes";
import type { RequirementDocument, RunDocument, Verdict } from "@/lib/analyses/result";

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

describe("curves of two runs", () => {
  const run = (values: readonly number[], traces: Record<string, readonly (number | null)[]>) =>
    ({
      axes: [{ knob: "I", unit: "A", scale: "list", values }],
      draws: 1,
      traces: Object.entries(traces).map(([name, column]) => ({ name, unit: "V", values: column })),
      points: {
        outcome: values.flatMap(() => ["converged", "converged"]),
        bound: values.flatMap(() => [1e-12, 1e-12]),
      },
    }) as unknown as RunDocument;

  test("stand over one axis with the revision as the last, the nominal design alone", () => {
    const before = run([1, 2], { v: [10, 20, 90, 90], gone: [0, 0, 0, 0] });
    const after = run([1, 2], { v: [11, null, 90, 90], come: [0, 0, 0, 0] });
    const both = bothCurves({ revision: 3, document: before }, { revision: 5, document: after })!;
    expect(both.traces.map(({ name, values }) => [name, [...values]])).toEqual([["v", [10, 20, 11, null]]]);
    expect(curveSet(both)!.families.map(({ label }) => label)).toEqual(["revision 3", "revision 5"]);
    expect(both.points.outcome.length).toBe(4);
    expect([onlyIn(before, after), onlyIn(after, before)]).toEqual([["gone"], ["come"]]);
  });

  test("cannot stand over one axis where their sweeps differ", () => {
    const before = run([1, 2], { v: [1, 2, 3, 4] });
    expect(
      bothCurves({ revision: 1, document: before }, { revision: 2, document: run([1, 3], {}) }),
    ).toBeNull();
  });
});

test.each([
  ["3..5", [3, 5]],
  ["12..1", [12, 1]],
  ["3..", null],
  ["0..2", null],
  ["3...5", null],
  ["3..5x", null],
  ["3-5", null],
])("the pair %s", (text, pair) => {
  expect(readPair(text)).toEqual(pair);
});
