import type { Actor } from "@/lib/permissions/actor";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { once } from "./once";
import { baseOf, revisionTag, upon } from "./precondition";

interface SavedRevision {
  readonly revision: number;
  readonly hash: string;
  readonly changed: boolean;
}

/**
 * Answers a request that makes the next revision of netlist `id`: `save` is given the revision that the `wish` or If-Match stands upon.
 * 201 with the revision, 200 when the newest one has that text already; the same request under one Idempotency-Key is done once.
 */
export function saveUpon(
  request: Request,
  actor: Actor,
  id: string,
  wish: Record<string, unknown>,
  save: (base: unknown) => Promise<SavedRevision>,
): Promise<Response> {
  const work = async () => {
    const { revision } = await getNetlist(actor, id);
    const saved = await save(baseOf(request, { id, latest: revision }, wish.base));
    return { status: saved.changed ? 201 : 200, body: saved };
  };
  return once(
    request,
    actor,
    wish,
    () => upon(request, work),
    (saved) => ({ etag: revisionTag(id, saved.revision) }),
  );
}
