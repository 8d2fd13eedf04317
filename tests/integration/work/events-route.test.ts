import { sql } from "drizzle-orm";
import { encode } from "next-auth/jwt";
import { afterAll, beforeAll, expect, test, vi } from "vitest";
import { GET } from "@/app/api/v1/runs/[id]/events/route";
import { eventStream } from "@/app/api/v1/runs/[id]/events/stream";
import { database } from "@/db/client";
import { makeActor, makeRun, makeWorkspace } from "@/db/factories";
import { actorForRun } from "@/lib/auth/actor";
import type { Actor } from "@/lib/permissions/actor";
import { appendEvent } from "@/lib/services/events/append-event";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { endSession } from "@/lib/services/sessions/end-session";
import { EventReader } from "./event-reader";
import { type OwnDatabase, ownDatabase } from "./own-database";

const SECRET = "a secret for the tests only";

let own: OwnDatabase;
beforeAll(async () => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", "http://127.0.0.1:3000");
  own = await ownDatabase();
});
afterAll(async () => {
  await own.drop();
  vi.unstubAllEnvs();
});

interface Asked {
  readonly lastEventId?: string;
  readonly after?: string;
  readonly signal?: AbortSignal;
}

async function requestOf(actor: Actor | null, runId: string, asked: Asked = {}): Promise<Request> {
  const { lastEventId, after, signal } = asked;
  const headers = new Headers();
  if (actor !== null) {
    const token = await encode({ token: { sid: actor.sessionId }, secret: SECRET });
    headers.set("cookie", `sweepwright-session=${token}`);
  }
  if (lastEventId !== undefined) headers.set("last-event-id", lastEventId);
  const address = `http://127.0.0.1:3000/api/v1/runs/${runId}/events${after === undefined ? "" : `?after=${after}`}`;
  return new Request(address, { headers, ...(signal === undefined ? {} : { signal }) });
}

async function ask(actor: Actor | null, runId: string, asked: Asked = {}): Promise<Response> {
  return GET(await requestOf(actor, runId, asked), { params: Promise.resolve({ id: runId }) });
}

const follow = async (...asked: Parameters<typeof ask>) => new EventReader(await ask(...asked));

/** Solves one more point of a run, as far as events are concerned. */
async function advance(runId: string, times = 1): Promise<void> {
  for (let i = 0; i < times; i++) {
    await database().transaction(async (transaction) => {
      await transaction.execute(
        sql`UPDATE run SET status = 'running', points_done = points_done + 1 WHERE id = ${runId}`,
      );
      await appendEvent(transaction, runId, "progress");
    });
  }
}

async function finish(runId: string): Promise<void> {
  await database().transaction(async (transaction) => {
    await transaction.execute(sql`UPDATE run SET status = 'done', points_done = points WHERE id = ${runId}`);
    await appendEvent(transaction, runId, "status");
  });
}

const upTo = (n: number, from = 1) => Array.from({ length: n - from + 1 }, (_, i) => from + i);

test("a reader is told every event in order, as it happens, and the stream ends with the run", async () => {
  const engineer = await makeActor();
  const { id } = await makeRun(engineer);
  const viewer = await makeActor("viewer", { id: engineer.workspaceId, slug: engineer.workspaceSlug });
  const reader = await follow(viewer, id);
  expect(reader.response.status).toBe(200);
  expect(Object.fromEntries(reader.response.headers)).toMatchObject({
    "content-type": "text/event-stream; charset=utf-8",
    "cache-control": "private, no-cache, no-transform",
    "x-accel-buffering": "no",
  });
  await reader.until(1);
  expect(reader.events).toEqual([
    { id: 1, data: { status: "queued", points: 31, pointsDone: 0, pointsFailed: 0 } },
  ]);
  await advance(id, 5);
  await reader.until(6);
  await finish(id);
  await reader.ended;
  expect(reader.ids).toEqual(upTo(7));
  expect(reader.events.map(({ data }) => data.pointsDone)).toEqual([0, 1, 2, 3, 4, 5, 31]);
  expect(reader.events.at(-1)!.data.status).toBe("done");
});

test("whoever comes again with Last-Event-ID misses nothing and hears nothing twice", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const heard: number[] = [];
  const writing = (async () => {
    await advance(id, 700);
    await finish(id);
  })();
  for (let visits = 0; heard.at(-1) !== 702; visits++) {
    expect(visits).toBeLessThan(100);
    const last = heard.at(-1);
    const reader = await follow(actor, id, last === undefined ? {} : { lastEventId: String(last) });
    const before = heard.length;
    await reader.until(Math.min(25, 702 - before));
    await reader.leave();
    heard.push(...reader.ids);
  }
  await writing;
  expect(heard).toEqual(upTo(702));
});

