import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { POST as restore } from "@/app/api/v1/netlists/[id]/revisions/[n]/restore/route";
import { POST as save } from "@/app/api/v1/netlists/[id]/revisions/route";
import { GET as getNetlist } from "@/app/api/v1/netlists/[id]/route";
import { POST as create } from "@/app/api/v1/netlists/route";
import { POST as startRun } from "@/app/api/v1/runs/route";
import { database } from "@/db/client";
import { DIODE_TEXT, makeActor, makeNetlist, makeWorkspace } from "@/db/factories";
import type { Actor } from "@/lib/permissions/actor";
import { answerOnce } from "@/lib/services/answers/answer-once";
import { getNetlist as readNetlist } from "@/lib/services/netlists/get-netlist";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { ADDRESS, call, SECRET } from "./caller";
import { ownDatabase } from "./own-database";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => void vi.unstubAllEnvs());

const text = (amount: number) => DIODE_TEXT.replace("2 fA", `${amount} fA`);
const tagOf = async (actor: Actor, id: string) =>
  (await call(getNetlist, actor, { params: { id } })).headers.get("etag")!;

function saving(actor: Actor, id: string, body: object, headers: Record<string, string> = {}) {
  return call(save, actor, { params: { id }, body, headers });
}

describe("saving upon a revision by its entity tag (RFC 9110, 13.1.1)", () => {
  it("answers 201 with the tag of the new revision, upon which the next one is saved", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const first = await saving(actor, id, { text: text(3) }, { "if-match": await tagOf(actor, id) });
    expect([first.status, await first.json()]).toEqual([201, expect.objectContaining({ revision: 2 })]);
    const tag = first.headers.get("etag")!;
    expect(tag).toBe(await tagOf(actor, id));
    const next = await saving(actor, id, { text: text(4) }, { "if-match": `"other", ${tag}` });
    expect([next.status, await next.json()]).toEqual([201, expect.objectContaining({ revision: 3 })]);
  });

  it("answers 412 with the newest revision to a stale, a weak and a foreign tag, and saves nothing", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const stale = await tagOf(actor, id);
    await saveRevision(actor, { netlistId: id, base: 1, text: text(3) });
    const newest = await tagOf(actor, id);
    const foreign = await tagOf(actor, (await makeNetlist(actor)).id);
    for (const tag of [stale, `W/${newest}`, foreign, "nonsense"]) {
      const answer = await saving(actor, id, { text: text(9) }, { "if-match": tag });
      expect(answer.status).toBe(412);
      expect(await answer.json()).toMatchObject({ code: "precondition failed", latest: 2 });
    }
    expect((await readNetlist(actor, id)).revision).toBe(2);
  });

  it("lets one of several that save at once upon the same tag through, and answers 412 to the others", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const tag = await tagOf(actor, id);
    const all = [3, 4, 5, 6].map((amount) => saving(actor, id, { text: text(amount) }, { "if-match": tag }));
    const answers = await Promise.all(all);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 412, 412, 412]);
    for (const answer of answers.filter(({ status }) => status === 412))
      expect(await answer.json()).toMatchObject({ code: "precondition failed", latest: 2 });
  });

  it("answers 428 to who says neither the tag nor the number, in restoring too; * takes whatever is newest", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    expect((await saving(actor, id, { text: text(3) })).status).toBe(428);
    const restoring = (headers: Record<string, string>) =>
      call(restore, actor, { params: { id, n: "1" }, body: {}, headers });
    expect((await restoring({})).status).toBe(428);
    expect((await saving(actor, id, { text: text(3) }, { "if-match": "*" })).status).toBe(201);
    expect((await restoring({ "if-match": '"1-x-1"' })).status).toBe(412);
    expect((await restoring({ "if-match": await tagOf(actor, id) })).status).toBe(201);
  });

  it("says nothing of a netlist to a member of another workspace", async () => {
    const { id } = await makeNetlist(await makeActor());
    expect((await saving(await makeActor(), id, { text: text(3) })).status).toBe(404);
  });
});

