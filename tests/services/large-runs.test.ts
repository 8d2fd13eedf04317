import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { GET as getCsv } from "@/app/(work)/[workspace]/runs/[id]/points.csv/route";
import { GET as getColumns } from "@/app/api/v1/runs/[id]/columns/route";
import { GET as getDocument } from "@/app/api/v1/runs/[id]/route";
import { DIODE_TEXT, makeActor, makeRun, makeWorkspace } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { ADDRESS, call, SECRET } from "../integration/caller";
import { ownDatabase } from "../integration/own-database";
import { made, storeShard } from "./store-shard";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => void vi.unstubAllEnvs());

/** One trace, so five numbers a point. */
const text = (points: number, more = "") =>
  `${DIODE_TEXT.replace("5 per decade", `${points} points`)}${more}`;
const ask = (actor: Actor, id: string, method = "GET") =>
  call(getDocument, actor, { params: { id }, method });

describe("a run of a million numbers", () => {
  it("is sent in pieces that are the same document; a person reads two at a time, and lets go by leaving", async () => {
    const room = await makeWorkspace();
    const actor = await makeActor("engineer", room);
    const { id } = await makeRun(actor, { text: text(200_000) });
    const { plan } = await getRun(actor, id);
    for (const index of [0, 7, 20]) await storeShard(id, index, plan, [3]);

    const whole = await ask(actor, id);
    expect(whole.headers.get("content-type")).toBe("application/json");
    expect(whole.headers.get("cache-control")).toBe("private, no-cache");
    const sent = await whole.json();
    const { document, etag, release } = await getRunDocument(actor, id);
    release();
    expect(sent).toEqual(document);
    expect(whole.headers.get("etag")).toBe(etag);
    expect(sent.traces[0].values.slice(2, 5)).toEqual([made.trace(0, 2), null, made.trace(0, 4)]);

    expect((await ask(actor, id, "HEAD")).body).toBeNull();
    const open = await Promise.all([ask(actor, id), ask(actor, id)]);
    const third = await ask(actor, id);
    expect([third.status, (await third.json()).code]).toEqual([429, "too many"]);
    const colleague = await ask(await makeActor("viewer", room), id);
    expect(colleague.status).toBe(200);
    await Promise.all([colleague, ...open].map(({ body }) => body?.cancel()));
    const again = await ask(actor, id);
    expect(again.status).toBe(200);
    await again.body?.cancel();
  });

  it("of more than sixteen million is refused with a sentence", async () => {
    const actor = await makeActor();
    const shows = Array.from({ length: 12 }, (_, i) => `show v${i} = s.v\n`).join("");
    const { id } = await makeRun(actor, { text: text(1_000_000, shows) });
    const response = await ask(actor, id);
    expect([response.status, (await response.json()).detail]).toEqual([
      413,
      expect.stringContaining("17\u202f000\u202f000 numbers"),
    ]);
  });
});

describe("whoever has left before they were answered", () => {
  it("keeps no room, in whatever form they asked", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: text(250_000) });
    const signal = AbortSignal.abort();
    const workspace = actor.workspaceSlug;
    for (let k = 0; k < 3; k++) {
      await call(getDocument, actor, { params: { id }, signal });
      const columns = await call(getColumns, actor, { params: { id }, signal });
      await columns.arrayBuffer();
      await call(getCsv, actor, { params: { workspace, id }, signal });
      await call(getCsv, actor, { params: { workspace, id }, signal });
    }
    const document = await ask(actor, id);
    expect(document.status).toBe(200);
    await document.body?.cancel();
    const points = await call(getCsv, actor, { params: { workspace, id } });
    expect(points.status).toBe(200);
    await points.body?.cancel();
  });

  it("takes no room where a run is refused as too large once its plan is known", async () => {
    const actor = await makeActor();
    const shows = Array.from({ length: 12 }, (_, i) => `show v${i} = s.v\n`).join("");
    const { id } = await makeRun(actor, { text: text(1_000_000, shows) });
    for (let k = 0; k < 3; k++) expect((await ask(actor, id)).status).toBe(413);
  });
});

describe("points as comma-separated values", () => {
  it("are fetched four at a time by a person, who lets go by leaving or by asking for the head alone", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const params = { workspace: actor.workspaceSlug, id };
    const fetched = (method = "GET") => call(getCsv, actor, { params, method });
    for (let k = 0; k < 5; k++) expect((await fetched("HEAD")).status).toBe(200);
    const open = await Promise.all([fetched(), fetched(), fetched(), fetched()]);
    const fifth = await fetched();
    expect([fifth.status, (await fifth.json()).code]).toEqual([429, "too many"]);
    await open[0]!.body?.cancel();
    expect((await (await fetched()).text()).split("\r\n")).toHaveLength(33);
    await Promise.all(open.slice(1).map(({ body }) => body?.cancel()));
    for (let k = 0; k < 5; k++) await (await fetched()).text();
  });

  it("are all there, whatever the sizes of shards and blocks, and empty where nothing is stored", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: text(9_000) });
    const { plan } = await getRun(actor, id);
    for (const index of [0, 2]) await storeShard(id, index, plan, [1]);
    const { document, release } = await getRunDocument(actor, id);
    release();
    const response = await call(getCsv, actor, { params: { workspace: actor.workspaceSlug, id } });
    const lines = (await response.text()).split("\r\n").slice(1, -1);
    expect(lines).toHaveLength(9_000);
    const { axes, traces, points } = document;
    expect(lines).toEqual(
      points.outcome.map((outcome, k) =>
        [
          k,
          axes[0]!.values[k],
          traces[0]!.values[k] ?? "",
          outcome ?? "not solved",
          points.bound[k] ?? "",
        ].join(","),
      ),
    );
    expect(new Set(points.outcome)).toEqual(new Set(["converged", "did not settle", null]));
  });

  it("are nobody's of another workspace", async () => {
    const { id } = await makeRun(await makeActor());
    const other = await makeActor("admin");
    const response = await call(getCsv, other, { params: { workspace: other.workspaceSlug, id } });
    expect(response.status).toBe(404);
  });
});
