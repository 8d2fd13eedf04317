import { describe, expect, it } from "vitest";
import { DIODE_TEXT, makeActor, makeRun } from "@/db/factories";
import { getPoint } from "@/lib/services/runs/get-point";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunDocument, getRunVersion } from "@/lib/services/runs/get-run-document";
import { getHome } from "@/lib/services/workspaces/get-home";
import { ownDatabase } from "../integration/own-database";
import { made, storeShard } from "./store-shard";

ownDatabase();

/** Two sweeps: 1000 points along the first axis, three along the second, two traces. */
const GRID = `${DIODE_TEXT.replace("5 per decade", "1000 points")}sweep temperature from 0 °C to 50 °C, 3 points
show i = D1.i
`;

async function makeGrid() {
  const actor = await makeActor();
  const { id, shards } = await makeRun(actor, { text: GRID });
  const { plan } = await getRun(actor, id);
  return { actor, id, shards, plan };
}

describe("getRunDocument", () => {
  it("has null for what is not solved yet, and every figure bit for bit in its place at the end", async () => {
    const { actor, id, shards, plan } = await makeGrid();
    expect(shards).toBeGreaterThan(1);
    const before = await getRunDocument(actor, id);
    expect(before.document).toMatchObject({ verdict: "no data", draws: 0 });
    expect(new Set(before.document.traces[0]!.values)).toEqual(new Set([null]));

    // Shards come in any order.
    for (let index = shards - 1; index > 0; index--) await storeShard(id, index, plan, [2999]);
    const partial = await getRunDocument(actor, id);
    expect(partial.document.traces[0]!.values[0]).toBeNull();
    expect(partial.document.points.outcome[0]).toBeNull();
    expect(partial.document.traces[0]!.values[2998]).toBe(made.trace(0, 2998));

    await storeShard(id, 0, plan);
    const { document, etag } = await getRunDocument(actor, id);
    expect(document).toMatchObject({
      format: "sweepwright-run/1",
      title: "A diode",
      readings: [],
      requirements: [],
    });
    expect(document.axes.map(({ knob, unit, values }) => [knob, unit, values.length])).toEqual([
      ["I_in", "A", 1000],
      ["temperature", "K", 3],
    ]);
    expect(document.traces.map(({ name, unit }) => [name, unit])).toEqual([
      ["v", "V"],
      ["i", "A"],
    ]);
    document.traces.forEach(({ values }, i) => {
      const expected = Array.from({ length: 3000 }, (_, point) => made.trace(i, point) as number | null);
      expected[2999] = null;
      expect(values).toEqual(expected);
    });
    expect(document.points.iterations).toEqual(
      Array.from({ length: 3000 }, (_, point) => made.iterations(point)),
    );
    expect(document.points.outcome.slice(2998)).toEqual(["converged", "did not settle"]);
    expect(document.failures).toEqual([{ point: 2999, outcome: "did not settle", unsettled: ["s", "D1"] }]);
    expect(new Set([before.etag, partial.etag, etag]).size).toBe(3);
    expect(await getRunVersion(actor, id)).toBe(etag);
  });

  it("tells warnings of the text with their line and column", async () => {
    const actor = await makeActor();
    const text = DIODE_TEXT.replace(/show .*\n/, "");
    const { id } = await makeRun(actor, { text });
    const { document } = await getRunDocument(actor, id);
    expect(document.traces).toEqual([]);
    const lines = text.split("\n").length;
    expect(document.diagnostics).toMatchObject([
      { code: "PLN8", severity: "warning", line: lines, column: 1 },
    ]);
  });
});

