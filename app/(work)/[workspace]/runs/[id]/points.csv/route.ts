import { route } from "@/lib/api/route";
import { actorFor } from "@/lib/auth/actor";
import { getPointBlocks } from "@/lib/services/runs/point-blocks";
import { csvHead, csvLines } from "../csv-lines";

/** GET → every point of a run as comma-separated values in UTF-8: setting, traces, outcome; coherent SI units. */
export const GET = route<{ workspace: string; id: string }>(async (request, { workspace, id }) => {
  const actor = await actorFor(workspace, request);
  const { run, blocks } = await getPointBlocks(actor, id);
  const encoder = new TextEncoder();
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      controller.enqueue(encoder.encode(csvHead(run.plan)));
    },
    async pull(controller) {
      const { value, done } = await blocks.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(csvLines(run.plan, value)));
    },
  });
  return new Response(body, {
    headers: {
      "content-type": "text/csv; charset=utf-8; header=present",
      "content-disposition": `attachment; filename="run-${run.number}.csv"`,
      "cache-control": "private, no-store",
    },
  });
});
