import { eq } from "drizzle-orm";
import { afterAll, beforeAll, expect, test } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import { shard } from "@/db/schema/shard";
import type { ShardResult } from "@/lib/analyses/result";
import { type StoredShard, storedForm } from "@/lib/services/chunks/columns";
import { readColumns } from "@/lib/services/chunks/read-columns";
import { listEvents } from "@/lib/services/events/list-events";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { type Claim, claimShard } from "@/lib/services/shards/claim-shard";
import { completeShard } from "@/lib/services/shards/complete-shard";
import { failShard } from "@/lib/services/shards/fail-shard";
import { releaseShard } from "@/lib/services/shards/release-shard";
import { renewLease } from "@/lib/services/shards/renew-lease";
import { type OwnDatabase, ownDatabase } from "./own-database";
import { runRow, shardRows, storedPoints } from "./runs";
import { longText } from "./texts";

let own: OwnDatabase;
beforeAll(async () => {
  own = await ownDatabase();
});
afterAll(() => own.drop());

const claimAs = (worker: string, runId: string, index = 0, leaseSeconds = 10) =>
  claimShard({ runId, index, worker, leaseSeconds });

async function claimed(runId: string, index = 0, leaseSeconds = 10): Promise<Claim> {
  const answer = await claimAs("a worker", runId, index, leaseSeconds);
  if (answer.kind !== "claimed") throw new Error(`The shard is ${answer.kind}.`);
  return answer.claim;
}

/** An invented result for a claim: value k of every column is k + `add`; the first of every seven points failed. */
function result({ from, to }: Claim, add = 0): StoredShard {
  const column = () => Float64Array.from({ length: to - from }, (_, i) => from + i + add);
  const invented: ShardResult = {
    from,
    to,
    traces: [column()],
    unknowns: [],
    outcome: Float64Array.from({ length: to - from }, (_, i) => (i % 7 === 0 ? 1 : 0)),
    iterations: column(),
    residual: column(),
    bound: column(),
    rung: column(),
    failures: [{ point: from, outcome: "did not settle", unsettled: ["s"] }],
    unstable: [],
  };
  return storedForm(invented);
}

async function expire(runId: string, index = 0): Promise<void> {
  const row = database()
    .update(shard)
    .set({ leaseUntil: new Date(Date.now() - 1_000) });
  await row.where(eq(shard.runId, runId));
  expect((await shardRows(runId))[index]!.leaseUntil!.getTime()).toBeLessThan(Date.now());
}

test("of twenty workers that race for one shard, one gets it, and the others learn how long it is held", async () => {
  const { id } = await makeRun(await makeActor());
  const answers = await Promise.all(Array.from({ length: 20 }, (_, i) => claimAs(`worker ${i}`, id)));
  const winners = answers.filter(({ kind }) => kind === "claimed");
  expect(winners).toHaveLength(1);
  const rest = answers.filter(({ kind }) => kind === "held");
  expect(rest).toHaveLength(19);
  for (const one of rest) expect(one).toMatchObject({ milliseconds: expect.closeTo(10_000, -4) });
  expect((await shardRows(id))[0]).toMatchObject({ status: "running", attempt: 1 });
});

test("a claim carries the text, the range and the size of its run", async () => {
  const text = longText(300);
  const { id } = await makeRun(await makeActor(), { text });
  const run = await runRow(id);
  const first = await claimed(id, 0);
  const last = await claimed(id, run.shardsLeft - 1);
  expect(first).toMatchObject({ text, from: 0, points: run.points, attempt: 1, begun: false });
  expect(last.to).toBe(run.points);
});

test("a lease that has run out lets another worker in, and the first one's result is refused", async () => {
  const { id } = await makeRun(await makeActor());
  const first = await claimed(id);
  await expire(id);
  const second = await claimed(id);
  expect(second.attempt).toBe(2);
  expect(await renewLease(first, { leaseSeconds: 10, pointsUnderWay: 1 })).toBe("lost");
  expect(await failShard(first, "never seen")).toBe("refused");
  expect(await completeShard(first, result(first, 1_000))).toBe("refused");
  expect(await runRow(id)).toMatchObject({ pointsDone: 0, error: null });
  expect(await completeShard(second, result(second))).toBe("stored");
  const column = (await readColumns(id, second.points, ["trace/0"])).get("trace/0")!;
  expect([...column]).toEqual([...column.keys()]);
});

