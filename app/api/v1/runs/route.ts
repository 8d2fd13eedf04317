import { readJson } from "@/lib/api/body";
import { once } from "@/lib/api/once";
import { route } from "@/lib/api/route";
import { workspaceIn } from "@/lib/api/workspace-slug";
import { actorFor, actorForNetlist } from "@/lib/auth/actor";
import { readInput } from "@/lib/services/read-input";
import { listRuns } from "@/lib/services/runs/list-runs";
import { listInput, startInput } from "@/lib/services/runs/schemas";
import { startRun } from "@/lib/services/runs/start-run";

/** GET ?workspace=&query=&status=&netlistId=&page=&size= → `{ rows, total }`. */
export const GET = route(async (request) => {
  const { workspace, ...asked } = Object.fromEntries(new URL(request.url).searchParams);
  const actor = await actorFor(workspaceIn(workspace), request);
  return listRuns(actor, readInput(listInput, asked));
});

/**
 * POST `{ netlistId, base, text? }` → 201 `{ id, number }`; 400 with `diagnostics` when the text has errors. With an Idempotency-Key, it
 * is queued once.
 */
export const POST = route(async (request) => {
  const wish = readInput(startInput, await readJson(request));
  const actor = await actorForNetlist(wish.netlistId, request);
  const work = async () => ({ status: 201, body: await startRun(actor, wish) });
  return once(request, actor, wish, work, (made) => ({ location: `/api/v1/runs/${made.id}` }));
});
