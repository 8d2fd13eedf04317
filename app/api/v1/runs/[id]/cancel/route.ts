import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { cancelRun } from "@/lib/services/runs/cancel-run";

/** POST, without a body → the run's state; 409 when it has finished already. */
export const POST = route<{ id: string }>(async (request, { id }) =>
  cancelRun(await actorForRun(id, request), id),
);
