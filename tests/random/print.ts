import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { textOf } from "./circuit";
import { SETS, type SetName } from "./sets";

/** Prints the circuits of a set with the engine's own answers, one a line, as tests/reference/random-circuits.py reads them. */
const { howMany, circuitOf } = SETS[process.argv[2] as SetName];
for (let seed = 1; seed <= howMany; seed++) {
  const circuit = circuitOf(seed);
  const { job } = compile(textOf(circuit));
  if (job === null) throw new Error(`Circuit ${seed} does not compile.`);
  const { unknowns } = solveRange(job, 0, 1);
  const start = job.plan.unknowns.map(({ name }, j) => [name, unknowns[j]![0]!]);
  console.log(JSON.stringify({ ...circuit, start: Object.fromEntries(start) }));
}
