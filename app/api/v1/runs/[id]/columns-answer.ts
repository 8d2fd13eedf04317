import { byteStream } from "@/lib/api/byte-stream";
import { alreadyHas, notModified } from "@/lib/api/etag";
import { whenGone } from "@/lib/api/when-gone";
import type { Actor } from "@/lib/permissions/actor";
import { getRunColumns } from "@/lib/services/runs/get-run-columns";
import { getRunVersion } from "@/lib/services/runs/get-run-document";

/** The run document in its binary form (lib/analyses/columns-document.ts), or 304 to a reader that has it already. */
export async function columnsAnswer(request: Request, actor: Actor, id: string): Promise<Response> {
  const version = await getRunVersion(actor, id, "columns");
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
  whenGone(request, release);
  return new Response(byteStream(pieces, release), { headers });
}
