import { alreadyHas, notModified } from "@/lib/api/etag";
import { revisionTag } from "@/lib/api/precondition";
import { json, route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { getRevision } from "@/lib/services/netlists/get-revision";

/** GET → one revision with its text, or 304 to a reader that has it: nothing of it ever changes. */
export const GET = route<{ id: string; n: string }>(async (request, { id, n }) => {
  const actor = await actorForNetlist(id, request);
  const revision = await getRevision(actor, id, /^\d{1,9}$/.test(n) ? Number(n) : Number.NaN);
  const etag = revisionTag(id, revision.number);
  if (alreadyHas(request, etag)) return notModified(etag);
  return json(revision, { headers: { etag, "cache-control": "private, no-cache" } });
});
