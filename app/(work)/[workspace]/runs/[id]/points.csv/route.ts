import { route } from "@/lib/api/route";
import { actorFor } from "@/lib/auth/actor";
import { csvAnswer } from "../csv-answer";

/** GET → every point of a run as comma-separated values in UTF-8: setting, traces, outcome, bound; coherent SI units. */
export const GET = route<{ workspace: string; id: string }>(async (request, { workspace, id }) =>
  csvAnswer(request, await actorFor(workspace, request), id),
);
