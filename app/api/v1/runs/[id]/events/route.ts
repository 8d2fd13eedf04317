import { route } from "@/lib/api/route";
import { actorForRun } from "@/lib/auth/actor";
import { listEvents, type RunEvent } from "@/lib/services/events/list-events";
import { Gate } from "@/lib/services/gate";
import { eventStream, isLast } from "./stream";

const HEADERS = {
  "content-type": "text/event-stream; charset=utf-8",
  // Without no-transform a compressing layer would hold small events back until its buffer is full.
  "cache-control": "private, no-cache, no-transform",
  "x-accel-buffering": "no",
};

/** Streams of one person at a time: each asks the database at every event. A page that gets none asks by itself instead. */
const streams = new Gate(30, "You follow thirty runs at once already. Close a few of their pages.");

/** The event a reader has seen last: by the header that browsers send when they come again, or by `?after=` at first. */
function lastSeen(request: Request): number {
  const told = request.headers.get("last-event-id") ?? new URL(request.url).searchParams.get("after");
  return told !== null && /^\d{1,9}$/.test(told) ? Number(told) : 0;
}

/**
 * GET → the events of a run as server-sent events, `id` being their sequence and `data` the state after each; from where the
 * reader stopped on, and until the run has ended. 204, which tells browsers to stay away, when there is nothing more to come; 429
 * to a person who has thirty of them.
 */
export const GET = route<{ id: string }>(async (request, { id }) => {
  const actor = await actorForRun(id, request);
  const seen = lastSeen(request);
  // The seen event is read again: a number this run never gave means that the reader knows nothing of it.
  const events = await listEvents(actor, { runId: id, after: Math.max(0, seen - 1) });
  const known = seen > 0 && events[0]?.sequence === seen;
  if (known && isLast(events[0] as RunEvent)) return new Response(null, { status: 204 });
  const stream = eventStream({
    runId: id,
    after: known ? seen : 0,
    reader: () => actorForRun(id, request),
    signal: request.signal,
    onEnd: streams.enter(actor.userId),
  });
  return new Response(stream, { headers: HEADERS });
});
