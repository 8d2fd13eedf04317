import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { POST as saveRevision } from "@/app/api/v1/netlists/[id]/revisions/route";
import { GET as getNetlist } from "@/app/api/v1/netlists/[id]/route";
import { POST as createNetlist, GET as listNetlists } from "@/app/api/v1/netlists/route";
import { POST as cancelRun } from "@/app/api/v1/runs/[id]/cancel/route";
import { GET as getEvents } from "@/app/api/v1/runs/[id]/events/route";
import { GET as getPoint } from "@/app/api/v1/runs/[id]/points/[k]/route";
import { GET as getDocument } from "@/app/api/v1/runs/[id]/route";
import { GET as getSummary } from "@/app/api/v1/runs/[id]/summary/route";
import { GET as listRuns, POST as startRun } from "@/app/api/v1/runs/route";
import { DIODE_TEXT, makeActor, makeNetlist, makeRun, makeWorkspace } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { closeListener } from "@/lib/services/events/listen";
import { getRun } from "@/lib/services/runs/get-run";
import { endSession } from "@/lib/services/sessions/end-session";
import { storeShard } from "../services/store-shard";
import { ADDRESS, call, SECRET } from "./caller";
import { ownDatabase } from "./own-database";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(async () => {
  vi.unstubAllEnvs();
  await closeListener();
});

const CHANGED = DIODE_TEXT.replace("2 fA", "3 fA");

/** Every route and verb, asked by `actor` about things of the workspace of `owner`. */
async function everyRoute(owner: Actor): Promise<Record<string, (actor: Actor | null) => Promise<Response>>> {
  const workspace = owner.workspaceSlug;
  const { id: netlistId } = await makeNetlist(owner);
  const { id } = await makeRun(owner);
  const search = { workspace };
  return {
    "GET netlists": (actor) => call(listNetlists, actor, { search }),
    "POST netlists": (actor) => call(createNetlist, actor, { body: { workspace, text: DIODE_TEXT } }),
    "GET netlists/{id}": (actor) => call(getNetlist, actor, { params: { id: netlistId } }),
    "POST netlists/{id}/revisions": (actor) =>
      call(saveRevision, actor, { params: { id: netlistId }, body: { base: 1, text: CHANGED } }),
    "GET runs": (actor) => call(listRuns, actor, { search }),
    "POST runs": (actor) => call(startRun, actor, { body: { netlistId, base: 1 } }),
    "GET runs/{id}": (actor) => call(getDocument, actor, { params: { id } }),
    "GET runs/{id}/summary": (actor) => call(getSummary, actor, { params: { id } }),
    "GET runs/{id}/events": async (actor) => {
      const response = await call(getEvents, actor, { params: { id } });
      if (response.ok) await response.body?.cancel();
      return response;
    },
    "GET runs/{id}/points/{k}": (actor) => call(getPoint, actor, { params: { id, k: "0" } }),
    "POST runs/{id}/cancel": (actor) => call(cancelRun, actor, { params: { id }, method: "POST" }),
  };
}

const ROUTES = [
  "GET netlists",
  "POST netlists",
  "GET netlists/{id}",
  "POST netlists/{id}/revisions",
  "GET runs",
  "POST runs",
  "GET runs/{id}",
  "GET runs/{id}/summary",
  "GET runs/{id}/events",
  "GET runs/{id}/points/{k}",
  "POST runs/{id}/cancel",
] as const;

describe.each(ROUTES)("%s", (name) => {
  it("answers 404 to an admin of another workspace, with problem details", async () => {
    const routes = await everyRoute(await makeActor());
    const response = await routes[name]!(await makeActor("admin"));
    expect(response.status).toBe(404);
    expect(response.headers.get("content-type")).toBe("application/problem+json");
    expect(await response.json()).toMatchObject({
      status: 404,
      code: "not found",
      detail: expect.any(String),
    });
  });

  it("answers 401 to nobody and to an ended session", async () => {
    const owner = await makeActor();
    const routes = await everyRoute(owner);
    expect((await routes[name]!(null)).status).toBe(401);
    await endSession(owner.sessionId);
    expect((await routes[name]!(owner)).status).toBe(401);
  });

  it("answers a viewer of the same workspace when it only reads, and 403 when it changes something", async () => {
    const room = await makeWorkspace();
    const routes = await everyRoute(await makeActor("engineer", room));
    const { status } = await routes[name]!(await makeActor("viewer", room));
    expect(status).toBe(name.startsWith("GET") ? 200 : 403);
  });

  it("answers an engineer of the workspace", async () => {
    const owner = await makeActor();
    const routes = await everyRoute(owner);
    const response = await routes[name]!(owner);
    const makes = ["POST netlists", "POST netlists/{id}/revisions", "POST runs"].includes(name);
    expect(response.status).toBe(makes ? 201 : 200);
    expect(response.headers.get("cache-control")).toMatch(/no-store|no-cache/);
  });
});

describe("a request that changes something", () => {
  it.each(ROUTES.filter((name) => name.startsWith("POST")))(
    "%s is refused from another site's page",
    async (name) => {
      const owner = await makeActor();
      const routes = await everyRoute(owner);
      vi.stubEnv("NEXTAUTH_URL", "https://bench.example");
      const { status } = await routes[name]!(owner);
      vi.stubEnv("NEXTAUTH_URL", ADDRESS);
      expect(status).toBe(403);
    },
  );
});

