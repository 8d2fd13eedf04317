import { RUNGS } from "@/lib/solver/outcome";
import { readAnswers } from "./answers";
import { quantile, scoreOf } from "./measure";

/** Solves all random circuits from a cold start and holds each against its 50-digit answer: `npx tsx tests/random/whole.ts`. */
const scores = readAnswers().map((answers, k) => scoreOf(k + 1, answers));
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
  proved: proved.length,
  bound: { median: quantile(bounds, 0.5), p95: quantile(bounds, 0.95), most: Math.max(...bounds) },
  violations: proved.filter(({ error, bound }) => !(error <= bound)).map(({ seed }) => seed),
  tightest: Math.min(...proved.map(({ error, bound }) => bound / error)),
  worstUnproved: Math.max(0, ...solved.filter(({ bound }) => Number.isNaN(bound)).map(({ error }) => error)),
});
