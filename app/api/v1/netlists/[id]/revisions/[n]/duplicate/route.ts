import { once } from "@/lib/api/once";
import { route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { duplicateRevision } from "@/lib/services/netlists/duplicate-revision";
import { duplicateInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** POST → 201 `{ id }` of a new netlist with the text of the revision. With an Idempotency-Key, it is made once. */
export const POST = route<{ id: string; n: string }>(async (request, { id, n }) => {
  const actor = await actorForNetlist(id, request);
  const wish = readInput(duplicateInput, { netlistId: id, number: n });
  const work = async () => ({ status: 201, body: await duplicateRevision(actor, wish) });
  return once(request, actor, wish, work, (made) => ({ location: `/api/v1/netlists/${made.id}` }));
});
