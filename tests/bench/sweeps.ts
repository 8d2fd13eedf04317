import { execFileSync } from "node:child_process";
import type { Job } from "@/lib/analyses/compile";
import { Predictor } from "@/lib/analyses/predictor";
import { System } from "@/lib/circuit/system";
import { Ladder } from "@/lib/solver/ladder";
import { array, ladder, multiplier } from "./circuits";
import { isThere } from "./native";

/** Debian's Python, which has its own SciPy. */
const PYTHON = "/usr/bin/python3";

interface Swept {
  readonly pointsPerSecond: number;
  readonly iterationsPerPoint: number;
  readonly failed: number;
}

/** What is proved of a point: nothing, what a neighbour's weights help to, or all afresh at every point. */
type Proving = "no" | "reused" | "full";

/** Sweeps the first axis whole, each point from its neighbour by the predictor; the best of `times` runs. */
function sweep(job: Job, proving: Proving, times: number): Swept {
  const { knob, values } = job.plan.axes[0]!;
  const system = new System(job.design, job.circuit);
  system.turn(knob, values[0]!);
  const solver = new Ladder(system, proving !== "no");
  const predictor = new Predictor(system.state);
  let least = Number.POSITIVE_INFINITY;
  let iterations = 0;
  let failed = 0;
  for (let time = 0; time < times; time++) {
    const begun = performance.now();
    iterations = 0;
    failed = 0;
    solver.reset();
    predictor.reset();
    for (const value of values) {
      system.turn(knob, value);
      if (proving === "full") solver.reset();
      const outcome = solver.solve(predictor.predict());
      predictor.learn(outcome.kind === "converged");
      iterations += outcome.iterations;
      if (outcome.kind !== "converged") failed++;
    }
    least = Math.min(least, (performance.now() - begun) / 1000);
  }
  const points = values.length;
  return { pointsPerSecond: points / least, iterationsPerPoint: iterations / points, failed };
}

/** Points per second of SciPy's root on the same equations; null where it is not installed. */
function scipy(): Record<string, { points: number; solved: number; pointsPerSecond: number }> | null {
  if (!isThere(PYTHON, ["-c", "import scipy.optimize"])) return null;
  return JSON.parse(execFileSync(PYTHON, ["tests/bench/root.py"], { encoding: "utf8" }));
}

/** Measures swept runs, proved and not, and the same by SciPy. Prints figures and ratios; asserts nothing. */
function measure(): void {
  const isJson = process.argv.includes("--json");
  const all: Record<string, number> = {};
  const theirs = scipy();
  if (theirs === null && !isJson) console.log("No SciPy is present: its rates are left out.");
  const n = (value: number) => (value < 100 ? value.toPrecision(3) : value.toFixed(0));
  const jobs = {
    multiplier: multiplier(),
    array: array(),
    ladder100: ladder(100),
    ladder10000: ladder(10_000),
  };
  for (const [name, job] of Object.entries(jobs)) {
    const times = job.circuit.size > 1000 ? 10 : 40;
    const bare = sweep(job, "no", times);
    const proved = sweep(job, "reused", times);
    const afresh = sweep(job, "full", times);
    // What a certificate adds to a point, as a part of what solving it takes.
    const beside = ({ pointsPerSecond }: Swept) => bare.pointsPerSecond / pointsPerSecond - 1;
    Object.assign(all, {
      [`${name}PointsPerSecond`]: bare.pointsPerSecond,
      [`${name}MillisecondsPerPoint`]: 1000 / bare.pointsPerSecond,
      [`${name}IterationsPerPoint`]: bare.iterationsPerPoint,
      [`${name}FailedPoints`]: bare.failed,
      [`${name}ProvedPointsPerSecond`]: proved.pointsPerSecond,
      [`${name}ProvedOfUnproved`]: proved.pointsPerSecond / bare.pointsPerSecond,
      [`${name}CertificateReusedOfSolve`]: beside(proved),
      [`${name}CertificateFullOfSolve`]: beside(afresh),
    });
    const parts = [
      `${name}: ${n(bare.pointsPerSecond)} points/s, ${n(bare.iterationsPerPoint)} steps a point, ${bare.failed} failed`,
      `proved ${n(proved.pointsPerSecond)} points/s`,
      `a certificate takes ${n(beside(proved))} of the solve, afresh ${n(beside(afresh))}`,
    ];
    const script = theirs?.[name];
    if (script !== undefined) {
      all[`${name}OverScipy`] = bare.pointsPerSecond / script.pointsPerSecond;
      parts.push(`SciPy ${n(script.pointsPerSecond)} points/s, ${script.solved} of ${script.points} solved`);
    }
    if (!isJson) console.log(parts.join("; "));
  }
  if (isJson) console.log(JSON.stringify(all));
}

measure();