describe("ids", () => {
  it.each(["x", "' OR 1=1 --", "00000000-0000-4000-8000-000000000000", "%00", "\0", "\ud800"])(
    "%j is known nowhere",
    async (id) => {
      const actor = await makeActor("admin");
      const responses = await Promise.all([
        call(getNetlist, actor, { params: { id } }),
        call(getDocument, actor, { params: { id } }),
        call(getSummary, actor, { params: { id } }),
        call(getPoint, actor, { params: { id, k: "0" } }),
        call(startRun, actor, { body: { netlistId: id, base: 1 } }),
        call(cancelRun, actor, { params: { id }, method: "POST" }),
      ]);
      expect(responses.map(({ status }) => status)).toEqual([404, 404, 404, 404, 404, 404]);
    },
  );
});

describe("a workspace", () => {
  it.each(["\0", "north\0bench", "\ud800", "%", "x".repeat(5_000), "' OR 1=1 --"])(
    "%j is known nowhere, by address and by body",
    async (workspace) => {
      const actor = await makeActor("admin");
      const responses = await Promise.all([
        call(listNetlists, actor, { search: { workspace } }),
        call(listRuns, actor, { search: { workspace } }),
        call(createNetlist, actor, { body: { workspace, text: DIODE_TEXT } }),
      ]);
      expect(responses.map(({ status }) => status)).toEqual([404, 404, 404]);
    },
  );
});

describe("bodies", () => {
  it.each([
    ["an oversized text", { text: "#".repeat(262_145) }, 413, "262\u202f145 characters"],
    ["more than two mebibytes", { text: "#".repeat(2 * 1024 * 1024) }, 413, "larger than"],
    ["a text that is none", { text: 7 }, 400, "text"],
    ["no text", {}, 400, "text"],
    ["no JSON", "{", 400, "not JSON"],
  ])("%s is answered by a sentence", async (_, wish, status, says) => {
    const actor = await makeActor();
    const body = typeof wish === "string" ? wish : { workspace: actor.workspaceSlug, ...wish };
    const response = await call(createNetlist, actor, { body });
    expect(response.status).toBe(status);
    expect((await response.json()).detail).toContain(says);
  });

  it("a request that names no workspace is told so", async () => {
    const response = await call(listNetlists, await makeActor());
    expect([response.status, (await response.json()).detail]).toEqual([
      400,
      expect.stringContaining("workspace"),
    ]);
  });
});

describe("POST runs", () => {
  it("answers a sweep of 1e9 points with its diagnostic at its place", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    const text = DIODE_TEXT.replace("5 per decade", "1000000000 points");
    const response = await call(startRun, actor, { body: { netlistId, base: 1, text } });
    expect(response.status).toBe(400);
    const { diagnostics } = await response.json();
    expect(diagnostics[0]).toMatchObject({ severity: "error", code: expect.stringMatching(/^CAP\d$/) });
    expect(text.slice(diagnostics[0].from, diagnostics[0].to)).toContain("1000000000");
  });

  it("answers a stale text with 409 and the newest revision", async () => {
    const actor = await makeActor();
    const { id: netlistId } = await makeNetlist(actor);
    await call(saveRevision, actor, { params: { id: netlistId }, body: { base: 1, text: CHANGED } });
    const text = DIODE_TEXT.replace("2 fA", "4 fA");
    const response = await call(startRun, actor, { body: { netlistId, base: 1, text } });
    expect([response.status, (await response.json()).latest]).toEqual([409, 2]);
  });
});

describe("POST netlists/{id}/revisions", () => {
  it("answers 201 for a change, 200 for the same canonical text, 409 for a stale one", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const save = (base: number, text: string) =>
      call(saveRevision, actor, { params: { id }, body: { base, text } });
    expect((await save(1, CHANGED)).status).toBe(201);
    const same = await save(2, `\n${CHANGED}\n\n`);
    expect([same.status, await same.json()]).toEqual([
      200,
      expect.objectContaining({ revision: 2, changed: false }),
    ]);
    const stale = await save(1, DIODE_TEXT.replace("2 fA", "4 fA"));
    expect([stale.status, (await stale.json()).latest]).toEqual([409, 2]);
  });
});

describe("GET runs/{id}", () => {
  it("has an entity tag, answers 304 to whoever has it, and a new document once more is solved", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const first = await call(getDocument, actor, { params: { id } });
    const etag = first.headers.get("etag")!;
    expect((await first.json()).verdict).toBe("no data");
    const again = (tag: string) =>
      call(getDocument, actor, { params: { id }, headers: { "if-none-match": tag } });
    const same = await again(etag);
    expect([same.status, same.headers.get("etag"), await same.text()]).toEqual([304, etag, ""]);
    await storeShard(id, 0, (await getRun(actor, id)).plan);
    const after = await again(etag);
    expect(after.status).toBe(200);
    expect((await after.json()).verdict).toBe("holds");
    expect((await again(after.headers.get("etag")!)).status).toBe(304);
  });

  it("does not answer 304 to somebody of another workspace who knows the tag", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const etag = (await call(getDocument, actor, { params: { id } })).headers.get("etag")!;
    const other = await call(getDocument, await makeActor(), {
      params: { id },
      headers: { "if-none-match": etag },
    });
    expect(other.status).toBe(404);
  });
});

describe("GET runs/{id}/points/{k}", () => {
  it.each(["31", "-1", "1.5", "x", "1e3", "", "99999999999999999999"])(
    "%j of 31 points is 404",
    async (k) => {
      const actor = await makeActor();
      const { id } = await makeRun(actor);
      expect((await call(getPoint, actor, { params: { id, k } })).status).toBe(404);
    },
  );
});
