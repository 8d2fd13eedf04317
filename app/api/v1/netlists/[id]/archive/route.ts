import { route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { archiveNetlist } from "@/lib/services/netlists/archive-netlist";

/** POST → `{ archived: true }`: the netlist is out of the lists, and everything of it is kept. */
export const POST = route<{ id: string }>(async (request, { id }) =>
  archiveNetlist(await actorForNetlist(id, request), id),
);
