import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { GET } from "@/app/api/v1/runs/[id]/route";
import { makeActor, makeRun, makeWorkspace } from "@/db/factories";
import { decodeColumns } from "@/lib/analyses/columns-document";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { storeShard } from "../services/store-shard";
import { ADDRESS, call, SECRET } from "./caller";
import { ownDatabase } from "./own-database";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => void vi.unstubAllEnvs());

describe("GET runs/{id} by Accept", () => {
  it("gives document, comma-separated values and columns with the same numbers, to a viewer too", async () => {
    const room = await makeWorkspace();
    const actor = await makeActor("engineer", room);
    const viewer = await makeActor("viewer", room);
    const { id } = await makeRun(actor);
    await storeShard(id, 0, (await getRun(actor, id)).plan, [3]);
    const { document } = await getRunDocument(actor, id);
    const ask = (accept: string) => call(GET, viewer, { params: { id }, headers: { accept } });

    for (const accept of ["*/*", "application/json", "application/*;q=0.5, image/png"]) {
      const answer = await ask(accept);
      expect(answer.headers.get("vary")).toBe("accept");
      expect(await answer.json()).toEqual(JSON.parse(JSON.stringify(document)));
    }
    const csv = await ask("text/csv;q=0.9, application/json;q=0.1");
    expect(csv.headers.get("content-type")).toMatch(/^text\/csv; charset=utf-8/);
    expect(csv.headers.get("content-disposition")).toMatch(/filename="[a-z0-9-]+-netlist-1-run-1\.csv"/);
    const lines = (await csv.text()).split("\r\n");
    const { axes, traces, points } = document;
    expect(lines.slice(1, -1)).toEqual(
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
    const binary = await ask("application/octet-stream");
    expect(binary.headers.get("content-type")).toBe("application/octet-stream");
    const columns = decodeColumns(await binary.arrayBuffer());
    expect(Array.from(columns.traces[0]!.values, (v) => (Number.isNaN(v) ? null : v))).toEqual(
      traces[0]!.values,
    );
  });

  it("refuses a form that it has not, and tells nothing to those outside", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    for (const accept of ["image/png", "application/json;q=0"]) {
      const answer = await call(GET, actor, { params: { id }, headers: { accept } });
      expect(answer.status).toBe(406);
      expect(answer.headers.get("content-type")).toBe("application/problem+json");
      expect((await answer.json()).detail).toMatch(/application\/json, text\/csv, application\/octet-stream/);
    }
    const csv = { params: { id }, headers: { accept: "text/csv" } };
    expect((await call(GET, await makeActor("admin"), csv)).status).toBe(404);
    expect((await call(GET, null, csv)).status).toBe(401);
  });
});
