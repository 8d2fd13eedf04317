import { describe, expect, it } from "vitest";
import type { CurveSource } from "@/app/_components/curves/curve-source";
import { readRuns } from "@/app/(work)/[workspace]/runs/compare/compare-shapes";
import { readCompareState, writeCompareState } from "@/app/(work)/[workspace]/runs/compare/compare-state";
import { movedInWords } from "@/app/(work)/[workspace]/runs/compare/compared-readings";
import { laidOver, settingsIn, subtracted } from "@/app/(work)/[workspace]/runs/compare/comparison";
import { sideBySide } from "@/app/(work)/[workspace]/runs/compare/side-by-side";

/** Made up: one trace with the values given, over a sweep of I and the temperatures given. */
function run(
  x: readonly number[],
  values: readonly (number | null)[],
  temperatures: readonly number[] = [],
  trace = "out",
): CurveSource {
  const outer = { knob: "temperature", unit: "K", scale: "list" as const, values: temperatures };
  return {
    axes: [
      { knob: "I", unit: "A", scale: "logarithmic", values: x },
      ...(temperatures.length > 0 ? [outer] : []),
    ],
    traces: [{ name: trace, unit: "V", values }],
    points: { outcome: values.map((value) => (value === null ? "undetermined" : "converged")) },
  };
}

const decades = [1, 10, 100];
const columns = (source: CurveSource | null) =>
  source?.traces.map(({ name, values }) => [
    name,
    [...values].map((one) => Number((one ?? Number.NaN).toFixed(9))),
  ]);

describe("runs laid over each other", () => {
  it("keep those with a ruler in common and say of the others why not", () => {
    const other = {
      ...run(decades, [1, 2, 3]),
      axes: [{ knob: "V", unit: "V", scale: "linear" as const, values: decades }],
    };
    const none = { ...run([1], [1]), axes: [] };
    const { source, apart } = laidOver([
      { label: "A", source: run(decades, [1, 2, 3]) },
      { label: "B", source: other },
      { label: "C", source: none },
      { label: "D", source: run(decades, [4, 5, 6], [], "other") },
    ]);
    expect(source?.axes.at(-1)?.names).toEqual(["A", "D"]);
    expect(apart).toEqual([
      "Run B sweeps V and run A I, so they have no ruler in common.",
      "Run C sweeps nothing, so it has no curve.",
      "Only run A has out.",
      "Only run D has other.",
    ]);
  });

  it("do not take two things of one name for one", () => {
    const amperes = { ...run(decades, [1, 2, 3]), traces: [{ name: "out", unit: "A", values: [1, 2, 3] }] };
    const { apart } = laidOver([
      { label: "A", source: run(decades, [1, 2, 3]) },
      { label: "B", source: amperes },
    ]);
    expect(apart).toEqual([
      "out is in V in run A and in A in run B: two things of one name, which are not compared.",
    ]);
  });

  it("are nothing where nothing is swept", () => {
    const none = { ...run([1], [1]), axes: [] };
    expect(laidOver([{ label: "A", source: none }]).source).toBeNull();
  });
});

describe("the difference from the first run", () => {
  it("stands at values that both solved, setting by setting", () => {
    const { source, apart } = subtracted(
      [
        { label: "A", source: run(decades, [1, 2, 3, 10, 20, 30], [273.15, 298.15]) },
        { label: "B", source: run(decades, [1.5, 2, 2, 11, 22, null], [273.15, 298.15]) },
      ],
      null,
    );
    expect(columns(source)).toEqual([["Δ out", [0.5, 0, -1, 1, 2, Number.NaN]]]);
    expect(apart).toEqual([]);
  });

  it("leaves out what only one of them swept, rather than read between points", () => {
    const { source, apart } = subtracted(
      [
        { label: "A", source: run([1, 10, 100], [1, 2, 3]) },
        { label: "B", source: run([1, 5, 100], [2, 9, 5]) },
      ],
      null,
    );
    expect(source?.axes[0]?.values).toEqual([1, 100]);
    expect(columns(source)).toEqual([["Δ out", [1, 2]]]);
    expect(apart).toEqual(["Run B was solved at 2 of the 3 values of I of run A; the other 1 is left out."]);
  });

  it("reads between points where hardly any is common, and says so", () => {
    const { apart } = subtracted(
      [
        { label: "A", source: run([1, 10, 100], [1, 2, 3]) },
        { label: "B", source: run([1, 50, 200], [2, 9, 5]) },
      ],
      null,
    );
    expect(apart.join()).toContain("taken between its neighbours");
  });

  it("can be from one setting of the first run, for its own other settings too", () => {
    const a = run(decades, [1, 2, 3, 10, 20, 30], [273.15, 298.15]);
    const settings = settingsIn(a);
    const { source } = subtracted([{ label: "A", source: a }], settings[0]!);
    expect(source?.axes.at(-1)?.names).toEqual([`A, ${settings[1]}`]);
    expect(columns(source)).toEqual([["Δ out", [9, 18, 27]]]);
    expect(subtracted([{ label: "A", source: a }], null).source).toBeNull();
  });
});

describe("lists side by side", () => {
  it("are matched by label, the second of a label with the second", () => {
    const one = (label: string, n: number) => ({ label, n });
    const found = sideBySide([
      [one("a", 1), one("b", 2), one("a", 3)],
      [one("b", 4), one("c", 5), one("a", 6)],
    ]);
    expect(found.map(({ label, each }) => [label, each.map((it) => it?.n ?? null)])).toEqual([
      ["a", [1, 6]],
      ["b", [2, 4]],
      ["a", [3, null]],
      ["c", [null, 5]],
    ]);
  });
});

describe("the address of a comparison", () => {
  const [a, b] = ["65b6d720-4ffb-47de-8c8b-3f36172e85af", "79363ca0-c8cc-40a3-a56e-b25881fb90e6"];

  it("names each run once, and nothing that is no run", () => {
    expect(readRuns(`${a},${b},${a},nonsense`)).toEqual([a, b]);
    expect(readRuns(null)).toEqual([]);
    expect(readRuns(Array.from({ length: 9 }, (_, i) => a!.replace("65", `1${i}`)).join(","))).toHaveLength(
      6,
    );
  });

  it("gives back the state that it was written from", () => {
    const state = readCompareState(new URLSearchParams("show=difference&origin=25 °C&trace=out&from=1&to=2"));
    expect(state).toMatchObject({
      mode: "difference",
      origin: "25 °C",
      traces: ["out"],
      zoom: { from: 1, to: 2 },
    });
    const written = writeCompareState([a!, b!], state);
    expect(written).toMatch(new RegExp(`^\\?runs=${a},${b}&`));
    expect(readCompareState(new URLSearchParams(written))).toEqual(state);
    expect(writeCompareState([], readCompareState(new URLSearchParams()))).toBe("");
  });
});

it.each([
  [1, 1.024, "+24.0 mV, +2.4 %"],
  [-60e-3, -57e-3, "+3.00 mV, −5.0 %"],
  [2, 1, "−1.00 V, −50 %"],
  [1, 1.0000123, "+12.3 µV, +0.001 %"],
  [1, 1.000001, "+1.00 µV"],
  [0, 1, "+1.00 V"],
  [1e-9, 1, "+1.00 V"],
  [3, 3, "the same"],
  [0.5, 0.5 + 1.1e-16, "the same"],
  [0, 0, "the same"],
])("a value that was %d and is %d V moved by %s", (from, to, words) => {
  expect(movedInWords(from, to, "V").replaceAll("\u202f", " ")).toBe(words);
});
