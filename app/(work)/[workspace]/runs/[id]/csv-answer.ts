import { whenGone } from "@/lib/api/when-gone";
import type { Actor } from "@/lib/permissions/actor";
import { getPointBlocks } from "@/lib/services/runs/point-blocks";
import { csvHead, csvLines } from "./csv-lines";
import { fileName } from "./file-name";

/** Every point of a run as comma-separated values in UTF-8, read as it is sent. Throws "not found" for a run of another workspace. */
export async function csvAnswer(request: Request, actor: Actor, id: string): Promise<Response> {
  const { run, blocks, release } = await getPointBlocks(actor, id);
  const headers = {
    "content-type": "text/csv; charset=utf-8; header=present",
    "content-disposition": `attachment; filename="${fileName(run, "csv")}"`,
    "cache-control": "private, no-store",
  };
  if (request.method === "HEAD") {
    release();
    return new Response(null, { headers });
  }
  whenGone(request, release);
  const encoder = new TextEncoder();
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      controller.enqueue(encoder.encode(csvHead(run.plan)));
    },
    async pull(controller) {
      try {
        const { value, done } = await blocks.next();
        if (done) {
          controller.close();
          release();
        } else controller.enqueue(encoder.encode(csvLines(run.plan, value)));
      } catch (error) {
        release();
        throw error;
      }
    },
    async cancel() {
      release();
      await blocks.return();
    },
  });
  return new Response(body, { headers });
}
