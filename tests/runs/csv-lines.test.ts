import { describe, expect, it } from "vitest";
import { csvLines } from "@/app/(work)/[workspace]/runs/[id]/csv-lines";
import type { RunDocument } from "@/lib/analyses/result";

/** Made up; not from any solver. */
const DOCUMENT: RunDocument = {
  format: "sweepwright-run/1",
  title: "Made up",
  verdict: "no data",
  axes: [
    { knob: "V_in", unit: "V", scale: "list", values: [-0.5, 0.1] },
    { knob: "temperature", unit: "K", scale: "list", values: [283.15, 298.15] },
  ],
  draws: 0,
  traces: [
    { name: 'a "quoted", one', unit: "V", values: [null, 0.1 + 0.2, 1e-20, null] },
    { name: "=ratio", unit: "1", values: [null, 1, 2, null] },
  ],
  points: {
    outcome: ["singular", "converged", "converged", null],
    bound: [null, null, null, null],
    iterations: [50, 2, 2, 0],
    rung: [null, "newton", "warm start", null],
  },
  readings: [],
  requirements: [],
  diagnostics: [],
  failures: [],
};

describe("points as comma-separated values", () => {
  const lines = [...csvLines(DOCUMENT)].join("").split("\r\n");

  it("have a head with units, quoted where it must be (RFC 4180), and never a formula", () => {
    expect(lines[0]).toBe(`point,V_in [V],temperature [K],"a ""quoted"", one [V]",'=ratio,outcome`);
  });

  it("have a line a point, the first axis fastest, with every digit and empty where unsolved", () => {
    expect(lines.slice(1)).toEqual([
      "0,-0.5,283.15,,,singular",
      "1,0.1,283.15,0.30000000000000004,1,converged",
      "2,-0.5,298.15,1e-20,2,converged",
      "3,0.1,298.15,,,not solved",
      "",
    ]);
  });

  it("name the draw of each point where there are draws, the nominal one first", () => {
    const drawn = [...csvLines({ ...DOCUMENT, axes: DOCUMENT.axes.slice(0, 1), draws: 1 })]
      .join("")
      .split("\r\n");
    expect(drawn[0]).toMatch(/^point,draw,V_in/u);
    expect(drawn.slice(1, 5).map((line) => line.split(",").slice(0, 3).join(","))).toEqual([
      "0,0,-0.5",
      "1,0,0.1",
      "2,1,-0.5",
      "3,1,0.1",
    ]);
  });
});
