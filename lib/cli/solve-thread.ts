import { parentPort } from "node:worker_threads";
import { branchesRow } from "@/lib/analyses/branches-document";
import { compile, type Job } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { OWN } from "@/lib/language/limits";
import type { Netlist, Reply, Task } from "./thread-messages";

const port = parentPort;
if (port === null) throw new Error("This file runs as a thread of the command line.");

/** The netlist of the piece before: pieces of one follow one another. */
let kept: { readonly netlist: string; readonly job: Job } | null = null;

function jobOf({ text, shelf }: Netlist): Job {
  const netlist = JSON.stringify([text, shelf]);
  if (kept?.netlist === netlist) return kept.job;
  const library = (name: string) => (Object.hasOwn(shelf, name) ? shelf[name]! : null);
  const { job } = compile(text, { library, size: OWN });
  if (job === null) throw new Error("The netlist has errors and cannot be solved.");
  kept = { netlist, job };
  return job;
}

const tell = (reply: Reply) => port.postMessage(reply);
port.on("message", (task: Task) => {
  try {
    const job = jobOf(task);
    if ("row" in task) return tell({ kind: "sought", branches: branchesRow(job, task.row) });
    const result = solveRange(job, task.from, task.to, (pointsDone) =>
      tell({ kind: "progress", pointsDone }),
    );
    tell({ kind: "solved", result });
  } catch (error) {
    tell({ kind: "broken", reason: error instanceof Error ? (error.stack ?? error.message) : String(error) });
  }
});
tell({ kind: "ready" });
