import { describe, expect, test } from "vitest";
import type { Circuit } from "@/lib/circuit/circuit";
import { newState } from "@/lib/circuit/state";
import { isAccepted, largestResidual } from "@/lib/solver/acceptance";

/** Two nets and one branch current that flows from the first net to ground, which has the number 3. */
const circuit: Circuit = {
  unknowns: [
    { name: "a.v", unit: "V" },
    { name: "b.v", unit: "V" },
    { name: "V1.i", unit: "A" },
  ],
  size: 3,
  nets: new Map([
    ["a", 0],
    ["b", 1],
    ["ground", 3],
  ]),
  branches: new Map([["V1", 2]]),
  terminals: new Map(),
  branchNets: [[0, 3]],
};

/** At a a sum of 2 µA, at b of 2 pA, in the law 2 V; voltages 1 V and 0 V, 1 µA in the branch; nothing left over. */
function good() {
  const state = newState(3, 1);
  state.x.set([1, 0, 1e-6, 0]);
  state.scale.set([2e-6, 2e-12, 2, 0]);
  return { state, step: new Float64Array(3) };
}

type Case = readonly [what: string, change: (matter: ReturnType<typeof good>) => void];

const accepted: readonly Case[] = [
  ["nothing left over", () => undefined],
  ["a ten-billionth of the currents at a net", ({ state }) => (state.residual[0] = 2e-16)],
  ["the floor where hardly a current flows", ({ state }) => (state.residual[1] = 9e-19)],
  ["a step of a nanovolt and a billionth", ({ step }) => (step[0] = 1.9e-9)],
  ["a step of a billionth of the currents around", ({ step }) => (step[2] = 2.9e-15)],
];

const refused: readonly Case[] = [
  ["more than a ten-billionth of the currents at a net", ({ state }) => (state.residual[0] = 2.1e-16)],
  ["a femtoampere where picoamperes flow", ({ state }) => (state.residual[1] = 1e-15)],
  ["more than a ten-billionth in a branch law", ({ state }) => (state.residual[2] = 3e-10)],
  ["a step of more than a nanovolt and a billionth", ({ step }) => (step[0] = 2.1e-9)],
  ["a step of more than a nanovolt at a net of 0 V", ({ step }) => (step[1] = -1.1e-9)],
  ["a step of more than a billionth of the currents around", ({ step }) => (step[2] = -1e-14)],
  ["a residual that is no number", ({ state }) => (state.residual[1] = Number.NaN)],
  ["a step that is no number", ({ step }) => (step[1] = Number.NaN)],
  ["a step without end", ({ step }) => (step[2] = Number.POSITIVE_INFINITY)],
];

describe("the acceptance test", () => {
  test.each(accepted)("accepts %s", (_, change) => {
    const matter = good();
    change(matter);
    expect(isAccepted(circuit, matter.state, matter.step)).toBe(true);
  });

  test.each(refused)("refuses %s", (_, change) => {
    const matter = good();
    change(matter);
    expect(isAccepted(circuit, matter.state, matter.step)).toBe(false);
  });

  test("reports the largest residual of a net, not that of a branch law", () => {
    const { state } = good();
    state.residual.set([3e-18, -7e-18, 1e-3, 5]);
    expect(largestResidual(circuit, state)).toBe(7e-18);
  });
});
