import { readJson } from "@/lib/api/body";
import { json, route } from "@/lib/api/route";
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

/** POST `{ base, text, message? }` → 201 `{ revision, hash, changed: true }`, or 200 when the text was the newest one already. */
export const POST = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForNetlist(id, request);
  const wish = readInput(saveInput, { ...(await readJson(request)), netlistId: id });
  const saved = await saveRevision(actor, wish);
  return json(saved, { status: saved.changed ? 201 : 200 });
});
