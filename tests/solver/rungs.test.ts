import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { isAccepted } from "@/lib/solver/acceptance";
import { Aided } from "@/lib/solver/aided";
import { damped } from "@/lib/solver/damped";
import { homotopy } from "@/lib/solver/homotopy";
import { Ladder } from "@/lib/solver/ladder";
import { lineSearch } from "@/lib/solver/line-search";
import { LinearSolver } from "@/lib/solver/linear";
import { type Attempt, type Bench, newton } from "@/lib/solver/newton";
import { pseudoTransient } from "@/lib/solver/pseudo-transient";
import { ramp } from "@/lib/solver/ramp";
import { shuntRamp } from "@/lib/solver/shunt-ramp";
import { networkAt, textOfNetwork } from "../random/networks";

type Climb = (bench: Bench) => Attempt;

/** Every rung of a cold start in its order, each by itself. */
const CLIMBS: Readonly<Record<string, Climb>> = {
  newton: (bench) => newton(bench, false, 100),
  "line search": (bench) => lineSearch(atRest(bench), 60),
  "damped newton": (bench) => damped(atRest(bench), 60),
  "pseudo-transient": (bench) => pseudoTransient(bench, new Aided(bench.system)),
  "source ramp": ramp,
  "shunt ramp": (bench) => shuntRamp(bench, new Aided(bench.system)),
  homotopy: (bench) => homotopy(bench, new Aided(bench.system)),
};

function atRest(bench: Bench): Bench {
  bench.system.state.x.fill(0);
  bench.system.state.low.fill(0);
  return bench;
}

function benchOf(text: string): Bench {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const system = new System(job.design, job.circuit);
  system.startCold();
  system.assemble();
  const linear = new LinearSolver(system.pattern, system.state.jacobian);
  return { system, linear, step: new Float64Array(job.circuit.size), assemble: () => system.assemble() };
}

/** The rungs that solve a text, each from a cold start of its own, and whether all they helped themselves with is off. */
function climbedBy(text: string): string[] {
  return Object.entries(CLIMBS).flatMap(([name, climb]) => {
    const bench = benchOf(text);
    if (climb(bench).kind !== "converged") return [];
    const { system, linear, step } = bench;
    const { state } = system;
    expect(state.share, name).toBe(1);
    system.settle();
    system.assemble();
    expect(linear.solve(state.jacobian, state.residual, step), name).toBe(true);
    expect(isAccepted(system.circuit, state, step), name).toBe(true);
    return [name];
  });
}

describe("the rungs, each on random networks that need it", () => {
  // Found among twelve thousand: places in the stream of seed 20, and the rungs that solve each of them.
  test.each([
    [365, ["line search", "damped newton", "pseudo-transient", "source ramp", "shunt ramp", "homotopy"]],
    [2517, ["damped newton", "pseudo-transient", "source ramp", "shunt ramp", "homotopy"]],
    [430, ["pseudo-transient", "shunt ramp", "homotopy"]],
    [6324, ["pseudo-transient", "homotopy"]],
  ])("network %i", (index, rungs) => {
    const text = textOfNetwork(networkAt(20, index));
    expect(climbedBy(text)).toEqual(rungs);
    const { job } = compile(text);
    const outcome = new Ladder(new System(job!.design, job!.circuit)).solve(false);
    expect(outcome).toMatchObject({ kind: "converged", rung: rungs[0] });
    if (outcome.kind === "converged") expect(outcome.bound).toBeLessThan(1e-10);
  });
});
