import { alreadyHas, notModified } from "@/lib/api/etag";
import { json, route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { getRunDocument, getRunVersion } from "@/lib/services/runs/get-run-document";

/** GET → the run document (sweepwright-run/1), or 304 to a reader that has it already. */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForRun(id, request);
  const version = await getRunVersion(actor, id);
  if (alreadyHas(request, version)) return notModified(version);
  const { document, etag } = await getRunDocument(actor, id);
  return json(document, { headers: { etag, "cache-control": "private, no-cache" } });
});
