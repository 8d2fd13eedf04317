import { describe, expect, it } from "vitest";
import {
  columnOf,
  curveSet,
  outerIndices,
  placeOfPoint,
  pointAt,
  settingOf,
} from "@/app/_components/curves/curve-set";
import { accountOf } from "@/app/_components/curves/failed-spans";
import { styleInTurn } from "@/app/_components/curves/line-style";
import { storeysOf, usualChoice } from "@/app/_components/curves/storeys";
import { summarise } from "@/app/_components/curves/summary-sentence";
import { madeUpSet, madeUpSource } from "./multiplier";

const plain = (text: string) => text.replaceAll("\u202f", " ");

describe("curve set", () => {
  it("puts a descending sweep in ascending order without losing which point is which", () => {
    const set = madeUpSet([10, 1, 0.1]);
    expect([...set.x]).toEqual([0.1, 1, 10]);
    expect(pointAt(set, 1, 0)).toBe(5);
    expect(placeOfPoint(set, 5)).toEqual({ family: 1, place: 0 });
    expect([...columnOf(set, set.traces[0]!, 0)]).toEqual([0.1, 1, 10].map((x) => x * 283.15));
  });

  it("counts the first axis fastest, then the outer ones, as the run document does", () => {
    const source = madeUpSource([1, 2, 3], [283.15, 298.15]);
    expect(settingOf(source.axes, 4).map(({ value }) => value)).toEqual([2, 298.15]);
    expect(outerIndices([{ ...source.axes[0]! }, { ...source.axes[1]! }], 4)).toEqual([1, 1]);
  });

  it("names settings as the netlist writes them", () => {
    expect(madeUpSet([1, 2]).families.map(({ label }) => plain(label))).toEqual(["10 °C", "25 °C"]);
  });

  it("has no curve without a sweep, and no place for a point that is not there", () => {
    expect(curveSet({ ...madeUpSource([1], [300]), axes: [] })).toBeNull();
    const set = madeUpSet([1, 2]);
    expect([-1, 4, 0.5].map((point) => placeOfPoint(set, point))).toEqual([null, null, null]);
  });
});

describe("storeys", () => {
  it("gives traces of one unit one storey and others their own", () => {
    const set = madeUpSet([1, 2]);
    const storeys = storeysOf(set, usualChoice(set));
    expect(storeys.map(({ unit, lines }) => [unit, lines.length])).toEqual([
      ["V", 2],
      ["1", 2],
    ]);
  });

  it("gives an error its own storey beside a signal of either sign, and leaves on one ruler what a logarithm can hold", () => {
    const axis = { knob: "V_x", unit: "V", scale: "logarithmic", values: [1e-3, 1e-2, 1e-1, 1] } as const;
    const points = { outcome: axis.values.map(() => "converged" as const) };
    const keysOf = (columns: Record<string, readonly number[]>) => {
      const traces = Object.entries(columns).map(([name, values]) => ({ name, unit: "V", values }));
      const set = curveSet({ axes: [axis], traces, points })!;
      return storeysOf(set, usualChoice(set)).map(({ key, traces: names }) => [key, ...names]);
    };
    const error = [1e-4, 2e-4, 1e-4, 3e-4];
    expect(keysOf({ out: [-1, -0.5, 0.5, 1], error })).toEqual([
      ["V", "out"],
      ["V small", "error"],
    ]);
    expect(keysOf({ out: [-1, -0.5, 0.5, 1], ideal: [-1, -0.5, 0.5, 0.9] })).toEqual([["V", "out", "ideal"]]);
    expect(keysOf({ out: [-1, -0.5, 0.5, 1], nothing: [0, 0, 0, 0] })).toEqual([["V", "out", "nothing"]]);
    expect(keysOf({ out: [1e-3, 1e-2, 1e-1, 1], error })).toEqual([["V", "out", "error"]]);
  });

  it("draws twelve of many settings unless asked for others, the first and the last among them", () => {
    const set = madeUpSet(
      [1, 2],
      Array.from({ length: 40 }, (_, i) => 280 + i),
    );
    const { families } = usualChoice(set);
    expect(families).toHaveLength(12);
    expect([families[0], families.at(-1)]).toEqual([0, 39]);
  });

  it("tells 36 lines apart before one style comes again", () => {
    const styles = Array.from({ length: 36 }, (_, k) => JSON.stringify(styleInTurn(k)));
    expect(new Set(styles).size).toBe(36);
  });
});

describe("account and summary", () => {
  it("counts failed points and says where they stand", () => {
    const set = madeUpSet([-2, -1, 1, 2]);
    const account = accountOf(set, [0, 1]);
    expect(account).toMatchObject({ points: 8, solved: 4, failed: 4, waiting: 0 });
    expect(account.spans).toEqual([{ first: 0, last: 1 }]);
    const sentence = plain(summarise(set, storeysOf(set, usualChoice(set)), account));
    expect(sentence).toContain("Over V_x from −2 V to 2 V, at 2 settings of temperature:");
    expect(sentence).toContain("4 of 8 points are solved");
    expect(sentence).toContain("4 failed (came to a stand) at V_x −2 V to −1 V, and nothing is drawn there");
  });

  it("says which way a trace goes and how far", () => {
    const set = madeUpSet([1, 10], [300]);
    const sentence = plain(summarise(set, storeysOf(set, usualChoice(set)), accountOf(set, [0])));
    expect(sentence).toContain("product rises from 300.0 V to 3.000 kV");
    expect(sentence).toContain("All 2 points are solved.");
  });

  it("calls level what differs by less than its figures show", () => {
    const { axes, points } = madeUpSource([1, 2], [283.15, 298.15]);
    const crumbs = { name: "drive", unit: "V", values: [5, 5 + 4e-9, 1, 1 - 1e-9] };
    const said = (values: readonly number[]) => {
      const set = curveSet({ axes, points, traces: [{ ...crumbs, values }] })!;
      return plain(summarise(set, storeysOf(set, usualChoice(set)), accountOf(set, [0, 1])));
    };
    expect(said(crumbs.values)).toContain("drive is level in each, between 1.000 V and 5.000 V");
    expect(said([5, 5 + 4e-9, 5, 5 - 1e-9])).toContain("drive is 5.000 V throughout");
    expect(said([5, 5.1, 1, 1.1])).toContain("drive rises in each");
  });

  it("says that nothing was kept where the netlist shows nothing", () => {
    const set = curveSet({ ...madeUpSource([1, 2], [300]), traces: [] })!;
    expect(summarise(set, [], accountOf(set, [0]))).toMatch(/^No trace was kept\./);
  });

  it("does not count points that are still to come as failed", () => {
    const whole = madeUpSource([1, 2, 3], [300]);
    const set = curveSet({ ...whole, points: { outcome: ["converged", null, null] } })!;
    expect(accountOf(set, [0])).toMatchObject({ solved: 1, failed: 0, waiting: 2, spans: [] });
  });
});
