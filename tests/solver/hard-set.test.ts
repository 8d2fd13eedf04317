import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Ladder } from "@/lib/solver/ladder";
import { HARD } from "./hard-circuits";

/** The rung that solves each, and the linear systems that it and those before it solved when this was written. */
const EXPECTED: Readonly<Record<string, readonly [string, number]>> = {
  "latch of two transistors, three solutions": ["newton", 7],
  "trigger between its thresholds, three solutions": ["newton", 9],
  "latch of four layers that may stay off at 4 fA": ["newton", 4],
  "negative resistance around an ideal amplifier": ["newton", 2],
  "tunnel diode as a polynomial law": ["newton", 6],
  "tunnel diode as an exponential law": ["newton", 6],
  "currents of 1 fA and 1 mA in one loop": ["newton", 11],
  "mirror of 1e12 to one by a diode drop": ["newton", 7],
  "comparator with limits and positive feedback": ["newton", 2],
  "amplifier far into its limit without feedback": ["newton", 4],
  "rectifier of two limited amplifiers": ["newton", 4],
  "current that feeds itself, started by a leak": ["newton", 6],
  "twenty diodes in series on 100 V": ["newton", 7],
  "four transistors in a chain of gains, a million millionfold": ["newton", 8],
  "stabiliser of a breakdown diode and a full transistor": ["newton", 8],
  "multiplier cell of full transistors, saturated": ["newton", 10],
  "law with an arc tangent, on which plain steps run away": ["line search", 60],
  "breakdown diodes at 100 nA, far below where they are specified": ["newton", 14],
  "bounded laws that send Newton's method to and fro": ["line search", 62],
  "followers at their limits, with laws of powers and roots": ["line search", 67],
  "limited amplifiers before which all but ramps fail": ["source ramp", 570],
  "full transistors before limited amplifiers and bounded laws": ["source ramp", 660],
  "what a ramp of shunts alone solves": ["shunt ramp", 940],
  "what a path that turns back alone solves": ["homotopy", 2100],
};

describe("hard circuits from a cold start", { timeout: 60_000 }, () => {
  test("are all listed", () => {
    expect(Object.keys(HARD)).toEqual(Object.keys(EXPECTED));
  });

  test.each(Object.entries(HARD))("%s", (name, text) => {
    const { job, diagnostics } = compile(text);
    if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
    const outcome = new Ladder(new System(job.design, job.circuit)).solve(false);
    const [rung, iterations] = EXPECTED[name]!;
    expect(outcome).toMatchObject({ kind: "converged", rung });
    expect(outcome.iterations).toBeLessThanOrEqual(iterations);
    if (outcome.kind === "converged") expect(outcome.bound).toBeLessThanOrEqual(10e-12);
  });
});
