import { describe, expect, it } from "vitest";
import { branchLines } from "@/app/_components/curves/branch-lines";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { accountOf } from "@/app/_components/curves/failed-spans";
import { storeysOf, usualChoice } from "@/app/_components/curves/storeys";
import { summarise } from "@/app/_components/curves/summary-sentence";

/** Made up: an S of three branches over five values; the middle one is not stable and joins the others at folds at 3.5 and 1.5. */
function folded(x = [1, 2, 3, 4, 5]): CurveSource {
  const branch = (isStable: boolean, of: (value: number) => number | null) => ({
    stable: x.map((value) => (of(value) === null ? null : isStable)),
    bound: x.map(() => null),
    traces: [{ name: "out", unit: "V", values: x.map(of) }],
  });
  return {
    axes: [{ knob: "V_in", unit: "V", scale: "linear", values: x }],
    traces: [{ name: "out", unit: "V", values: x.map(() => 0) }],
    points: { outcome: x.map(() => "converged" as const) },
    branches: [
      {
        at: [],
        complete: true,
        branches: [
          branch(true, (value) => (value < 3.5 ? value / 100 : null)),
          branch(false, (value) => (value > 1.5 && value < 3.5 ? 5 - value : null)),
          branch(true, (value) => (value > 1.5 ? 5 + value / 100 : null)),
        ],
        folds: [
          { value: 3.5, traces: [1] },
          { value: 1.5, traces: [4.5] },
        ],
      },
    ],
  };
}

const drawn = (source: CurveSource) => {
  const { pieces, folds } = branchLines(curveSet(source)!, "out", 0)!;
  return {
    pieces: pieces.map(({ isStable, x, values }) => [isStable, [...x], [...values]]),
    folds,
  };
};

const WHOLE = {
  pieces: [
    [true, [1, 2, 3, 3.5], [0.01, 0.02, 0.03, 1]],
    [false, [1.5, 2, 3, 3.5], [4.5, 3, 2, 1]],
    [true, [1.5, 2, 3, 4, 5], [4.5, 5.02, 5.03, 5.04, 5.05]],
  ],
  folds: [
    { x: 3.5, value: 1 },
    { x: 1.5, value: 4.5 },
  ],
};

describe("branches of operating points", () => {
  it("meet at the folds, where lines turn back, stable and unstable ones apart", () => {
    expect(drawn(folded())).toEqual(WHOLE);
  });

  it("are the same for a sweep that falls", () => {
    expect(drawn(folded([5, 4, 3, 2, 1]))).toEqual(WHOLE);
  });

  it("are cut where a branch ceases to be stable without a fold", () => {
    const source = folded();
    const [row] = source.branches!;
    const [first] = row!.branches;
    const changed = { ...first!, stable: [true, true, false, null, null] };
    const cut = { ...source, branches: [{ ...row!, folds: [], branches: [changed] }] };
    expect(drawn(cut).pieces).toEqual([
      [true, [1, 2], [0.01, 0.02]],
      [false, [2, 3], [0.02, 0.03]],
    ]);
  });

  it("belong to their own setting", () => {
    const source = folded();
    const axes = [...source.axes, { knob: "T", unit: "K", scale: "list" as const, values: [283, 298] }];
    const [row] = source.branches!;
    const set = curveSet({ ...source, axes, branches: [{ ...row!, at: [{ knob: "T", value: 298 }] }] })!;
    expect(branchLines(set, "out", 0)).toBeNull();
    expect(branchLines(set, "out", 1)?.folds).toHaveLength(2);
  });

  it("are counted in the summary, with where they turn back", () => {
    const set = curveSet(folded())!;
    const said = summarise(set, storeysOf(set, usualChoice(set)), accountOf(set, [0])).replaceAll(
      "\u202f",
      " ",
    );
    expect(said).toContain("There are 3 branches of operating points; they turn back at V_in 3.5 V, 1.5 V.");
  });
});
