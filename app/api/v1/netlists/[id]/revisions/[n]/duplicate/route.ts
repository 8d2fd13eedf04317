import { json, route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { duplicateRevision } from "@/lib/services/netlists/duplicate-revision";
import { duplicateInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** POST → 201 `{ id }` of a new netlist with the text of the revision. */
export const POST = route<{ id: string; n: string }>(async (request, { id, n }) => {
  const actor = await actorForNetlist(id, request);
  const made = await duplicateRevision(actor, readInput(duplicateInput, { netlistId: id, number: n }));
  return json(made, { status: 201, headers: { location: `/api/v1/netlists/${made.id}` } });
});
