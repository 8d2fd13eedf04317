import { RUNGS } from "@/lib/solver/outcome";
import { readAnswers } from "./answers";
import { quantile, scoreOf } from "./measure";
import { SETS, type SetName } from "./sets";

/** Solves a set from a cold start and holds each circuit against its 50-digit answer: `npx tsx tests/random/whole.ts plain`, or `full`. */
const set = SETS[process.argv[2] as SetName];
const scores = readAnswers(set).map((answers, k) => scoreOf(set, k + 1, answers));
const solved = scores.filter(({ outcome }) => outcome.kind === "converged");
const proved = solved.filter(({ bound }) => !Number.isNaN(bound));
const iterations = solved.map(({ outcome }) => outcome.iterations);
const bounds = proved.map(({ bound }) => bound);
console.log({
  circuits: scores.length,
  solved: solved.length,
  rungs: RUNGS.map((rung) => [rung, solved.filter(({ outcome }) => outcome.rung === rung).length]),
  iterations: {
    median: quantile(iterations, 0.5),
    p95: quantile(iterations, 0.95),
    most: Math.max(...iterations),
  },
  unproved: solved.filter(({ bound }) => Number.isNaN(bound)).map(({ seed }) => seed),
  bound: { median: quantile(bounds, 0.5), p95: quantile(bounds, 0.95), most: Math.max(...bounds) },
  violations: proved.filter(({ error, bound }) => !(error <= bound)).map(({ seed }) => seed),
  tightest: Math.min(...proved.map(({ error, bound }) => bound / error)),
  worstUnproved: Math.max(0, ...solved.filter(({ bound }) => Number.isNaN(bound)).map(({ error }) => error)),
});