test("a result stored again, and a job that comes again, change nothing", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const claim = await claimed(id);
  expect(await completeShard(claim, result(claim))).toBe("stored");
  const before = { run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) };
  expect(await completeShard(claim, result(claim, 5))).toBe("stored");
  expect(await claimAs("another", id)).toEqual({ kind: "over" });
  await releaseShard(claim);
  expect({ run: await runRow(id), shards: await shardRows(id), points: await storedPoints(id) }).toEqual(
    before,
  );
});

test("two that store the same claim at once store it once", async () => {
  const { id } = await makeRun(await makeActor());
  const claim = await claimed(id);
  const answers = await Promise.all(Array.from({ length: 6 }, () => completeShard(claim, result(claim))));
  expect(new Set(answers)).toEqual(new Set(["stored"]));
  expect(await runRow(id)).toMatchObject({ pointsDone: claim.points, shardsLeft: 0, status: "done" });
  expect((await storedPoints(id)).values["trace/0"]).toBe(claim.points);
});

test("the last shard ends the run, with counts that agree and events without gaps", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor, { text: longText(300) });
  const { shardsLeft, points } = await runRow(id);
  expect(shardsLeft).toBeGreaterThan(2);
  const claims = await Promise.all(Array.from({ length: shardsLeft }, (_, index) => claimed(id, index)));
  for (const claim of claims) await renewLease(claim, { leaseSeconds: 10, pointsUnderWay: 1 });
  await Promise.all(claims.map(async (claim) => completeShard(claim, result(claim))));
  const run = await runRow(id);
  const failed = claims.reduce((sum, { from, to }) => sum + Math.ceil((to - from) / 7), 0);
  expect(run).toMatchObject({ status: "done", pointsDone: points, pointsFailed: failed, shardsLeft: 0 });
  expect(run.finishedAt).not.toBeNull();
  const events = await listEvents(actor, { runId: id, after: 0 });
  expect(events.map(({ sequence }) => sequence)).toEqual(events.map((_, i) => i + 1));
  expect(run.lastEvent).toBe(events.length);
  expect(events.at(-1)!.data).toEqual({ status: "done", points, pointsDone: points, pointsFailed: failed });
  for (const { data } of events) expect(data.pointsDone).toBeLessThanOrEqual(points);
});

test("nothing of a run that was cancelled is claimed or stored any more", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor, { text: longText(300) });
  const claim = await claimed(id);
  await cancelRun(actor, id);
  expect(await renewLease(claim, { leaseSeconds: 10, pointsUnderWay: 3 })).toBe("lost");
  expect(await completeShard(claim, result(claim))).toBe("refused");
  expect(await claimAs("another", id, 1)).toEqual({ kind: "over" });
  await expire(id);
  expect(await claimAs("another", id, 0)).toEqual({ kind: "over" });
  expect((await storedPoints(id)).values).toEqual({});
  expect(await runRow(id)).toMatchObject({ status: "cancelled", pointsDone: 0 });
});

test("a failed shard ends its run with the sentence; what was stored stays", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor, { text: longText(300) });
  const first = await claimed(id, 0);
  const second = await claimed(id, 1);
  await completeShard(first, result(first));
  expect(await failShard(second, "It took too long.")).toBe("failed");
  expect(await failShard(second, "It took too long again.")).toBe("refused");
  const run = await runRow(id);
  expect(run).toMatchObject({ status: "failed", error: "It took too long.", pointsDone: first.to });
  expect(await completeShard(second, result(second))).toBe("refused");
  expect((await storedPoints(id)).values["trace/0"]).toBe(first.to - first.from);
});

test("a claim given back can be taken at once", async () => {
  const { id } = await makeRun(await makeActor());
  const claim = await claimed(id);
  await releaseShard(claim);
  expect((await shardRows(id))[0]).toMatchObject({ status: "queued", leaseUntil: null });
  expect((await claimed(id)).attempt).toBe(2);
});
