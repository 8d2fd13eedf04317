import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { columnsAnswer } from "../columns-answer";

/** GET → the run document in its binary form (lib/analyses/columns-document.ts), or 304 to a reader that has it already. */
export const GET = route<{ id: string }>(async (request, { id }) =>
  columnsAnswer(request, await actorForRun(id, request), id),
);
