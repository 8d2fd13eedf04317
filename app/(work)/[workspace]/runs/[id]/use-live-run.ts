"use client";

import { useEffect, useMemo, useRef, useState } from "react";
import type { ColumnsDocument } from "@/lib/analyses/columns-document";
import type { RunDocument } from "@/lib/analyses/result";
import { DocumentFeed } from "./document-feed";
import { fetchSummary } from "./fetch-run";
import { isLive, type Progress, type RunState } from "./run-shapes";

/** Ms between two looks at the summary while the stream of events does not answer. */
const POLL = 1000;

/** The document that came with the page, and the tag of columns of its version. */
export interface Found {
  readonly document: RunDocument;
  readonly etag: string;
}

interface LiveRun {
  readonly run: RunState;
  readonly document: RunDocument | ColumnsDocument | null;
  /** Why the curves could not be brought up to date; null while they are. */
  readonly problem: string | null;
  /** Whether it ended while the page was open and everything of it has arrived. */
  readonly finished: boolean;
  /** Whether it has ended and the last of its results are still on their way. */
  readonly behind: boolean;
  readonly setRun: (run: RunState) => void;
}

/**
 * A run and its results, kept current: events come by one stream, which the browser takes up again where it broke; while it
 * cannot be had, the summary is asked for every second. The first document is asked for `after` what comes before it. Each event asks for the document, which arrives as fast as it can be read.
 */
export function useLiveRun(first: RunState, found: Found | null, after: Promise<void>): LiveRun {
  const [run, setRun] = useState(first);
  const [document, setDocument] = useState<RunDocument | ColumnsDocument | null>(found?.document ?? null);
  const [problem, setProblem] = useState<string | null>(null);
  const [finished, setFinished] = useState(false);
  // Only what the page began with: later properties of the server are not newer than what the stream brought.
  const start = useRef({
    id: first.id,
    status: first.status,
    pointsDone: first.pointsDone,
    lastEvent: first.lastEvent,
    etag: found?.etag ?? null,
    after,
  });

  useEffect(() => {
    const { id, status, pointsDone, lastEvent, etag, after } = start.current;
    const feed = new DocumentFeed(id, etag, { onDocument: setDocument, onProblem: setProblem });
    // A document without a point is worth asking for only when the page came with one to compare it to.
    if (etag === null ? pointsDone > 0 || !isLive(status) : isLive(status))
      void after.then(() => feed.want());
    if (!isLive(status)) return () => feed.close();

    let timer: ReturnType<typeof setInterval> | undefined;
    const end = () => {
      events.close();
      clearInterval(timer);
    };
    // The curve comes first: what else there is to know of a finished run is asked for when it stands.
    const finish = () => {
      end();
      feed.finish(() => {
        void fetchSummary(id).then(setRun, () => undefined);
        setFinished(true);
      });
    };
    const look = async () => {
      const next = await fetchSummary(id).catch(() => null);
      if (next === null) return;
      setRun(next);
      if (isLive(next.status)) feed.want();
      else finish();
    };
    const take = (event: MessageEvent<string>) => {
      clearInterval(timer);
      timer = undefined;
      const progress: Progress = JSON.parse(event.data);
      setRun((before) => ({ ...before, ...progress }));
      if (!isLive(progress.status)) finish();
      else if (progress.pointsDone > 0) feed.want();
    };
    const events = new EventSource(`/api/v1/runs/${id}/events?after=${lastEvent}`);
    for (const kind of ["message", "progress", "status"]) events.addEventListener(kind, take);
    events.addEventListener("error", () => {
      timer ??= setInterval(look, POLL);
    });
    return () => {
      end();
      feed.close();
    };
  }, []);

  const behind = !isLive(run.status) && !finished && (isLive(first.status) || document === null);
  // The page of a large run begins with the outline of its plan; the document has all of it.
  const axes = document?.axes;
  const whole = useMemo(
    () => (axes === undefined ? run : { ...run, plan: { ...run.plan, axes } }),
    [run, axes],
  );
  return { run: whole, document, problem, finished, behind, setRun };
}
