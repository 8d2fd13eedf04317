import { route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { bringBackNetlist } from "@/lib/services/netlists/bring-back-netlist";

/** POST → `{ archived: false }`: an archived netlist stands in the lists again. */
export const POST = route<{ id: string }>(async (request, { id }) =>
  bringBackNetlist(await actorForNetlist(id, request), id),
);
