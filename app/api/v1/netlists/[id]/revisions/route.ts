import { readJson } from "@/lib/api/body";
import { route } from "@/lib/api/route";
import { saveUpon } from "@/lib/api/save-upon";
import { actorForNetlist } from "@/lib/auth/actor";
import { listRevisions } from "@/lib/services/netlists/list-revisions";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { revisionsInput, saveInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** GET ?page=&size= → `{ rows, total }`, the newest revision first. */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForNetlist(id, request);
  const asked = Object.fromEntries(new URL(request.url).searchParams);
  return listRevisions(actor, readInput(revisionsInput, { ...asked, netlistId: id }));
});

/**
 * POST `{ base?, text, message? }` → 201 `{ revision, hash, changed: true }`, or 200 when the text was the newest one already. The
 * revision it was written upon stands in `base` (409 when it is no longer the newest) or in If-Match (412); without either 428. With
 * an Idempotency-Key, the same request again gets the same answer.
 */
export const POST = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForNetlist(id, request);
  const wish = await readJson(request);
  return saveUpon(request, actor, id, wish, (base) =>
    saveRevision(actor, readInput(saveInput, { ...wish, base, netlistId: id })),
  );
});
