import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { POST as duplicate } from "@/app/api/v1/netlists/[id]/revisions/[n]/duplicate/route";
import { POST as restore } from "@/app/api/v1/netlists/[id]/revisions/[n]/restore/route";
import { GET as getRevision } from "@/app/api/v1/netlists/[id]/revisions/[n]/route";
import { GET as listRevisions } from "@/app/api/v1/netlists/[id]/revisions/route";
import { DIODE_TEXT, makeActor, makeNetlist, makeWorkspace } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { ADDRESS, call, SECRET } from "./caller";
import { ownDatabase } from "./own-database";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => {
  vi.unstubAllEnvs();
});

async function twoRevisions(actor: Actor): Promise<string> {
  const { id } = await makeNetlist(actor);
  await saveRevision(actor, { netlistId: id, base: 1, text: DIODE_TEXT.replace("2 fA", "3 fA") });
  return id;
}

/** Each route, asked about the first revision of a netlist. */
const ROUTES: readonly (readonly [
  name: string,
  ask: (actor: Actor | null, id: string) => Promise<Response>,
  viewer: number,
])[] = [
  ["GET revisions", (actor, id) => call(listRevisions, actor, { params: { id } }), 200],
  ["GET revisions/{n}", (actor, id) => call(getRevision, actor, { params: { id, n: "1" } }), 200],
  [
    "POST revisions/{n}/restore",
    (actor, id) => call(restore, actor, { params: { id, n: "1" }, body: { base: 2 } }),
    403,
  ],
  [
    "POST revisions/{n}/duplicate",
    (actor, id) => call(duplicate, actor, { params: { id, n: "1" }, method: "POST" }),
    403,
  ],
];

describe.each(ROUTES)("%s", (_, ask, viewer) => {
  it("answers 401 to nobody, 404 to another workspace, a viewer as their role allows", async () => {
    const workspace = await makeWorkspace();
    const id = await twoRevisions(await makeActor("engineer", workspace));
    expect((await ask(null, id)).status).toBe(401);
    const foreign = await ask(await makeActor("admin"), id);
    expect(foreign.status).toBe(404);
    expect(foreign.headers.get("content-type")).toBe("application/problem+json");
    expect((await ask(await makeActor("viewer", workspace), id)).status).toBe(viewer);
  });
});

it("a revision is sent once: it has an entity tag of its own that never changes", async () => {
  const actor = await makeActor();
  const id = await twoRevisions(actor);
  const first = await call(getRevision, actor, { params: { id, n: "1" } });
  const etag = first.headers.get("etag")!;
  expect(await first.json()).toMatchObject({ number: 1, text: DIODE_TEXT });
  const again = await call(getRevision, actor, {
    params: { id, n: "1" },
    headers: { "if-none-match": etag },
  });
  expect(again.status).toBe(304);
  const other = await call(getRevision, actor, {
    params: { id, n: "2" },
    headers: { "if-none-match": etag },
  });
  expect(other.status).toBe(200);
});

it.each(["0", "3", "-1", "1.5", "one", "99999999999"])("there is no revision %s", async (n) => {
  const actor = await makeActor();
  const id = await twoRevisions(actor);
  expect((await call(getRevision, actor, { params: { id, n } })).status).toBe(404);
});

it("restoring answers 201, then 200 where nothing is left to restore, and 409 from a stale base", async () => {
  const actor = await makeActor();
  const id = await twoRevisions(actor);
  const ask = (base: number) => call(restore, actor, { params: { id, n: "1" }, body: { base } });
  const made = await ask(2);
  expect(made.status).toBe(201);
  expect(await made.json()).toMatchObject({ revision: 3, changed: true });
  expect((await ask(3)).status).toBe(200);
  await saveRevision(actor, { netlistId: id, base: 3, text: "knob I = 1 A\n" });
  const stale = await ask(3);
  expect(stale.status).toBe(409);
  expect(await stale.json()).toMatchObject({ code: "conflict", latest: 4 });
});

it("duplicating answers 201 with the place of the new netlist", async () => {
  const actor = await makeActor();
  const id = await twoRevisions(actor);
  const made = await call(duplicate, actor, { params: { id, n: "2" }, method: "POST" });
  expect(made.status).toBe(201);
  const { id: copy } = await made.json();
  expect(made.headers.get("location")).toBe(`/api/v1/netlists/${copy}`);
});

it.each([{ page: "0" }, { size: "101" }, { page: "x" }])("refuses a page such as %o", async (search) => {
  const actor = await makeActor();
  const id = await twoRevisions(actor);
  expect((await call(listRevisions, actor, { params: { id }, search: search as never })).status).toBe(400);
});
