import { parentPort } from "node:worker_threads";
import { branchesRow } from "@/lib/analyses/branches-document";
import { compile, type Job } from "@/lib/analyses/compile";
import { overviewOf } from "@/lib/analyses/overview";
import { solveRange } from "@/lib/analyses/sweep";
import { finalJudgement } from "@/lib/analyses/verdict";
import { storedRow } from "@/lib/services/chunks/branch-columns";
import { storedForm } from "@/lib/services/chunks/columns";
import type { Reply, SolveTask, Task } from "./messages";
import { WARM_UP } from "./warm-up";

/** Time between two words about progress, ms. */
const PROGRESS_MS = 100;
/** Compiled netlists kept: the shards of a run follow one another, and a few runs take turns. */
const KEPT = 4;

const kept = new Map<string, Job>();

/** The compiled netlist of `text`. Throws when the text has errors, which a run's revision cannot have. */
function jobOf(text: string): Job {
  const known = kept.get(text);
  if (known !== undefined) return known;
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(`The netlist does not compile: ${diagnostics[0]?.message}`);
  const oldest = kept.keys().next();
  if (kept.size >= KEPT && !oldest.done) kept.delete(oldest.value);
  kept.set(text, job);
  return job;
}

/** Does a task; what the solver throws, which it never should, becomes an answer. */
function answer(task: Task, tell: (reply: Reply) => void): Reply {
  try {
    const job = jobOf(task.text);
    if (job.plan.points !== task.points) {
      throw new Error(`Planned ${task.points} points, found ${job.plan.points}.`);
    }
    if (task.kind === "judge") {
      return { kind: "judged", judgement: finalJudgement(job, task), overview: overviewOf(job, task) };
    }
    if (task.kind === "seek") return { kind: "sought", result: storedRow(branchesRow(job, task.row)) };
    return solve(job, task, tell);
  } catch (error) {
    return {
      kind: "broken",
      reason: error instanceof Error ? (error.stack ?? error.message) : String(error),
    };
  }
}

function solve(job: Job, { from, to }: SolveTask, tell: (reply: Reply) => void): Reply {
  let told = performance.now();
  const result = solveRange(job, from, to, (pointsDone) => {
    const now = performance.now();
    if (now - told < PROGRESS_MS) return;
    told = now;
    tell({ kind: "progress", pointsDone });
  });
  return { kind: "solved", result: storedForm(result) };
}

/** The memory behind the chunks, which is handed over and not copied. */
function buffersOf(reply: Reply): ArrayBuffer[] {
  if (reply.kind === "judged") return reply.overview === null ? [] : [reply.overview.buffer];
  if (reply.kind !== "solved" && reply.kind !== "sought") return [];
  return reply.result.columns.flatMap(({ chunks }) => chunks.map(({ data }) => data.buffer));
}

const port = parentPort;
if (port === null) throw new Error("This file runs as a thread of the worker process.");
for (let i = 0; i < 3; i++) answer(WARM_UP, () => undefined);
kept.clear();
port.on("message", (task: Task) => {
  const tell = (reply: Reply) => port.postMessage(reply, buffersOf(reply));
  tell(answer(task, tell));
});
port.postMessage({ kind: "ready" } satisfies Reply);
