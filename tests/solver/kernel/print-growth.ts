import { ladder, multiplier } from "../../bench/circuits";
import { Steps } from "../../bench/steps";

/** Newton steps of a round, and rounds at most; the first ones allocate while the engine still optimises. */
const STEPS = 20_000;
const ROUNDS = 60;
/** Bytes by which a round's heap may grow for the engine's own bookkeeping. */
const NOTHING = STEPS / 20;

/**
 * Prints, for a circuit and a way (generated code, or `listed` for loops and lists), the least number of bytes by which the heap
 * grows in 20,000 Newton steps without a collection in between. Needs --expose-gc, and a young generation that holds a round.
 */
const [name, way] = process.argv.slice(2);
const steps = new Steps(name === "ladder" ? ladder(1000) : multiplier());
let least = Number.POSITIVE_INFINITY;
for (let round = 0; round < ROUNDS && least > NOTHING; round++) {
  globalThis.gc!();
  const before = process.memoryUsage().heapUsed;
  for (let k = 0; k < STEPS; k++) {
    if (way === "listed") steps.takeListed(k);
    else steps.take(k);
  }
  least = Math.min(least, Math.abs(process.memoryUsage().heapUsed - before));
}
console.log(least);
