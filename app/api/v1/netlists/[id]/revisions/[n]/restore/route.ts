import { readJson } from "@/lib/api/body";
import { route } from "@/lib/api/route";
import { saveUpon } from "@/lib/api/save-upon";
import { actorForNetlist } from "@/lib/auth/actor";
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
  return saveUpon(request, actor, id, wish, (base) =>
    restoreRevision(actor, readInput(restoreInput, { ...wish, base, netlistId: id, number: n })),
  );
});
