import { route } from "@/lib/api/route";
import { actorFor } from "@/lib/auth/actor";
import { getRunOverview } from "@/lib/services/runs/get-run-overview";

/** GET → what a large run looks like from afar, in the binary form of its columns (lib/analyses/overview.ts). It never changes. */
export const GET = route<{ workspace: string; id: string }>(async (request, { workspace, id }) => {
  const body = await getRunOverview(await actorFor(workspace, request), id);
  const headers = { "content-type": "application/octet-stream", "cache-control": "private, no-store" };
  return new Response(body, { headers });
});