test("more events than one reading gives come all", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  await database().execute(sql`
    INSERT INTO event (run_id, sequence, kind, data)
    SELECT ${id}, n, 'progress', '{"status": "running", "points": 31, "pointsDone": 1, "pointsFailed": 0}'
    FROM generate_series(2, 1300) AS n`);
  await database().execute(sql`UPDATE run SET last_event = 1300 WHERE id = ${id}`);
  await finish(id);
  const reader = await follow(actor, id);
  await reader.ended;
  expect(reader.ids).toEqual(upTo(1301));
});

test("?after= does for a first visit what Last-Event-ID does later; an unknown number begins at the start", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  await advance(id, 3);
  const cases: [Asked, number][] = [
    [{ after: "2" }, 3],
    [{ after: "2", lastEventId: "3" }, 4],
    [{ lastEventId: "99" }, 1],
    [{ lastEventId: "-1" }, 1],
    [{ lastEventId: "one" }, 1],
    [{ lastEventId: "" }, 1],
  ];
  for (const [asked, first] of cases) {
    const reader = await follow(actor, id, asked);
    await reader.until(5 - first);
    expect(reader.ids).toEqual(upTo(4, first));
    await reader.leave();
  }
});

test("a browser that knows the last event is told to stay away", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  await cancelRun(actor, id);
  expect((await ask(actor, id, { lastEventId: "2" })).status).toBe(204);
  const reader = await follow(actor, id, { lastEventId: "1" });
  await reader.ended;
  expect(reader.ids).toEqual([2]);
});

test("a run of another workspace, and one that never was, is not found; nobody is signed out to", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const stranger = await makeActor("admin", await makeWorkspace());
  expect((await ask(stranger, id)).status).toBe(404);
  expect((await ask(actor, "8b4a1f0c-7c5b-4a0e-9d0a-0d6f1f1f2a3b")).status).toBe(404);
  expect((await ask(actor, "no-run")).status).toBe(404);
  expect((await ask(null, id)).status).toBe(401);
});

test("a hundred readers share one listening connection", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const room = { id: actor.workspaceId, slug: actor.workspaceSlug };
  const people = await Promise.all(Array.from({ length: 5 }, () => makeActor("viewer", room)));
  const readers = await Promise.all(Array.from({ length: 100 }, (_, i) => follow(people[i % 5]!, id)));
  await Promise.all(readers.map((reader) => reader.until(1)));
  await advance(id, 3);
  const { rows } = await database().execute<{ listeners: number }>(sql`
    SELECT count(*)::int AS listeners FROM pg_stat_activity
    WHERE datname = current_database() AND application_name = 'sweepwright listener'`);
  expect(rows[0]!.listeners).toBe(1);
  await finish(id);
  await Promise.all(readers.map(({ ended }) => ended));
  for (const { ids } of readers) expect(ids).toEqual(upTo(5));
});

/** Waits until this process's pool has noticed which of its connections are dead. */
async function poolFit(): Promise<void> {
  const all = () => Promise.all(Array.from({ length: 20 }, () => database().execute(sql`SELECT 1`)));
  await vi.waitFor(all, { timeout: 20_000 });
}

test("a stream goes on over a break of the database", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const reader = await follow(actor, id);
  await advance(id);
  await reader.until(2);
  await own.shut(true);
  await own.shut(false);
  await poolFit();
  await advance(id, 2);
  await reader.until(4);
  await finish(id);
  await reader.ended;
  expect(reader.ids).toEqual(upTo(5));
});

test("a reader who goes away is let go", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const going = new AbortController();
  const reader = await follow(actor, id, { signal: going.signal });
  await reader.until(1);
  going.abort();
  await reader.ended;
  await advance(id);
  expect(reader.ids).toEqual([1]);
});

test("silence is broken by a comment, and the stream ends when the session has ended", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const reader = new EventReader(
    new Response(
      eventStream({
        runId: id,
        after: 0,
        reader: async () => actorForRun(id, await requestOf(actor, id)),
        signal: new AbortController().signal,
        heartbeat: 30,
      }),
    ),
  );
  await vi.waitFor(() => expect(reader.text.split(": still here\n\n").length).toBeGreaterThan(3));
  await endSession(actor.sessionId);
  await reader.ended;
  expect(reader.ids).toEqual([1]);
});

test("one person follows thirty runs at once and no more, until a page of theirs is closed", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const readers = await Promise.all(Array.from({ length: 30 }, () => follow(actor, id)));
  expect(new Set(readers.map(({ response }) => response.status))).toEqual(new Set([200]));
  const refused = await ask(actor, id);
  expect([refused.status, (await refused.json()).code]).toEqual([429, "too many"]);
  const colleague = await makeActor("viewer", { id: actor.workspaceId, slug: actor.workspaceSlug });
  const other = await follow(colleague, id);
  await other.until(1);
  await Promise.all([other.leave(), readers.pop()!.leave()]);
  const next = await follow(actor, id);
  await next.until(1);
  await finish(id);
  await Promise.all([...readers, next].map(({ ended }) => ended));
  expect((await ask(actor, id, { lastEventId: "0" })).status).toBe(200);
});
