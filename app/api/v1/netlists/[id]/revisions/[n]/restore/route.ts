import { readJson } from "@/lib/api/body";
import { once } from "@/lib/api/once";
import { baseOf, revisionTag, upon } from "@/lib/api/precondition";
import { route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { restoreRevision } from "@/lib/services/netlists/restore-revision";
import { restoreInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/**
 * POST `{ base?, message? }` → 201 `{ revision, hash, changed: true }`, or 200 when the newest revision has that text already. `base`,
 * If-Match and Idempotency-Key as in saving a revision.
 */
export const POST = route<{ id: string; n: string }>(async (request, { id, n }) => {
  const actor = await actorForNetlist(id, request);
  const wish = await readJson(request);
  const work = async () => {
    const { revision } = await getNetlist(actor, id);
    const base = baseOf(request, { id, latest: revision }, wish.base);
    const asked = readInput(restoreInput, { ...wish, base, netlistId: id, number: n });
    const saved = await restoreRevision(actor, asked);
    return { status: saved.changed ? 201 : 200, body: saved };
  };
  return once(
    request,
    actor,
    wish,
    () => upon(request, work),
    (saved) => ({ etag: revisionTag(id, saved.revision) }),
  );
});
