import { readJson } from "@/lib/api/body";
import { json, route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { restoreRevision } from "@/lib/services/netlists/restore-revision";
import { restoreInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** POST `{ base, message? }` → 201 `{ revision, hash, changed: true }`, or 200 when the newest revision has that text already. */
export const POST = route<{ id: string; n: string }>(async (request, { id, n }) => {
  const actor = await actorForNetlist(id, request);
  const wish = readInput(restoreInput, { ...(await readJson(request)), netlistId: id, number: n });
  const saved = await restoreRevision(actor, wish);
  return json(saved, { status: saved.changed ? 201 : 200 });
});
