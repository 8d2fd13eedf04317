import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { getRun } from "@/lib/services/runs/get-run";

/** GET → the state of the run and its plan, without results. */
export const GET = route<{ id: string }>(async (request, { id }) =>
  getRun(await actorForRun(id, request), id),
);
