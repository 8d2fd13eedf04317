import { describe, expect, test, vi } from "vitest";
import { compile, type Job } from "@/lib/analyses/compile";
import { toDocument } from "@/lib/analyses/document";
import type { RunDocument } from "@/lib/analyses/result";
import { solveRange } from "@/lib/analyses/sweep";
import { joined } from "@/lib/analyses/unstable";
import { System } from "@/lib/circuit/system";
import { IndexWatch } from "@/lib/solver/index-watch";
import { LinearSolver } from "@/lib/solver/linear";
import { newton } from "@/lib/solver/newton";
import { seek } from "@/lib/solver/seek";
import { SEVERAL, textOf } from "../outside/several-solutions";

vi.setConfig({ testTimeout: 60_000 });

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}

function documentOf(text: string, cuts: readonly number[] = []): RunDocument {
  const job = jobOf(text);
  const { plan, design } = job;
  const ends = [0, ...cuts, plan.points];
  const whole = solveRange(job, 0, plan.points);
  const unstable = ends.slice(1).flatMap((to, k) => solveRange(job, ends[k]!, to).unstable);
  return toDocument({ plan, design, text, ...whole, unstable, diagnostics: [] });
}

describe("the sign of the determinant", () => {
  test.each(SEVERAL)("tells the points of odd index of $id from the others", (record) => {
    const { design, circuit } = jobOf(textOf(record));
    const system = new System(design, circuit);
    const { points } = seek(system, 9);
    system.startCold();
    system.assemble();
    const linear = new LinearSolver(system.pattern, system.state.jacobian);
    const watch = new IndexWatch(system, linear);
    const step = new Float64Array(circuit.size);
    const found = points.map(({ x }) => {
      system.state.x.set(x);
      system.state.low.fill(0);
      system.settle();
      expect(newton({ system, linear, step, assemble: () => system.assemble() }, true, 20).kind).toBe(
        "converged",
      );
      watch.reset();
      return watch.isOdd();
    });
    expect(found).toEqual(points.map(({ index }) => index === -1));
    // What the records call unstable is, by one mode each; none of their stable points is.
    expect(found.filter((one) => one)).toHaveLength((points.length - 1) / 2);
  });
});

/** A follower, or one whose inputs are exchanged: then its feedback is positive. */
const follower = (plus: string, minus: string) => `knob V_in = 1 V
model amp : opamp { gain = 1e5 }
ground -- VS : voltage V_in -- in
A1 : amp { plus = ${plus}, minus = ${minus}, out = out }
out -- RL : resistor 1 kΩ -- ground
sweep V_in from 0.1 V to 1 V, 10 points
show out = out.v
require out within 0.5 V ± 0.6 V as "whole"
require out within 0.5 V ± 0.6 V at V_in = 1 V as "top"
`;

describe("an amplifier whose inputs are exchanged", () => {
  test("has the same solution within a hundred-thousandth, and would leave it", () => {
    const right = documentOf(follower("in", "out"));
    const wrong = documentOf(follower("out", "in"));
    expect(right).not.toHaveProperty("unstable");
    expect(wrong.unstable).toEqual([{ from: 0, to: 10 }]);
    for (const [k, value] of wrong.traces[0]!.values.entries()) {
      expect(value! / right.traces[0]!.values[k]!).toBeCloseTo(1, 4);
    }
    expect(right.requirements.some(({ remark }) => remark !== undefined)).toBe(false);
    for (const { remark } of wrong.requirements)
      expect(remark).toMatch(/not stable and that the circuit would leave; `seek 3`/);
  });
});

/** The flip-flop of the record MS3 over its supply: beyond half a volt the sweep goes on between its two stable states. */
const flipFlop = [
  "knob supply = 5 V",
  textOf(SEVERAL.find(({ id }) => id === "MS3")!)
    .replace("voltage 5 V", "voltage supply")
    .replace(/show .*/, "sweep supply from 0 V to 5 V, 11 points\nshow v1 = v1.v"),
  'require v1 <= 1 V at supply = 0.5 V as "where one point is left"',
  'require v1 <= 1 V as "everywhere"',
].join("\n");

describe("a sweep along the middle of a flip-flop", () => {
  test("says where it would not stay, and which requirements were judged there", () => {
    const { unstable, requirements } = documentOf(flipFlop);
    expect(unstable).toEqual([{ from: 2, to: 11 }]);
    expect(requirements.map(({ verdict, remark }) => [verdict, remark !== undefined])).toEqual([
      ["holds", false],
      ["holds", true],
    ]);
  });

  test("says the same however the run is cut", () => {
    const whole = documentOf(flipFlop);
    for (const cuts of [[1], [3, 4], [2, 5, 8], [1, 2, 3, 4, 5, 6, 7, 8, 9, 10]]) {
      expect(documentOf(flipFlop, cuts)).toEqual(whole);
    }
  });
});

test("ranges that touch are one, in whatever order they come", () => {
  const ranges = [
    { from: 7, to: 9 },
    { from: 0, to: 2 },
    { from: 2, to: 3 },
    { from: 5, to: 7 },
  ];
  expect(joined(ranges)).toEqual([
    { from: 0, to: 3 },
    { from: 5, to: 9 },
  ]);
  expect(joined([])).toEqual([]);
});
