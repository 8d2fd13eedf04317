import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { isAccepted } from "@/lib/solver/acceptance";
import { Ladder } from "@/lib/solver/ladder";
import { LinearSolver } from "@/lib/solver/linear";
import { RUNGS, type Rung } from "@/lib/solver/outcome";
import { textOf } from "../random/circuit";
import { fullCircuit } from "../random/full";
import { networkAt, textOfNetwork } from "../random/networks";

/**
 * Circuits that need each rung: those before it fail, also when every resistance is changed by up to a millionth. Found by solving 14,000
 * circuits of the full set and 12,000 networks, of which the first rung alone solves 97.6 % and 99.1 %.
 */
const NEEDING: readonly (readonly [rung: Rung, what: string, text: string])[] = [
  ["line search", "network 365", networkOf(365)],
  ["damped newton", "network 2517", networkOf(2517)],
  ["damped newton", "circuit 2661", circuitOf(2661)],
  ["pseudo-transient", "network 430", networkOf(430)],
  ["pseudo-transient", "circuit 1624", circuitOf(1624)],
  ["source ramp", "circuit 464", circuitOf(464)],
  ["source ramp", "circuit 768", circuitOf(768)],
  ["shunt ramp", "circuit 333", circuitOf(333)],
  ["shunt ramp", "circuit 598", circuitOf(598)],
  ["homotopy", "circuit 11896", circuitOf(11896)],
  ["homotopy", "circuit 4637", circuitOf(4637)],
];

function circuitOf(seed: number): string {
  return textOf(fullCircuit(seed));
}

function networkOf(index: number): string {
  return textOfNetwork(networkAt(20, index));
}

function systemOf(text: string): System {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return new System(job.design, job.circuit);
}

/** Whether the acceptance test holds where the system stands, with nothing but the system itself. */
function isSolved(system: System): boolean {
  const { state, circuit, pattern } = system;
  system.settle();
  system.assemble();
  const step = new Float64Array(circuit.size);
  const linear = new LinearSolver(pattern, state.jacobian);
  return (
    state.share === 1 &&
    linear.solve(state.jacobian, state.residual, step) &&
    isAccepted(circuit, state, step)
  );
}

describe("the rungs of the ladder", { timeout: 60_000 }, () => {
  test("are each needed by a circuit of the list, but for the first two", () => {
    expect([...new Set(NEEDING.map(([rung]) => rung))]).toEqual(RUNGS.slice(2));
  });

  test.each(NEEDING)("%s solves %s, on which all before it fail", (rung, _, text) => {
    const before = RUNGS.slice(0, RUNGS.indexOf(rung));
    expect(new Ladder(systemOf(text), false, before).solve(false).kind).not.toBe("converged");
    const system = systemOf(text);
    const outcome = new Ladder(system).solve(false);
    expect(outcome).toMatchObject({ kind: "converged", rung });
    if (outcome.kind === "converged") expect(outcome.bound).toBeLessThan(1e-8);
    expect(isSolved(system)).toBe(true);
  });

  test.each(NEEDING)("%s solves %s by itself, and none before it does", (rung, _, text) => {
    const solving = RUNGS.slice(0, RUNGS.indexOf(rung) + 1).filter((one) => {
      const system = systemOf(text);
      return new Ladder(system, false, [one]).solve(false).kind === "converged" && isSolved(system);
    });
    expect(solving).toEqual([rung]);
  });

  test("a warm start solves from a neighbour, and hands on to Newton's method from a cold one", () => {
    const text = `knob V = 1 V
model d : diode { Is = 1 fA }
ground -- V1 : voltage V -- in -- R1 : resistor 1 kΩ -- out -- D1 : d -- ground
show out.v`;
    const system = systemOf(text);
    const ladder = new Ladder(system);
    expect(ladder.solve(false)).toMatchObject({ kind: "converged", rung: "newton" });
    system.turn("V", 1.01);
    expect(ladder.solve(true)).toMatchObject({ kind: "converged", rung: "warm start" });
    system.state.x.fill(1e300);
    expect(ladder.solve(true)).toMatchObject({ kind: "converged", rung: "newton" });
  });
});
