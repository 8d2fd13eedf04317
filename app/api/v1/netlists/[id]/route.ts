import { route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { getNetlist } from "@/lib/services/netlists/get-netlist";

/** GET → the netlist with the text of its newest revision. */
export const GET = route<{ id: string }>(async (request, { id }) =>
  getNetlist(await actorForNetlist(id, request), id),
);
