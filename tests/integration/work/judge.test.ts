import { sql } from "drizzle-orm";
import { afterAll, beforeAll, expect, test, vi } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { getRun } from "@/lib/services/runs/get-run";
import { claimShard } from "@/lib/services/shards/claim-shard";
import { completeShard } from "@/lib/services/shards/complete-shard";
import { requeueLost } from "@/lib/services/shards/requeue-lost";
import { ShardProcessor } from "@/worker/shard-processor";
import type { Ended, Limits } from "@/worker/thread";
import { ThreadPool } from "@/worker/thread-pool";
import { type OwnDatabase, ownDatabase } from "./own-database";

vi.setConfig({ testTimeout: 120_000, hookTimeout: 120_000 });

const LIMITS: Limits = { seconds: 60, memory: 512 };

/** A junction carries its current with V_T ln 10 a decade, which is 59.16 mV at 25 °C; invented otherwise. */
const judged = (slope: string) => `title "Scale factor"
knob I_in = 1 µA
let R_load = 1 GΩ ± 1 %
model junction : diode { Is = 1 fA }
ground -- I1 : current I_in -- a
a -- D1 : junction -- ground
a -- R1 : resistor R_load -- ground
sweep I_in from 1 µA to 1 mA, 10 per decade
show v = a.v
read scale = per_decade(v)
require scale within ${slope} ± 0.5 % as "scale factor"
`;

let own: OwnDatabase;
let actor: Actor;
let pool: ThreadPool;
let processor: ShardProcessor;

beforeAll(async () => {
  own = await ownDatabase();
  actor = await makeActor();
  pool = new ThreadPool(1, LIMITS);
  await pool.ready;
  processor = new ShardProcessor(pool, { name: "a worker", leaseSeconds: 10, limits: LIMITS });
});
afterAll(async () => {
  await pool.close();
  await own.drop();
});

test("a finished run keeps its verdict, margins, readings and error budgets", async () => {
  const { id } = await makeRun(actor, { text: judged("59.16 mV") });
  expect(await processor.handle({ runId: id, index: 0 })).toBe("done");
  const { verdict, judgement, status, error } = await getRun(actor, id);
  expect({ verdict, status, error }).toEqual({ verdict: "holds", status: "done", error: null });
  const [scale] = judgement!.readings;
  expect(scale!.values[0]).toBeCloseTo(0.05916, 4);
  expect(judgement!.requirements).toHaveLength(1);
  expect(judgement!.requirements[0]).toMatchObject({ label: "scale factor", verdict: "holds", unit: "V" });
  expect(judgement!.requirements[0]!.margin).toBeGreaterThan(0);
  expect(judgement!.budgets!.map(({ reading }) => reading)).toEqual(["scale"]);
  expect(judgement!.budgets![0]!.parts[0]!.part).toBe("R1");
});

test("a run that breaks a requirement is done, and its verdict is broken", async () => {
  const { id } = await makeRun(actor, { text: judged("62 mV") });
  await processor.handle({ runId: id, index: 0 });
  const { verdict, status, judgement } = await getRun(actor, id);
  expect({ verdict, status }).toEqual({ verdict: "broken", status: "done" });
  expect(judgement!.requirements[0]!.margin).toBeLessThan(0);
});

test("a judgement that was lost is made up for, once", async () => {
  const { id } = await makeRun(actor, { text: judged("59.16 mV") });
  // As if the worker had died between storing the last shard and judging the run.
  const claimed = await claimShard({ runId: id, index: 0, worker: "a dead worker", leaseSeconds: 10 });
  if (claimed.kind !== "claimed") throw new Error("The shard was not claimed.");
  const { claim } = claimed;
  const task = {
    kind: "solve",
    text: claim.text,
    from: claim.from,
    to: claim.to,
    points: claim.points,
  } as const;
  const solved: Ended = await pool.solve(task, new AbortController().signal, () => undefined);
  if (solved.kind !== "solved") throw new Error("The shard was not solved.");
  await completeShard(claim, solved.result);
  expect((await getRun(actor, id)).verdict).toBeNull();

  await database().execute(sql`UPDATE run SET finished_at = now() - interval '1 minute' WHERE id = ${id}`);
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(1);
  await processor.handle({ runId: id, index: 0 });
  const { verdict, lastEvent } = await getRun(actor, id);
  expect(verdict).toBe("holds");
  expect(await requeueLost({ queuedSeconds: 15 })).toBe(0);
  await processor.handle({ runId: id, index: 0 });
  expect((await getRun(actor, id)).lastEvent).toBe(lastEvent);
});

test("where judging takes too long, the verdict is no data and the reason is told", async () => {
  const slow: Pick<ThreadPool, "solve"> = {
    solve: (task, signal, progress) =>
      task.kind === "judge" ? Promise.resolve({ kind: "out of time" }) : pool.solve(task, signal, progress),
  };
  const hurried = new ShardProcessor(slow, { name: "a worker", leaseSeconds: 10, limits: LIMITS });
  const { id } = await makeRun(actor, { text: judged("59.16 mV") });
  await hurried.handle({ runId: id, index: 0 });
  const { verdict, error } = await getRun(actor, id);
  expect(verdict).toBe("no data");
  expect(error).toMatch(/judging the requirements took longer than the limit of 60 s/);
});
