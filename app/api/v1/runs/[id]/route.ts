import { alreadyHas, notModified } from "@/lib/api/etag";
import { jsonStream } from "@/lib/api/json-stream";
import { json, route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { getRunDocument, getRunVersion } from "@/lib/services/runs/get-run-document";

/** GET → the run document (sweepwright-run/1), or 304 to a reader that has it already. A large one is sent in pieces. */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForRun(id, request);
  const version = await getRunVersion(actor, id);
  if (alreadyHas(request, version)) return notModified(version);
  const { document, etag, large, release } = await getRunDocument(actor, id);
  const headers = { etag, "cache-control": "private, no-cache" };
  if (!large) return json(document, { headers });
  if (request.method === "HEAD") {
    release();
    return new Response(null, { headers: { ...headers, "content-type": "application/json" } });
  }
  request.signal.addEventListener("abort", release, { once: true });
  return new Response(jsonStream(document, release), {
    headers: { ...headers, "content-type": "application/json" },
  });
});
