import { readJson } from "@/lib/api/body";
import { once } from "@/lib/api/once";
import { route } from "@/lib/api/route";
import { workspaceIn } from "@/lib/api/workspace-slug";
import { actorFor } from "@/lib/auth/actor";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { listNetlists } from "@/lib/services/netlists/list-netlists";
import { createInput, listInput } from "@/lib/services/netlists/schemas";
import { readInput } from "@/lib/services/read-input";

/** GET ?workspace=&query=&which=&sort=&direction=&page=&size= → `{ rows, total }`. */
export const GET = route(async (request) => {
  const { workspace, ...asked } = Object.fromEntries(new URL(request.url).searchParams);
  const actor = await actorFor(workspaceIn(workspace), request);
  return listNetlists(actor, readInput(listInput, asked));
});

/** POST `{ workspace, title?, text }` → 201 `{ id }`. With an Idempotency-Key, it is made once. */
export const POST = route(async (request) => {
  const { workspace, ...wish } = await readJson(request);
  const actor = await actorFor(workspaceIn(workspace), request);
  const work = async () => ({ status: 201, body: await createNetlist(actor, readInput(createInput, wish)) });
  return once(request, actor, { workspace, ...wish }, work, (made) => ({
    location: `/api/v1/netlists/${made.id}`,
  }));
});
