import { describe, expect, it } from "vitest";
import { type CurveSource, columnOf, curveSet } from "@/app/_components/curves/curve-set";
import { difference } from "@/app/_components/curves/difference";
import { overlay } from "@/app/_components/curves/overlay";
import { storeysOf, usualChoice } from "@/app/_components/curves/storeys";

/** Made up: out = slope · log10 of the knob, at each setting of the temperature a little more. */
function run(x: readonly number[], slope: number, temperatures: readonly number[] = [298.15]): CurveSource {
  const points = temperatures.flatMap((t) => x.map((value) => slope * Math.log10(value) + (t - 298.15)));
  return {
    axes: [
      { knob: "I", unit: "A", scale: "logarithmic", values: x },
      ...(temperatures.length > 1
        ? [{ knob: "temperature", unit: "K", scale: "list" as const, values: temperatures }]
        : []),
    ],
    traces: [{ name: "out", unit: "V", values: points }],
    points: { outcome: points.map(() => "converged" as const) },
  };
}

function made(result: ReturnType<typeof overlay>) {
  if ("problem" in result) throw new Error(result.problem);
  const set = curveSet(result.source)!;
  return {
    set,
    note: result.source.note,
    lines: storeysOf(set, usualChoice(set)).flatMap(({ lines }) => lines),
  };
}

const decades = [1, 10, 100];

describe("several sources on one figure", () => {
  it("lie over all values that any of them swept, each with its own points and its own name", () => {
    const { set, lines } = made(
      overlay([
        { label: "revision 1", source: run(decades, 1) },
        { label: "revision 2", source: run([1, 100, 1000], 2) },
      ]),
    );
    expect([...set.x]).toEqual([1, 10, 100, 1000]);
    expect(lines.map(({ label }) => label)).toEqual(["revision 1", "revision 2"]);
    expect(lines.map(({ values }) => [...values])).toEqual([
      [0, 1, 2, Number.NaN],
      [0, Number.NaN, 4, 6],
    ]);
    expect(lines.map(({ absent }) => [...(absent ?? [])])).toEqual([
      [0, 0, 0, 1],
      [0, 1, 0, 0],
    ]);
    expect(lines[0]!.style).not.toEqual(lines[1]!.style);
  });

  const many = (count: number) => Array.from({ length: count }, (_, k) => 283.15 + k);
  const two = (settings: readonly number[]) =>
    made(
      overlay([
        { label: "a", source: run(decades, 1, settings) },
        { label: "b", source: run(decades, 2, settings) },
      ]),
    ).lines.map(({ style }) => style);

  it("tell settings by colour, and every curve by dashes of its own", () => {
    const styles = two(many(3));
    const [a10, a11, , b10] = styles;
    expect(a10!.colour).toBe(b10!.colour);
    expect(a10!.colour).not.toBe(a11!.colour);
    expect(a10!.dash).toEqual([]);
    expect(new Set(styles.map(({ dash }) => JSON.stringify(dash))).size).toBe(6);
  });

  it("tell sources by dashes where there are more curves than patterns", () => {
    const styles = two(many(4));
    expect(styles[0]!.dash).toEqual(styles[3]!.dash);
    expect(styles[4]!.dash).not.toEqual(styles[3]!.dash);
  });

  it("say why they cannot lie on one ruler", () => {
    const other = {
      ...run(decades, 1),
      axes: [{ knob: "V", unit: "V", scale: "linear" as const, values: decades }],
    };
    expect(
      overlay([
        { label: "a", source: run(decades, 1) },
        { label: "b", source: other },
      ]),
    ).toEqual({ problem: "“a” sweeps I and “b” sweeps V, so they have no ruler in common." });
  });
});

describe("a difference", () => {
  it("is exact where both have a value, and says so", () => {
    const { set, note } = made(
      difference({ label: "a", source: run(decades, 1) }, { label: "b", source: run(decades, 3) }),
    );
    expect(set.traces.map(({ name, unit }) => [name, unit])).toEqual([["Δ out", "V"]]);
    expect([...columnOf(set, set.traces[0]!, 0)]).toEqual([0, 2, 4]);
    expect(note).toBe("The difference is “b” less “a”, at values of I that both have.");
  });

  it("goes between the neighbours over the decade elsewhere, within what both swept, and says that too", () => {
    const a = { label: "a", source: run([0.1, 1, Math.sqrt(10), 10], 1) };
    const { set, note } = made(difference(a, { label: "b", source: run([1, 10, 100], 2) }));
    expect([...set.x]).toEqual([1, Math.sqrt(10), 10]);
    const column = columnOf(set, set.traces[0]!, 0);
    // By hand: 2·log10 x − log10 x, and the line over the decade is straight.
    [0, 0.5, 1].forEach((value, i) => {
      expect(column[i]).toBeCloseTo(value, 12);
    });
    expect(note).toContain(
      "At 2 of its 3 points both have the same value of I; at the others “b” is taken between",
    );
  });

  it("pairs settings of the same value, and leaves the others out", () => {
    const { set } = made(
      difference(
        { label: "a", source: run(decades, 1, [283.15, 298.15]) },
        { label: "b", source: run(decades, 1, [298.15, 313.15]) },
      ),
    );
    expect(set.families.map(({ label }) => label)).toEqual([""]);
    expect([...columnOf(set, set.traces[0]!, 0)]).toEqual([0, 0, 0]);
  });

  it("is unknown where either side is", () => {
    const broken = run(decades, 1);
    const lost = { ...broken, traces: [{ ...broken.traces[0]!, values: [0, null, 2] }] };
    const { set } = made(difference({ label: "a", source: lost }, { label: "b", source: run(decades, 1) }));
    expect([...columnOf(set, set.traces[0]!, 0)]).toEqual([0, Number.NaN, 0]);
  });

  it("says what keeps two sources from being compared", () => {
    const far = { label: "far", source: run([1e6, 1e7], 1) };
    expect(difference({ label: "a", source: run(decades, 1) }, far)).toEqual({
      problem: "“a” and “far” have no part of the sweep in common.",
    });
  });
});
