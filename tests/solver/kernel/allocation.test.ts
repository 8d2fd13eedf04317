import { setFlagsFromString } from "node:v8";
import { runInNewContext } from "node:vm";
import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { advance } from "@/lib/circuit/state";
import { System } from "@/lib/circuit/system";
import { isAccepted } from "@/lib/solver/acceptance";
import { Ladder } from "@/lib/solver/ladder";
import { LinearSolver } from "@/lib/solver/linear";
import { Stepper } from "@/lib/solver/stepper";
import { textOf } from "../../random/circuit";
import { SETS } from "../../random/sets";

const STEPS = 20_000;
/** Bytes: half of what a single number on the heap in every step would come to. */
const MOST = 8 * STEPS;

setFlagsFromString("--expose-gc");
const collect = runInNewContext("gc") as () => void;

/** Bytes that the heap grows by in so many Newton steps at rest of a circuit, after as many that warm it up. */
function growthOf(text: string): number {
  const { job } = compile(text);
  const system = new System(job!.design, job!.circuit);
  const { circuit, pattern } = system;
  expect(new Ladder(system).solve(false).kind).toBe("converged");
  const { rows, columns, units } = pattern;
  const shape = { size: circuit.size, rows: Int32Array.from(rows), columns: Int32Array.from(columns), units };
  const stepper = new Stepper(system, new LinearSolver(shape, system.state.jacobian), shape);
  let accepted = 0;
  const run = () => {
    for (let k = 0; k < STEPS; k++) {
      stepper.prepare();
      stepper.solve(true);
      if (isAccepted(circuit, system.state, stepper.step)) accepted += 1;
      advance(system.state, stepper.step);
    }
  };
  run();
  run();
  collect();
  const before = process.memoryUsage().heapUsed;
  run();
  const growth = process.memoryUsage().heapUsed - before;
  expect(accepted).toBe(3 * STEPS);
  return growth;
}

// Circuits of plain parts, for which the step is generated as a whole.
test.each([2, 3])(
  "a Newton step of random circuit %i leaves nothing on the heap",
  { timeout: 60_000 },
  (seed) => {
    expect(growthOf(textOf(SETS.plain.circuitOf(seed)))).toBeLessThan(MOST);
  },
);
