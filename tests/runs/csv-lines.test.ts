import { describe, expect, it } from "vitest";
import { csvHead, csvLines } from "@/app/(work)/[workspace]/runs/[id]/csv-lines";
import type { PointBlock } from "@/lib/services/runs/point-blocks";

/** Made up; not from any solver. */
const PLAN = {
  axes: [
    { knob: "V_in", unit: "V", scale: "list" as const, values: [-0.5, 0.1] },
    { knob: "temperature", unit: "K", scale: "list" as const, values: [283.15, 298.15] },
  ],
  draws: 0,
  points: 4,
  traces: [
    { name: 'a "quoted", one', unit: "V" },
    { name: "=ratio", unit: "1" },
  ],
};
const BLOCKS: readonly PointBlock[] = [
  {
    from: 0,
    traces: [Float64Array.of(Number.NaN, 0.1 + 0.2, 1e-20), Float64Array.of(Number.NaN, 1, 2)],
    outcome: ["undetermined", "converged", "converged"],
    bound: Float64Array.of(Number.NaN, 2.5e-16, Number.NaN),
  },
  {
    from: 3,
    traces: [Float64Array.of(Number.NaN), Float64Array.of(Number.NaN)],
    outcome: [null],
    bound: Float64Array.of(Number.NaN),
  },
];
const linesOf = (plan: Parameters<typeof csvHead>[0]) =>
  [csvHead(plan), ...BLOCKS.map((block) => csvLines(plan, block))].join("").split("\r\n");

describe("points as comma-separated values", () => {
  const lines = linesOf(PLAN);

  it("have a head with units, quoted where it must be (RFC 4180), and never a formula", () => {
    expect(lines[0]).toBe(`point,V_in [V],temperature [K],"a ""quoted"", one [V]",'=ratio,outcome,bound [V]`);
  });

  it("have a line a point, the first axis fastest, with every digit and empty where unsolved", () => {
    expect(lines.slice(1)).toEqual([
      "0,-0.5,283.15,,,undetermined,",
      "1,0.1,283.15,0.30000000000000004,1,converged,2.5e-16",
      "2,-0.5,298.15,1e-20,2,converged,",
      "3,0.1,298.15,,,not solved,",
      "",
    ]);
  });

  it("name the draw of each point where there are draws, the nominal one first", () => {
    const drawn = linesOf({ ...PLAN, axes: PLAN.axes.slice(0, 1), draws: 1 });
    expect(drawn[0]).toMatch(/^point,draw,V_in/u);
    expect(drawn.slice(1, 5).map((line) => line.split(",").slice(0, 3).join(","))).toEqual([
      "0,0,-0.5",
      "1,0,0.1",
      "2,1,-0.5",
      "3,1,0.1",
    ]);
  });
});
