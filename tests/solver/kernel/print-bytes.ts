import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { mayCompile } from "@/lib/circuit/code/machine";

/** Points: enough that generated code, where it may be, takes over about half way. */
const POINTS = 4000;

/**
 * Prints whether code may be generated here, the steps that a netlist file takes over its first 4,000 points when it is swept finely,
 * and a hash of the bytes that these give, bounds included.
 */
const text = readFileSync(process.argv[2]!, "utf8").replace(/\d+ (?=per decade|points)/, "4000 ");
const { job } = compile(text);
const { traces, unknowns, residual, iterations, bound } = solveRange(job!, 0, POINTS);
const hash = createHash("sha256");
for (const column of [...traces, ...unknowns, residual, iterations, bound])
  hash.update(new Uint8Array(column.buffer));
const steps = iterations.reduce((sum, one) => sum + one, 0);
console.log(mayCompile(), steps, hash.digest("hex"));
