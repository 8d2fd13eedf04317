import { afterAll, beforeAll, expect, it, vi } from "vitest";
import { GET as getOverview } from "@/app/(work)/[workspace]/runs/[id]/overview/route";
import { makeActor, makeRun, makeWorkspace } from "@/db/factories";
import { outlineOf } from "@/lib/analyses/plan";
import { getRun } from "@/lib/services/runs/get-run";
import { hasRunOverview } from "@/lib/services/runs/get-run-overview";
import { storeJudgement } from "@/lib/services/shards/store-judgement";
import { ADDRESS, call, SECRET } from "../integration/caller";
import { ownDatabase } from "../integration/own-database";
import { storeShard } from "./store-shard";

ownDatabase();
beforeAll(() => {
  vi.stubEnv("NEXTAUTH_SECRET", SECRET);
  vi.stubEnv("NEXTAUTH_URL", ADDRESS);
});
afterAll(() => void vi.unstubAllEnvs());

const LONG = `title "Afar"
knob V_in = 1 V
ground -- V1 : voltage V_in -- a
a -- R1 : resistor 1 kΩ -- ground
sweep V_in from 0 V to 1 V, 12000 points
sweep temperature from 10 °C to 20 °C, 2 points
show a.v
`;

it("an overview is stored with the judgement, once, and read by members alone", async () => {
  const room = await makeWorkspace();
  const actor = await makeActor("engineer", room);
  const { id, number } = await makeRun(actor);
  expect(number).toBe(1);
  const { plan } = await getRun(actor, id);
  await storeShard(id, 0, plan, []);
  const params = { workspace: room.slug, id };
  expect(await hasRunOverview(actor, id)).toBe(false);
  expect((await call(getOverview, actor, { params })).status).toBe(404);

  const judgement = { verdict: null, requirements: [], readings: [], budgets: null, causes: null };
  const store = (byte: number) => storeJudgement(id, { judgement, overview: Uint8Array.of(1, byte) });
  expect([await store(2), await store(3)]).toEqual(["stored", "refused"]);
  const viewer = await makeActor("viewer", room);
  expect(await hasRunOverview(viewer, id)).toBe(true);
  const answer = await call(getOverview, viewer, { params });
  expect([...new Uint8Array(await answer.arrayBuffer())]).toEqual([1, 2]);
  expect((await call(getOverview, await makeActor(), { params })).status).toBe(404);
  expect((await call(getOverview, null, { params })).status).toBe(401);
});

it("the outline of a plan leaves out what lies between the ends of a long axis, and nothing of a short one", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor, { text: LONG });
  const { plan } = await getRun(actor, id);
  expect((await getRun(actor, id, "outline")).plan).toEqual(outlineOf(plan));
  const { id: small } = await makeRun(actor);
  expect((await getRun(actor, small, "outline")).plan).toEqual((await getRun(actor, small)).plan);
});
