import { byteStream } from "@/lib/api/byte-stream";
import { alreadyHas, notModified } from "@/lib/api/etag";
import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { getRunColumns } from "@/lib/services/runs/get-run-columns";
import { getRunVersion } from "@/lib/services/runs/get-run-document";

/** GET → the run document in its binary form (lib/analyses/columns-document.ts), or 304 to a reader that has it already. */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForRun(id, request);
  const version = await getRunVersion(actor, id);
  if (alreadyHas(request, version)) return notModified(version);
  const { pieces, etag, release } = await getRunColumns(actor, id);
  const headers = {
    etag,
    "cache-control": "private, no-cache",
    "content-type": "application/octet-stream",
  };
  if (request.method === "HEAD") {
    release();
    return new Response(null, { headers });
  }
  request.signal.addEventListener("abort", release, { once: true });
  return new Response(byteStream(pieces, release), { headers });
});