describe("a request with an Idempotency-Key", () => {
  const key = (of: string) => ({ "idempotency-key": of });

  it("makes its revision once, and gets the same answer again, whatever was saved since", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const ask = () => saving(actor, id, { base: 1, text: text(3) }, key("a-1"));
    const first = await ask();
    const body = await first.json();
    expect([first.status, body.revision]).toEqual([201, 2]);
    await saveRevision(actor, { netlistId: id, base: 2, text: text(4) });
    const again = await ask();
    expect([again.status, await again.json(), again.headers.get("etag")]).toEqual([
      201,
      body,
      first.headers.get("etag"),
    ]);
    expect((await readNetlist(actor, id)).revision).toBe(3);
  });

  it("is 422 when the key stood for something else, and no matter of another person's keys", async () => {
    const room = await makeWorkspace();
    const [actor, other] = [await makeActor("engineer", room), await makeActor("engineer", room)];
    const { id } = await makeNetlist(actor);
    expect((await saving(actor, id, { base: 1, text: text(3) }, key("b"))).status).toBe(201);
    const reused = await saving(actor, id, { base: 2, text: text(4) }, key("b"));
    expect([reused.status, (await reused.json()).code]).toEqual([422, "key reused"]);
    expect((await saving(other, id, { base: 2, text: text(5) }, key("b"))).status).toBe(201);
  });

  it("makes one netlist and one run of many that come at once", async () => {
    const actor = await makeActor();
    const ask = () =>
      call(create, actor, { body: { workspace: actor.workspaceSlug, text: text(3) }, headers: key("c") });
    const answers = await Promise.all([ask(), ask(), ask(), ask()]);
    const made = await Promise.all(answers.filter(({ status }) => status === 201).map((one) => one.json()));
    expect(answers.every(({ status }) => status === 201 || status === 409)).toBe(true);
    expect(new Set(made.map(({ id }) => id)).size).toBe(1);
    const run = () => call(startRun, actor, { body: { netlistId: made[0].id, base: 1 }, headers: key("d") });
    const [once, twice] = [await run(), await run()];
    expect(await twice.json()).toEqual(await once.json());
    expect(twice.headers.get("location")).toBe(once.headers.get("location"));
  });

  it("that failed may be sent again with the same key, mended by what others did", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const ask = () => saving(actor, id, { base: 2, text: text(4) }, key("e"));
    expect((await ask()).status).toBe(409);
    await saveRevision(actor, { netlistId: id, base: 1, text: text(3) });
    expect((await ask()).status).toBe(201);
  });

  it("is 400 for a key that is none", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    for (const bad of ["two words", "x".repeat(201), '""'])
      expect((await saving(actor, id, { base: 1, text: text(3) }, key(bad))).status).toBe(400);
  });

  it("whose process ended in the middle is worked on anew after two minutes, and forgotten after a day", async () => {
    const actor = await makeActor();
    const asked = { key: "f", request: "r" };
    const aged = (interval: string) =>
      database().$client.query(
        "UPDATE kept_answer SET created_at = now() - $1::interval WHERE user_id = $2",
        [interval, actor.userId],
      );
    await database().$client.query("INSERT INTO kept_answer (user_id, key, request) VALUES ($1, 'f', 'r')", [
      actor.userId,
    ]);
    const work = async () => ({ status: 201, body: { made: true } });
    await expect(answerOnce(actor, asked, work)).rejects.toMatchObject({ code: "conflict" });
    await aged("3 minutes");
    expect(await answerOnce(actor, asked, work)).toEqual({ status: 201, body: { made: true } });
    await aged("23 hours");
    const other = async () => ({ status: 201, body: { made: "another" } });
    expect((await answerOnce(actor, asked, other)).body).toEqual({ made: true });
    await aged("25 hours");
    expect((await answerOnce(actor, asked, other)).body).toEqual({ made: "another" });
  });

  it("makes nothing twice where the answer could not be kept", async () => {
    const actor = await makeActor();
    const asked = { key: "kept", request: "0".repeat(64) };
    // PostgreSQL keeps no NUL.
    const work = vi.fn(async () => ({ status: 201, body: { made: "\0" } }));
    await expect(answerOnce(actor, asked, work)).rejects.toThrow();
    await expect(answerOnce(actor, asked, work)).rejects.toMatchObject({ code: "conflict" });
    expect(work).toHaveBeenCalledTimes(1);
  });
});
