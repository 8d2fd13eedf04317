import { expect, test } from "vitest";
import { makeActor, makeRun } from "@/db/factories";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { storedForm } from "@/lib/services/chunks/columns";
import { getPoint } from "@/lib/services/runs/get-point";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { claimShard } from "@/lib/services/shards/claim-shard";
import { completeShard } from "@/lib/services/shards/complete-shard";
import { EXCHANGED } from "../integration/work/texts";

test("points that the circuit would leave are told in the document and at each point, as far as they are stored", async () => {
  const actor = await makeActor();
  const { id } = await makeRun(actor, { text: EXCHANGED });
  const { job } = compile(EXCHANGED);
  const claimed = await claimShard({ runId: id, index: 1, worker: "a test", leaseSeconds: 60 });
  if (claimed.kind !== "claimed") throw new Error("The shard was not claimed.");
  const { from, to } = claimed.claim;
  await completeShard(claimed.claim, storedForm(solveRange(job!, from, to)));
  const { document } = await getRunDocument(actor, id);
  expect(document.unstable).toEqual([{ from, to }]);
  expect((await getPoint(actor, id, from)).isUnstable).toBe(true);
  expect((await getPoint(actor, id, from - 1)).isUnstable).toBe(false);
});
