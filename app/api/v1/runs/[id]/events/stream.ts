import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { listEvents, type RunEvent } from "@/lib/services/events/list-events";
import { listenToRun } from "@/lib/services/events/listen";

const HEARTBEAT_MS = 15_000;
/** How old the last look at the reader's session and membership may be when events are sent, ms. */
const RECHECK_MS = 5_000;
/** Wait after the database did not answer, ms. */
const AWAY_MS = 1_000;

/** Whether no event can follow this one. */
export function isLast({ data: { status } }: RunEvent): boolean {
  return status === "done" || status === "failed" || status === "cancelled";
}

interface Input {
  readonly runId: string;
  /** Sequence of the last event the reader has. */
  readonly after: number;
  /** Who reads, looked up anew; throws an AppError when they may not any longer. */
  readonly reader: () => Promise<Actor>;
  readonly signal: AbortSignal;
  /** Longest silence, ms: a comment then keeps what lies between from closing the connection. */
  readonly heartbeat?: number;
  /** Called when the stream has ended, for whatever reason; maybe more than once. */
  readonly onEnd?: () => void;
}

/**
 * The events of a run after a known one, as the bytes of an event stream. It ends after the run's last event, when the reader's
 * session or membership ends, and with `signal`; the reader's browser comes again by itself where that was not wanted.
 */
export function eventStream(input: Input): ReadableStream<Uint8Array> {
  const { runId, reader, signal, heartbeat = HEARTBEAT_MS } = input;
  let { after } = input;
  const encoder = new TextEncoder();
  let ended = false;
  let cancelled = false;
  let woken = true;
  let wake: () => void = () => undefined;
  const unlisten = listenToRun(runId, () => {
    woken = true;
    wake();
  });
  const end = () => {
    ended = true;
    unlisten();
    signal.removeEventListener("abort", end);
    wake();
    input.onEnd?.();
  };
  signal.addEventListener("abort", end);
  if (signal.aborted) end();

  /** Waits for an announcement, or for so long; says whether there was one. */
  async function announced(longest: number): Promise<boolean> {
    if (!woken && !ended) {
      await new Promise<void>((resolve) => {
        const timer = setTimeout(resolve, longest);
        wake = () => {
          clearTimeout(timer);
          resolve();
        };
      });
      wake = () => undefined;
    }
    const was = woken;
    woken = false;
    return was;
  }

  async function send(controller: ReadableStreamDefaultController<Uint8Array>): Promise<void> {
    const write = (text: string) => {
      if (!ended) controller.enqueue(encoder.encode(text));
    };
    let actor = await reader();
    let checked = Date.now();
    write("retry: 1000\n\n");
    while (!ended) {
      const silent = !(await announced(heartbeat));
      if (silent) write(": still here\n\n");
      try {
        if (silent || Date.now() - checked > RECHECK_MS) {
          actor = await reader();
          checked = Date.now();
        }
        const events = await listEvents(actor, { runId, after });
        for (const event of events) {
          write(`id: ${event.sequence}\ndata: ${JSON.stringify(event.data)}\n\n`);
          after = event.sequence;
          if (isLast(event)) return;
        }
        // There may be more than one reading gives.
        if (events.length > 0) woken = true;
      } catch (error) {
        if (error instanceof AppError) return;
        woken = false;
        await announced(AWAY_MS);
        woken = true;
      }
    }
  }

  return new ReadableStream<Uint8Array>({
    start(controller) {
      send(controller)
        .catch((error) => console.warn(`An event stream of run ${runId} broke off.`, error))
        .finally(() => {
          end();
          if (!cancelled) controller.close();
        });
    },
    cancel() {
      cancelled = true;
      end();
    },
  });
}
