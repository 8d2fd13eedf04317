import { route } from "@/lib/api/route";
import { workspaceIn } from "@/lib/api/workspace-slug";
import { actorFor } from "@/lib/auth/actor";
import { readInput } from "@/lib/services/read-input";
import { listNews, newsInput } from "@/lib/services/workspaces/list-news";

/** GET ?workspace=&after=&netlistId= → `{ now, runs, revisions }`: what has happened since, that concerns who asks. */
export const GET = route(async (request) => {
  const { workspace, ...asked } = Object.fromEntries(new URL(request.url).searchParams);
  const actor = await actorFor(workspaceIn(workspace), request);
  return listNews(actor, readInput(newsInput, asked));
});
