import { afterAll, describe, expect, it } from "vitest";
import { makeActor, makeRun } from "@/db/factories";
import { closeListener } from "@/lib/services/events/listen";
import { cancelRun } from "@/lib/services/runs/cancel-run";
import { findVoltageSpan } from "@/lib/services/runs/find-voltage-span";
import { getRun } from "@/lib/services/runs/get-run";
import { waitForPoints } from "@/lib/services/runs/wait-for-points";
import { ownDatabase } from "../integration/own-database";
import { made, storeShard } from "./store-shard";

ownDatabase();
afterAll(closeListener);

async function makeQueued() {
  const actor = await makeActor();
  const { id } = await makeRun(actor);
  const { plan, points } = await getRun(actor, id);
  return { actor, id, plan, points };
}

describe("findVoltageSpan", () => {
  it("names the nets with the lowest and the highest voltage over all stored points", async () => {
    const { actor, id, plan, points } = await makeQueued();
    expect(await findVoltageSpan(actor, id)).toBeNull();
    await storeShard(id, 0, plan);
    const nets = plan.unknowns.flatMap(({ name, unit }, i) => (unit === "V" ? [{ name, i }] : []));
    // The made-up figures fall with the number of the unknown and of the point.
    const [first, last] = [nets[0]!, nets.at(-1)!];
    expect(await findVoltageSpan(actor, id)).toEqual({
      low: { net: last.name, volts: made.unknown(last.i, points - 1) },
      high: { net: first.name, volts: made.unknown(first.i, 0) },
    });
  });

  it("is not for another workspace", async () => {
    const { id } = await makeQueued();
    await expect(findVoltageSpan(await makeActor(), id)).rejects.toMatchObject({ code: "not found" });
  });
});

describe("waitForPoints", () => {
  /** Longer than any of these tests may take: whoever waited it out has failed by its time. */
  const FOREVER = 600_000;

  it("ends when the first points are stored", async () => {
    const { actor, id, plan } = await makeQueued();
    const waited = waitForPoints(actor, id, FOREVER);
    await storeShard(id, 0, plan);
    await waited;
    expect((await getRun(actor, id)).pointsDone).toBeGreaterThan(0);
  });

  it("ends when the run does, and at once for one that has ended", async () => {
    const { actor, id } = await makeQueued();
    const waited = waitForPoints(actor, id, FOREVER);
    await cancelRun(actor, id);
    await waited;
    await waitForPoints(actor, id, FOREVER);
    expect((await getRun(actor, id)).pointsDone).toBe(0);
  });

  it("gives up when its time is over", async () => {
    const { actor, id } = await makeQueued();
    await waitForPoints(actor, id, 20);
    expect((await getRun(actor, id)).status).toBe("queued");
  });

  it("is not for another workspace", async () => {
    const { id } = await makeQueued();
    await expect(waitForPoints(await makeActor(), id, 1)).rejects.toMatchObject({ code: "not found" });
  });
});
