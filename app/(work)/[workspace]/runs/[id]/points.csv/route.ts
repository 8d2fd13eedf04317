import { problem } from "@/lib/api/problem";
import { actorFor } from "@/lib/auth/actor";
import { getRun } from "@/lib/services/runs/get-run";
import { getRunDocument } from "@/lib/services/runs/get-run-document";
import { csvLines } from "../csv-lines";

interface Context {
  readonly params: Promise<{ readonly workspace: string; readonly id: string }>;
}

/** GET → every point of a run as comma-separated values in UTF-8: setting, traces, outcome; coherent SI units. */
export async function GET(request: Request, { params }: Context): Promise<Response> {
  try {
    const { workspace, id } = await params;
    const actor = await actorFor(workspace, request);
    const [run, { document }] = await Promise.all([getRun(actor, id), getRunDocument(actor, id)]);
    const lines = csvLines(document);
    const encoder = new TextEncoder();
    const body = new ReadableStream<Uint8Array>({
      pull(controller) {
        const { value, done } = lines.next();
        if (done) controller.close();
        else controller.enqueue(encoder.encode(value));
      },
    });
    return new Response(body, {
      headers: {
        "content-type": "text/csv; charset=utf-8; header=present",
        "content-disposition": `attachment; filename="run-${run.number}.csv"`,
        "cache-control": "private, no-store",
      },
    });
  } catch (error) {
    return problem(error);
  }
}
