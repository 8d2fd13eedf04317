import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { GET as getColumns } from "@/app/api/v1/runs/[id]/columns/route";
import { DIODE_TEXT, makeActor, makeRun, makeWorkspace } from "@/db/factories";
import { decodeColumns } from "@/lib/analyses/columns-document";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunColumns } from "@/lib/services/runs/get-run-columns";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { LARGE, roomFor } from "@/lib/services/runs/large-documents";
import { ADDRESS, call, SECRET } from "../integration/caller";
import { ownDatabase } from "../integration/own-database";
import { storeShard } from "./store-shard";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => void vi.unstubAllEnvs());

const numbered = (values: ArrayLike<number | null>) =>
  Array.from(values, (value) => (value === null || Number.isNaN(value) ? null : value));

describe("GET runs/{id}/columns", () => {
  it("has the numbers of the run document, for any member and nobody else", async () => {
    const room = await makeWorkspace();
    const actor = await makeActor("engineer", room);
    const { id } = await makeRun(actor, {
      text: `${DIODE_TEXT}read bend = deviation(v)\n`,
    });
    await storeShard(id, 0, (await getRun(actor, id)).plan, [3]);
    const answer = await call(getColumns, await makeActor("viewer", room), { params: { id } });
    expect(answer.headers.get("content-type")).toBe("application/octet-stream");
    const bytes = await answer.arrayBuffer();
    const { document, etag, columnsEtag } = await getRunDocument(actor, id);
    expect(answer.headers.get("etag")).toBe(columnsEtag);
    expect(columnsEtag).not.toBe(etag);
    const read = decodeColumns(bytes);
    expect(read.traces.map(({ values }) => numbered(values))).toEqual(
      document.traces.map(({ values }) => values),
    );
    expect(read.points.outcome).toEqual(document.points.outcome);
    expect(read.failures).toEqual(document.failures);
    expect((await call(getColumns, await makeActor(), { params: { id } })).status).toBe(404);
    expect((await call(getColumns, null, { params: { id } })).status).toBe(401);
  });

  it("keep their room until they are read, though the reader has left: the reading goes on with its memory", async () => {
    const actor = await makeActor();
    const text = DIODE_TEXT.replace("5 per decade", "200000 points");
    const { id } = await makeRun(actor, { text });
    const other = roomFor(actor.userId, LARGE);
    const { release, pieces } = await getRunColumns(actor, id);
    release();
    release();
    expect(() => roomFor(actor.userId, LARGE)).toThrow("Other large runs");
    for await (const piece of pieces) expect(piece.byteLength).toBeGreaterThan(0);
    await vi.waitFor(() => roomFor(actor.userId, LARGE)());
    other();
  });

  it("answers 304 to whoever has them", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const etag = (await call(getColumns, actor, { params: { id } })).headers.get("etag")!;
    const again = await call(getColumns, actor, { params: { id }, headers: { "if-none-match": etag } });
    expect(again.status).toBe(304);
    const { etag: ofDocument } = await getRunDocument(actor, id);
    const other = await call(getColumns, actor, { params: { id }, headers: { "if-none-match": ofDocument } });
    expect(other.status).toBe(200);
    const head = await call(getColumns, actor, { params: { id }, method: "HEAD" });
    expect([head.status, head.body]).toEqual([200, null]);
  });
});
