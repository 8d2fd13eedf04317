import { revisionTag } from "@/lib/api/precondition";
import { json, route } from "@/lib/api/route";
import { actorForNetlist } from "@/lib/auth/actor";
import { getNetlist } from "@/lib/services/netlists/get-netlist";

/** GET → the netlist with the text of its newest revision, whose entity tag it carries: for If-Match where a text is saved upon it. */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const netlist = await getNetlist(await actorForNetlist(id, request), id);
  return json(netlist, { headers: { etag: revisionTag(id, netlist.revision) } });
});
