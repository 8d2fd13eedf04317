import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { drawnReport } from "@/app/(work)/[workspace]/runs/[id]/report/drawn-report";
import { database } from "@/db/client";
import { DIODE_TEXT, makeActor, makeRun } from "@/db/factories";
import { overview } from "@/db/schema/overview";
import { run } from "@/db/schema/run";
import { compile } from "@/lib/analyses/compile";
import { overviewOf } from "@/lib/analyses/overview";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { ownDatabase } from "../integration/own-database";
import { storeShard } from "./store-shard";

ownDatabase();

const READ = { verdict: "holds" as const, requirements: [], readings: [], budgets: null, causes: null };
/** Seventeen million numbers: more than are read at once. */
const HUGE = `${DIODE_TEXT.replace("5 per decade", "1000000 points")}${Array.from({ length: 12 }, (_, i) => `show v${i} = s.v\n`).join("")}`;

describe("the report of a run", () => {
  it("is drawn from its points, which are let go", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor);
    const summary = await getRun(actor, id);
    await storeShard(id, 0, summary.plan, [3]);
    const report = await drawnReport(actor, summary);
    if ("refusal" in report) throw new Error(report.refusal);
    expect(report.remark).toBeNull();
    expect(report.printed.failures.map(({ point }) => point)).toEqual([3]);
    for (const theme of ["light", "dark"] as const) expect(report.figure![theme]).toMatch(/^<svg /);
    expect(report.figure!.light).not.toBe(report.figure!.dark);
  });

  it("too large to be read is drawn from afar, and says so; without an overview it is refused in a sentence", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: HUGE });
    const refused = await drawnReport(actor, await getRun(actor, id));
    expect(refused).toEqual({ refusal: expect.stringContaining("17\u202f000\u202f000 numbers") });
    const { job } = compile(HUGE.replace("1000000 points", "5000 points"));
    const traces = job!.plan.traces.map((_, k) =>
      Float64Array.from({ length: 5000 }, (_, i) => k + i / 5000),
    );
    const data = Buffer.from(overviewOf(job!, { traces })!);
    await database().insert(overview).values({ runId: id, data });
    await database().update(run).set({ judgement: READ }).where(eq(run.id, id));
    const report = await drawnReport(actor, await getRun(actor, id));
    if ("refusal" in report) throw new Error(report.refusal);
    expect(report.remark).toContain("too large to be read whole");
    expect(report.figure!.light.match(/<path[^>]*stroke-width="1.75"/g)!.length).toBe(13);
    expect(report.figure!.light.length).toBeLessThan(1_000_000);
  });

  it("waits its turn while two large ones are read by the same person, in a sentence too", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: DIODE_TEXT.replace("5 per decade", "200000 points") });
    const [one, two] = [await getRunDocument(actor, id), await getRunDocument(actor, id)];
    expect(await drawnReport(actor, await getRun(actor, id))).toEqual({
      refusal: expect.stringContaining("Try again in a few seconds"),
    });
    one.release();
    two.release();
    expect("refusal" in (await drawnReport(actor, await getRun(actor, id)))).toBe(false);
  });
});
