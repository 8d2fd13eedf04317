import { csvAnswer } from "@/app/(work)/[workspace]/runs/[id]/csv-answer";
import { acceptedType } from "@/lib/api/accept";
import { alreadyHas, notModified } from "@/lib/api/etag";
import { jsonStream } from "@/lib/api/json-stream";
import { json, route } from "@/lib/api/route";
import { whenGone } from "@/lib/api/when-gone";
import { actorForRun } from "@/lib/auth/actor";
import type { Actor } from "@/lib/permissions/actor";
import { getRunDocument, getRunVersion } from "@/lib/services/runs/get-run-document";
import { columnsAnswer } from "./columns-answer";

const FORMS = ["application/json", "text/csv", "application/octet-stream"] as const;

/**
 * GET → a run in the form that Accept names: the run document (sweepwright-run/1), its points as comma-separated values, or its binary
 * columns (lib/analyses/columns-document.ts). Documents and columns are 304 to a reader that has them already; any other form is 406.
 */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForRun(id, request);
  const form = acceptedType(request, FORMS);
  const answer =
    form === "text/csv"
      ? await csvAnswer(request, actor, id)
      : form === "application/octet-stream"
        ? await columnsAnswer(request, actor, id)
        : await documentAnswer(request, actor, id);
  answer.headers.set("vary", "accept");
  return answer;
});

/** A large document is sent in pieces. */
async function documentAnswer(request: Request, actor: Actor, id: string): Promise<Response> {
  const version = await getRunVersion(actor, id);
  if (alreadyHas(request, version)) return notModified(version);
  const { document, etag, large, release } = await getRunDocument(actor, id);
  const headers = { etag, "cache-control": "private, no-cache" };
  if (!large) return json(document, { headers });
  if (request.method === "HEAD") {
    release();
    return new Response(null, { headers: { ...headers, "content-type": "application/json" } });
  }
  whenGone(request, release);
  return new Response(jsonStream(document, release), {
    headers: { ...headers, "content-type": "application/json" },
  });
}
