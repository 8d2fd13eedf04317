import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { HOW_MANY } from "./answers";
import { textOf } from "./circuit";
import { randomCircuit } from "./generate";

/** Prints the random circuits with the engine's own answers, one a line, as tests/reference/random-circuits.py reads them. */
for (let seed = 1; seed <= HOW_MANY; seed++) {
  const circuit = randomCircuit(seed);
  const { job } = compile(textOf(circuit));
  if (job === null) throw new Error(`Circuit ${seed} does not compile.`);
  const { unknowns } = solveRange(job, 0, 1);
  const start = job.plan.unknowns.map(({ name }, j) => [name, unknowns[j]![0]!]);
  console.log(JSON.stringify({ ...circuit, start: Object.fromEntries(start) }));
}