describe("getPoint", () => {
  it("has the point's place on both axes and all its figures", async () => {
    const { actor, id, shards, plan } = await makeGrid();
    for (let index = 0; index < shards; index++) await storeShard(id, index, plan);
    const point = 1000 + 500;
    const detail = await getPoint(actor, id, point);
    expect(detail).toMatchObject({
      point,
      outcome: "converged",
      iterations: made.iterations(point),
      residual: made.residual(point),
      rung: "newton",
      unsolved: [],
      failure: null,
    });
    expect(detail.at.map(({ knob, unit, value }) => [knob, unit, value])).toEqual([
      ["I_in", "A", plan.axes[0]!.values[500]],
      ["temperature", "K", 298.15],
    ]);
    expect(detail.traces).toEqual(plan.traces.map((one, i) => ({ ...one, value: made.trace(i, point) })));
    expect(detail.unknowns).toEqual(
      plan.unknowns.map((one, i) => ({ ...one, value: made.unknown(i, point) })),
    );
    expect(detail.unknowns.map(({ name }) => name)).toContain("s.v");
  });

  it("has the reason of a failed point, and no figures", async () => {
    const { actor, id, plan } = await makeGrid();
    await storeShard(id, 0, plan, [7]);
    const detail = await getPoint(actor, id, 7);
    expect(detail).toMatchObject({ outcome: "did not settle", unsolved: ["s", "D1"] });
    expect(detail.failure).toMatch(/came to no rest\. Farthest from settled: s, D1\.$/);
    expect([...detail.traces, ...detail.unknowns].map(({ value }) => value)).toEqual([null, null, null]);
  });

  it("says that a point is not solved yet while its shard is out", async () => {
    const { actor, id } = await makeGrid();
    expect(await getPoint(actor, id, 0)).toMatchObject({
      outcome: null,
      iterations: null,
      failure: "This point is not solved yet.",
    });
  });

  it("reads of a sweep of very many values the one that is asked for", async () => {
    const actor = await makeActor();
    const text = `${DIODE_TEXT.replace("5 per decade", "20000 points")}sweep temperature over 0 °C, 50 °C\n`;
    const { id } = await makeRun(actor, { text });
    const [axis] = (await getRun(actor, id)).plan.axes;
    for (const point of [0, 12_345, 20_001, 39_999]) {
      const { at } = await getPoint(actor, id, point);
      expect(at.map(({ value }) => value)).toEqual([
        axis!.values[point % 20_000],
        point < 20_000 ? 273.15 : 323.15,
      ]);
    }
  });

  it.each([-1, 3000, 0.5, Number.NaN])("does not know point %d of 3000", async (point) => {
    const { actor, id } = await makeGrid();
    await expect(getPoint(actor, id, point)).rejects.toMatchObject({ code: "not found" });
  });
});

describe("getHome", () => {
  it("is empty in a new workspace", async () => {
    expect(await getHome(await makeActor("viewer"))).toEqual({
      counts: { netlists: 0, runs: 0 },
      failing: [],
      running: [],
      recentRuns: [],
    });
  });

  it("lists netlists by their newest run only, work under way, and a curve of each recent run", async () => {
    const actor = await makeActor();
    const mended = await makeRun(actor);
    const { plan } = await getRun(actor, mended.id);
    await storeShard(mended.id, 0, plan, [3]);
    const good = await makeRun(actor, { netlistId: mended.netlistId });
    await storeShard(good.id, 0, plan);
    const bad = await makeRun(actor);
    await storeShard(bad.id, 0, plan, [3, 4]);
    const queued = await makeRun(actor);

    const home = await getHome(actor);
    expect(home.counts).toEqual({ netlists: 3, runs: 4 });
    expect(home.failing.map(({ id, pointsFailed }) => [id, pointsFailed])).toEqual([[bad.id, 2]]);
    expect(home.running.map(({ id, status }) => [id, status])).toEqual([[queued.id, "queued"]]);
    expect(home.recentRuns.map(({ id }) => id)).toEqual([queued.id, bad.id, good.id, mended.id]);
    expect(home.recentRuns[0]!.sparkline).toBeNull();
    const curve = home.recentRuns[1]!.sparkline!;
    expect(curve.decades).toBeCloseTo(6, 9);
    expect([curve.x[0], curve.x.at(-1), curve.x.length]).toEqual([0, 1, 31]);
    expect(curve.x[15]).toBeCloseTo(0.5, 9);
    expect(curve.y.slice(2, 6)).toEqual([made.trace(0, 2), null, null, made.trace(0, 5)]);
  });

  it("draws at most 64 points of a curve that spans several shards", async () => {
    const { actor, id, shards, plan } = await makeGrid();
    for (let index = 0; index < shards; index++) await storeShard(id, index, plan);
    const curve = (await getHome(actor)).recentRuns[0]!.sparkline!;
    expect(curve.x).toHaveLength(64);
    expect([curve.y[0], curve.y.at(-1)]).toEqual([made.trace(0, 0), made.trace(0, 999)]);
    expect(curve.y).not.toContain(null);
  });
});
