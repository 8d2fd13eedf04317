import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { makeActor, makeRun } from "@/db/factories";
import { run } from "@/db/schema/run";
import { compile } from "@/lib/analyses/compile";
import { finalJudgement } from "@/lib/analyses/verdict";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunContext } from "@/lib/services/runs/get-run-context";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

const TEXT = `title "A divider (invented)"
knob k = 1 V
let R_top = 1 kΩ ± 1 %
ground -- V1 : voltage k -- in -- R1 : resistor R_top -- out
out -- R2 : resistor 1 kΩ ± 2 % -- ground
sweep k from 1 V to 2 V, 3 points
show y = out.v
read top = highest(y)
require y <= 2 V as "low"
require top <= 2 V
`;

describe("getRunContext", () => {
  it("says which line gives each tolerance, reading and requirement, and the newest revision", async () => {
    const actor = await makeActor();
    const { id } = await makeRun(actor, { text: TEXT });
    const before = await getRunContext(actor, id);
    expect(before).toEqual({
      latestRevision: 1,
      toleranceLines: {},
      readingLines: { top: 8 },
      requirementLines: [9, 10],
    });
    const { job } = compile(TEXT);
    const judgement = finalJudgement(job!, { traces: [Float64Array.of(0.5, 0.75, 1)] });
    await database().update(run).set({ judgement }).where(eq(run.id, id));
    const { netlistId } = await getRun(actor, id);
    await saveRevision(actor, {
      netlistId,
      base: 1,
      text: TEXT.replace("2 kΩ", "3 kΩ").replace("± 2 %", "± 3 %"),
    });
    expect(await getRunContext(actor, id)).toMatchObject({
      latestRevision: 2,
      toleranceLines: { "R1 R_top": 3, "R2 value": 5 },
    });
  });

  it("is not for another workspace", async () => {
    const { id } = await makeRun(await makeActor());
    await expect(getRunContext(await makeActor(), id)).rejects.toMatchObject({ code: "not found" });
  });
});
