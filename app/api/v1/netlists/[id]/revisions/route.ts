import { readJson } from "@/lib/api/body";
import { json, route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { saveInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** POST `{ base, text, message? }` → 201 `{ revision, hash, changed: true }`, or 200 when the text was the newest one already. */
export const POST = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForNetlist(id, request);
  const wish = readInput(saveInput, { ...(await readJson(request)), netlistId: id });
  const saved = await saveRevision(actor, wish);
  return json(saved, { status: saved.changed ? 201 : 200 });
});
